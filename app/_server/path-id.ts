import { identifierText } from "@/lib/contracts/common";
import { notFound } from "@/lib/engagement/refusal";

/** The identifier in a route's path; what isn't one names nothing: 404. */
export function pathId(params: Readonly<Record<string, string>>, what: string, name = "id"): string {
  const parsed = identifierText.safeParse(params[name]);
  if (!parsed.success) throw notFound(what);
  return parsed.data;
}
