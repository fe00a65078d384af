import type { Closure } from "../closure";
import { answerOf, volumeHours } from "../concerned";
import { type Interval, subtract } from "../interval";
import type { PassFacts, VolumeFacts } from "../pass-facts";
import { timeWords } from "../words";
import { type Rule, wholePass } from "./rule";

/** Active volumes on the way of the beam: pending where the authority may lift it, else closed. */
export const airspace: Rule = (pass, facts) => {
  if (pass.airspaceKey !== facts.airspaceKey) {
    return [
      {
        ...wholePass(pass),
        rule: "airspace",
        verdict: "not checked",
        cause: "The airspace volumes changed and the beam has not been measured against them.",
        label: "airspace not measured",
        input: "airspace volumes",
        liftedBy: "the next sweep of the fragment",
        overridable: false,
      },
    ];
  }
  const closures: Closure[] = [];
  for (const { volumeId, spans } of pass.volumes) {
    const volume = facts.volumes.find((known) => known.id === volumeId);
    if (!volume) continue;
    const { active, unknown } = volumeHours(volume, spans);
    const verdict = activeVerdict(volume, facts);
    const lifted = liftedSpans(volume, facts);
    const left = active.flatMap((span) => subtract(span, lifted));
    closures.push(...left.map((span) => ({ ...span, ...verdict })));
    const untold = unknown.flatMap((span) => subtract(span, lifted));
    closures.push(...untold.map((span) => unknownHours(volume, span)));
  }
  return closures;
};

type Finding = Omit<Closure, "fromMs" | "toMs">;

function common(volume: VolumeFacts): Pick<Closure, "rule" | "label" | "input" | "overridable"> {
  const input = `airspace volume ${volume.name}, version ${volume.version}`;
  return { rule: "airspace", label: volume.name, input, overridable: false };
}

/** The dwell that the volume's authority has said no objection to. */
function liftedSpans(volume: VolumeFacts, { own }: PassFacts): Interval[] {
  if (!volume.liftable || volume.authorityId === null || !own) return [];
  const answer = answerOf(own, volume.authorityId);
  return answer && answer.outcome !== "objection" ? [own.dwell] : [];
}

/** What an active volume means as long as nobody has lifted it. */
function activeVerdict(volume: VolumeFacts, facts: PassFacts): Finding {
  const where = `The beam runs through ${volume.name} (${volume.floorText} to ${volume.ceilingText}) while it is active`;
  const authority = facts.authorities.find((known) => known.id === volume.authorityId);
  if (volume.liftable && authority) {
    return {
      ...common(volume),
      verdict: "pending",
      cause: `${where}; ${authority.name} may allow it.`,
      liftedBy: `no objection from ${authority.name}`,
    };
  }
  const end = volume.liftable ? "; no authority is named that could allow it." : ".";
  return {
    ...common(volume),
    verdict: "closed",
    cause: `${where}${end}`,
    liftedBy: "nothing while the volume is active",
  };
}

function unknownHours(volume: VolumeFacts, span: Interval): Closure {
  const known =
    volume.activeSpans.length === 0
      ? "nobody has told when it is active"
      : `its hours are known up to ${timeWords(volume.scheduleKnownUntilMs)} only`;
  return {
    ...span,
    ...common(volume),
    verdict: "not checked",
    cause: `The beam runs through ${volume.name} (${volume.floorText} to ${volume.ceilingText}), and ${known}.`,
    liftedBy: `the hours of ${volume.name}`,
    overridable: true,
  };
}
