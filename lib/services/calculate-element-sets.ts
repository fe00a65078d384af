import type { ElementSetInput, RefusedItem } from "@/lib/contracts/calculations";
import { parseElementSets } from "@/lib/formats/element-sets";
import { makeOrbit, type Orbit } from "@/lib/physics/orbit/propagate";

/** An orbit of a calculation, with its place in the list that was sent. */
export interface IndexedOrbit {
  readonly index: number;
  readonly orbit: Orbit;
}

/** The orbit of one element set as sent, or the sentence that says why there is none. */
export function readOrbit(item: ElementSetInput): { ok: true; orbit: Orbit } | { ok: false; reason: string } {
  const text = textOf(item);
  if (text === null) {
    return { ok: false, reason: "It has neither the texts line1 and line2 nor the keywords of an OMM." };
  }
  const { accepted, rejected } = parseElementSets(text);
  const first = rejected[0];
  if (first) return { ok: false, reason: first.message };
  const [only, ...more] = accepted;
  if (!only || more.length > 0) return { ok: false, reason: "It is not exactly one element set." };
  return makeOrbit(only.elements);
}

/** The orbits of a list; each bad item is refused by its index while the rest goes on. */
export function readOrbits(items: readonly ElementSetInput[]): {
  orbits: IndexedOrbit[];
  refused: RefusedItem[];
} {
  const orbits: IndexedOrbit[] = [];
  const refused: RefusedItem[] = [];
  for (const [index, item] of items.entries()) {
    const read = readOrbit(item);
    if (read.ok) orbits.push({ index, orbit: read.orbit });
    else refused.push({ index, reason: read.reason });
  }
  return { orbits, refused };
}

/** The set as text for the reader of files; null when it is neither form. */
function textOf(item: ElementSetInput): string | null {
  const { line1, line2 } = item;
  if (typeof line1 === "string" && typeof line2 === "string") {
    // A line break inside a line would smuggle in another set.
    return /[\r\n]/.test(line1 + line2) ? null : `${line1}\n${line2}`;
  }
  return "MEAN_MOTION" in item || "EPOCH" in item ? JSON.stringify(item) : null;
}
