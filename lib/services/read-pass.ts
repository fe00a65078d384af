import type { PassRow } from "@/db/queries/passes";
import { type Closure, withVerdict } from "@/lib/planning/closure";
import { closuresOf } from "@/lib/planning/closures/list";
import { fitsOpenings } from "@/lib/planning/dwell-limits";
import { type Opening, openingsOf } from "@/lib/planning/openings";
import type { PassFacts } from "@/lib/planning/pass-facts";
import type { PassGeometry } from "@/lib/planning/pass-geometry";
import type { PlannedDwell, StoredPlan } from "@/lib/planning/stored-plan";
import { limitsOf } from "./domain-rows";
import type { FactBook, PassEngagement } from "./fact-book";
import { factsOf, sceneOf } from "./pass-facts";
import { type Figures, figuresOf, planIsCurrent } from "./pass-work";
import type { StationScene } from "./station-scene";

/** An offer must still be bookable this long after it was read, ms: lead times are measured from then. */
export const OFFER_LASTS_MS = 5 * 60_000;

/** A pass read through the rules. */
export interface PassReading {
  readonly row: PassRow;
  readonly scene: StationScene;
  readonly geometry: PassGeometry;
  readonly facts: PassFacts;
  readonly closures: readonly Closure[];
  readonly openings: readonly Opening[];
  /** The closures that will hold when the offer is taken up. */
  readonly offerClosures: readonly Closure[];
  /** The live engagement of the pass, else the last fired one. */
  readonly engagement: PassEngagement | null;
  readonly figured: { ok: true; figures: Figures } | { ok: false; reason: string };
}

/** What a pass offers for booking: a dwell, or the reason in words why there is none. */
export type Offer =
  | { readonly dwell: PlannedDwell; readonly reason: null }
  | { readonly dwell: null; readonly reason: string };

/**
 * Reads a pass through every rule. A pass that a live engagement holds is read on behalf of that
 * engagement: its own hold is no closure, its answers count.
 */
export function readPass(book: FactBook, row: PassRow, geometry: PassGeometry, nowMs: number): PassReading {
  const engagement = book.passEngagements.get(row.id) ?? null;
  const question = { nowMs, dwell: null, ownEngagementId: engagement?.live ? engagement.id : null };
  const facts = factsOf(book, row, question);
  const closures = closuresOf(geometry, facts);
  const scene = sceneOf(book, row);
  return {
    row,
    scene,
    geometry,
    facts,
    closures,
    openings: openingsOf(geometry, closures),
    offerClosures: closuresWhenTaken(geometry, facts, closures),
    engagement,
    figured: figuresOf(row, scene),
  };
}

/** Only passes that begin within the longest lead time look different some minutes later. */
function closuresWhenTaken(
  geometry: PassGeometry,
  facts: PassFacts,
  closures: readonly Closure[],
): readonly Closure[] {
  const longestLeadMin = facts.authorities.reduce((most, next) => Math.max(most, next.leadTimeMin), 0);
  const takenMs = facts.nowMs + OFFER_LASTS_MS;
  if (geometry.riseMs > takenMs + longestLeadMin * 60_000) return closures;
  return closuresOf(geometry, { ...facts, nowMs: takenMs });
}

/** The offer without any working out, or null when the pass must be planned anew for one. */
export function knownOffer(reading: PassReading): Offer | null {
  const { row, engagement, figured } = reading;
  if (engagement?.live) {
    return { dwell: null, reason: `E-${engagement.number} (${engagement.state}) holds this pass.` };
  }
  if (!figured.ok) return { dwell: null, reason: figured.reason };
  const { limits } = figured.figures;
  const openings = openingsOf(reading.geometry, reading.offerClosures);
  const roomMs = 1000 * (limits.minDwellS + 2 * limits.guardS);
  const longEnough = openings.some(
    (opening) =>
      opening.toMs - opening.fromMs >= roomMs &&
      opening.toMs >= reading.geometry.riseMs + 1000 * (limits.acquisitionS + limits.minDwellS),
  );
  if (!longEnough) return { dwell: null, reason: noRoom(reading) };
  if (!row.plan || !planIsCurrent(row, figured.figures)) return null;
  return planOffer(reading, row.plan);
}

/** The offer that a plan makes under today's closures, or null when its dwell no longer fits. */
export function planOffer(reading: PassReading, plan: StoredPlan): Offer | null {
  const { dwell, refusal } = plan;
  if (!dwell) return { dwell: null, reason: refusal ?? NOTHING_GAINED };
  const fits = fitsOpenings({
    dwell,
    riseMs: reading.geometry.riseMs,
    openings: openingsOf(reading.geometry, reading.offerClosures),
    limits: limitsOf(reading.scene.station),
  });
  return fits ? { dwell, reason: null } : null;
}

const NOTHING_GAINED = "No permissible stretch of this pass brings the orbit down.";

/** Why no opening is long enough: the one thing that closes the whole pass, or all that close parts. */
function noRoom(reading: PassReading): string {
  const { geometry } = reading;
  const closed = withVerdict(reading.offerClosures, "closed");
  const whole = closed.find(({ fromMs, toMs }) => fromMs <= geometry.riseMs && geometry.setMs <= toMs);
  if (whole) return whole.cause;
  const { minDwellS, guardS, acquisitionS } = reading.scene.station;
  const need = `The shortest dwell of ${minDwellS} s finds no room beside ${acquisitionS} s acquisition and ${guardS} s guard time.`;
  return [...new Set(closed.map((closure) => closure.cause)), need].join(" ");
}
