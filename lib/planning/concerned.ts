import { type Interval, intersect, merge, overlaps, subtract } from "./interval";
import type { AnswerFacts, AuthorityFacts, OwnFacts, PassFacts, VolumeFacts } from "./pass-facts";
import type { PassGeometry } from "./pass-geometry";

/** An authority that must be asked, where, and why. */
export interface Concerned {
  readonly authority: AuthorityFacts;
  /** End of the sentence "is concerned, because …". */
  readonly because: string;
  /** The seconds that concern it. */
  readonly spans: readonly Interval[];
  /** True for the authorities of every engagement of the station. */
  readonly always: boolean;
}

/** The parts of the beam's way through a volume in which it is active, and in which nobody knows. */
export function volumeHours(
  volume: VolumeFacts,
  spans: readonly Interval[],
): { active: Interval[]; unknown: Interval[] } {
  const active: Interval[] = [];
  const unknown: Interval[] = [];
  const knownUntilMs =
    volume.activeSpans.length === 0 ? Number.NEGATIVE_INFINITY : volume.scheduleKnownUntilMs;
  for (const span of spans) {
    const inside = merge(volume.activeSpans.flatMap((hours) => intersect(span, hours) ?? []));
    active.push(...inside);
    const later = intersect(span, { fromMs: knownUntilMs, toMs: Number.POSITIVE_INFINITY });
    if (later) unknown.push(...subtract(later, inside));
  }
  return { active, unknown };
}

/**
 * Who is concerned by lasing in the pass: the authorities of every engagement of the station, and those
 * of volumes that the beam runs through while they are active or may be. With a dwell, only what it
 * touches counts. Each authority comes once.
 */
export function concernedBy(pass: PassGeometry, facts: PassFacts, dwell: Interval | null): Concerned[] {
  const whole = { fromMs: pass.riseMs, toMs: pass.setMs };
  const found: Concerned[] = [];
  for (const authority of facts.authorities) {
    if (facts.stationAuthorityIds.includes(authority.id)) {
      const because = `it is asked about every engagement at ${facts.station.name}`;
      found.push({ authority, because, spans: [dwell ?? whole], always: true });
      continue;
    }
    const crossed = volumesOf(authority.id, pass, facts, dwell ?? whole);
    if (crossed.length === 0) continue;
    const because = `the beam runs through ${crossed.map(({ volume }) => volume.name).join(" and ")}`;
    found.push({ authority, because, spans: crossed.flatMap(({ spans }) => spans), always: false });
  }
  return found;
}

/** The volumes of one authority on the beam's way within a span, with the stretches that concern it. */
function volumesOf(authorityId: string, pass: PassGeometry, facts: PassFacts, within: Interval) {
  return pass.volumes.flatMap(({ volumeId, spans }) => {
    const volume = facts.volumes.find((known) => known.id === volumeId);
    if (volume?.authorityId !== authorityId) return [];
    const { active, unknown } = volumeHours(volume, spans);
    // Where an active volume can't be lifted there is nothing to ask.
    const asked = [...(volume.liftable ? active : []), ...unknown].filter((span) => overlaps(span, within));
    return asked.length > 0 ? [{ volume, spans: asked }] : [];
  });
}

/** The answer in force that the engagement has from an authority, or null. */
export function answerOf(own: OwnFacts | null, authorityId: string): AnswerFacts | null {
  return own?.answers.find((answer) => answer.authorityId === authorityId) ?? null;
}
