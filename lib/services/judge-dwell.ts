import type { Queryable } from "@/db/client";
import { passRowsById } from "@/db/queries/passes";
import { notFound, type Reason } from "@/lib/engagement/refusal";
import { type Closure, cutClosures, withVerdict } from "@/lib/planning/closure";
import { closuresOf } from "@/lib/planning/closures/list";
import { concernedBy } from "@/lib/planning/concerned";
import { brokenLimits } from "@/lib/planning/dwell-limits";
import { type Effect, effectOfDwell } from "@/lib/planning/effect";
import type { Interval } from "@/lib/planning/interval";
import { openingsOf } from "@/lib/planning/openings";
import type { PassFacts } from "@/lib/planning/pass-facts";
import type { PassGeometry } from "@/lib/planning/pass-geometry";
import { limitsOf } from "./domain-rows";
import { type FactBook, loadFactBook } from "./fact-book";
import { factsOf, sceneOf } from "./pass-facts";
import { type Figures, figuresOf, measureRow, orbitOrNull } from "./pass-work";
import { elementsByRow } from "./replan-passes";

/** An authority that must be asked about a dwell, with what its notice needs. */
export interface ConcernedAuthority {
  readonly authorityId: string;
  readonly name: string;
  readonly kind: string;
  readonly email: string;
  readonly because: string;
  readonly leadTimeMin: number;
  readonly changeDeadlineMin: number;
  readonly timeZone: string;
}

/** What the rules say about one dwell now. */
export interface Judgement {
  readonly passId: string;
  readonly stationId: string;
  readonly fragmentId: string;
  readonly elementSetId: string;
  readonly laserSettingId: string;
  /** Cut to the dwell. */
  readonly closures: Closure[];
  readonly closed: Closure[];
  readonly pending: Closure[];
  /**
   * Blocks confirmation. Only an entry that is `overridable` can be attested by a person; one that isn't
   * (no screening, no crewed list) must be lifted by data, whatever else of its rule is attested.
   */
  readonly notChecked: Closure[];
  /** Station limits that the dwell breaks. */
  readonly limits: Reason[];
  readonly effect: Effect | null;
  readonly effectRefusal: string | null;
  readonly concerned: ConcernedAuthority[];
}

/**
 * Judges a dwell in a pass by every rule, measured afresh from the pass's element set. With an engagement
 * its own hold doesn't stand in its way, and its requests and answers count. Throws notFound("pass").
 */
export async function judgeDwell(
  q: Queryable,
  args: {
    readonly passId: string;
    readonly fromMs: number;
    readonly toMs: number;
    readonly nowMs: number;
    readonly engagementId: string | null;
  },
): Promise<Judgement> {
  const [row] = await passRowsById(q, [args.passId]);
  if (!row) throw notFound("pass");
  const book = await loadFactBook(q, [row], args.engagementId);
  const orbit = orbitOrNull((await elementsByRow(q, [row])).get(row.elementSetId));
  const scene = sceneOf(book, row);
  const dwell = { fromMs: args.fromMs, toMs: args.toMs };
  const facts = factsOf(book, row, { nowMs: args.nowMs, dwell, ownEngagementId: args.engagementId });
  const geometry = measureRow(row, scene, orbit);
  const whole = closuresOf(geometry, facts);
  const figured = figuresOf(row, scene);
  const figures = figured.ok ? figured.figures : null;
  const worked = workedEffect(figured, orbit && { orbit, frame: scene.map.frame }, dwell);
  return {
    passId: row.id,
    stationId: row.stationId,
    fragmentId: row.fragmentId,
    elementSetId: row.elementSetId,
    laserSettingId: figures?.laserSettingId ?? row.laserSettingId,
    ...byVerdict(cutClosures(whole, dwell)),
    limits: brokenLimits({
      dwell,
      riseMs: geometry.riseMs,
      openings: openingsOf(geometry, whole),
      limits: figures?.limits ?? limitsOf(scene.station),
      laser: figures?.laser ?? null,
      meltOnsetS: worked.ok ? worked.effect.meltOnsetS : null,
    }),
    effect: worked.ok ? worked.effect : null,
    effectRefusal: worked.ok ? null : worked.reason,
    concerned: concernedAuthorities(book, geometry, facts, dwell),
  };
}

function byVerdict(closures: Closure[]): Pick<Judgement, "closures" | "closed" | "pending" | "notChecked"> {
  return {
    closures,
    closed: withVerdict(closures, "closed"),
    pending: withVerdict(closures, "pending"),
    notChecked: withVerdict(closures, "not checked"),
  };
}

function workedEffect(
  figured: { ok: true; figures: Figures } | { ok: false; reason: string },
  seen: Pick<Parameters<typeof effectOfDwell>[0], "orbit" | "frame"> | null,
  dwell: Interval,
): { ok: true; effect: Effect } | { ok: false; reason: string } {
  if (!figured.ok) return figured;
  if (!seen) return { ok: false, reason: "The element set gives no orbit." };
  const { laser, body } = figured.figures;
  return effectOfDwell({ ...seen, laser, body, ...dwell });
}

/** Who would be asked about lasing in a span (null: anywhere in the pass), with addresses. */
export function concernedAuthorities(
  book: FactBook,
  geometry: PassGeometry,
  facts: PassFacts,
  dwell: Interval | null,
): ConcernedAuthority[] {
  const rows = new Map(book.authorities.map((authority) => [authority.id, authority]));
  return concernedBy(geometry, facts, dwell).flatMap(({ authority, because }) => {
    const row = rows.get(authority.id);
    if (!row) return [];
    const { id, name, kind, email, leadTimeMin, changeDeadlineMin, timeZone } = row;
    return [{ authorityId: id, name, kind, email, because, leadTimeMin, changeDeadlineMin, timeZone }];
  });
}
