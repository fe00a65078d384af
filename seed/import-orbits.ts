import type { Actor } from "@/lib/engagement/roles";
import { elementsToOmm } from "@/lib/formats/elements-to-omm";
import { importElements } from "@/lib/services/import-elements";
import type { InventedFragment } from "./break-up";
import { elementsAt, type InventedOrbit } from "./orbits";
import type { InventedProtected } from "./protected";
import { randomFrom } from "./random";

const MINUTE_MS = 60_000;

/** Sets of a batch carry epochs spread over the two hours before `latestMs`, as a catalogue's would. */
function epochOf(orbit: InventedOrbit, latestMs: number): number {
  const minutesBack = Math.floor(randomFrom(`${orbit.catalogNumber}`).between(0, 120));
  return Math.floor(latestMs / MINUTE_MS) * MINUTE_MS - minutesBack * MINUTE_MS;
}

function asText(orbits: readonly InventedOrbit[], latestMs: number): string {
  const sets = orbits.map((orbit) => elementsToOmm(elementsAt(orbit, epochOf(orbit, latestMs))));
  return JSON.stringify(sets, null, 1);
}

/** Imports the break-up's sets with epochs up to `latestMs`, through the same door as a planner's upload. */
export async function importFragments(
  actor: Actor,
  fragments: readonly InventedFragment[],
  latestMs: number,
  nowMs: number,
): Promise<string | null> {
  const text = asText(
    fragments.map((f) => f.orbit),
    latestMs,
  );
  const report = await importElements(
    actor,
    { text, source: "invented break-up of the demo", as: "fragments" },
    nowMs,
  );
  return mustBeClean(report.rejected, report.sweepId);
}

/** Imports protected objects, one text for each class. */
export async function importProtected(
  actor: Actor,
  objects: readonly InventedProtected[],
  latestMs: number,
  nowMs: number,
): Promise<void> {
  for (const kind of ["crewed", "payload", "optical payload", "own"] as const) {
    const text = asText(
      objects.filter((o) => o.class === kind).map((o) => o.orbit),
      latestMs,
    );
    const source = "invented protected objects of the demo";
    const report = await importElements(actor, { text, source, as: "protected", class: kind }, nowMs);
    mustBeClean(report.rejected, null);
  }
}

function mustBeClean<T>(rejected: readonly { line: number; message: string }[], result: T): T {
  const first = rejected[0];
  if (first) throw new Error(`demo element sets were refused, line ${first.line}: ${first.message}`);
  return result;
}
