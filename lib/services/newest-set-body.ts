import type { NewestSetBody } from "@/lib/contracts/fragments";

/** The newest element set of an object with its age at `nowMs`; before its epoch the age is 0. */
export function newestSetBody(
  set: { id: string; epochAt: Date; source: string; importedAt: Date } | undefined,
  nowMs: number,
): NewestSetBody | null {
  if (!set) return null;
  return {
    id: set.id,
    epochAt: set.epochAt.toISOString(),
    ageH: Math.max(0, nowMs - set.epochAt.getTime()) / 3_600_000,
    source: set.source,
    importedAt: set.importedAt.toISOString(),
  };
}
