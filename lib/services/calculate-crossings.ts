import type { BeamScreenBody, BeamScreenInput } from "@/lib/contracts/calculations";
import { DEG } from "@/lib/physics/constants";
import { makeSiteFrame } from "@/lib/physics/frames/earth";
import { screenBeamMany } from "@/lib/physics/screening/beam-cone";
import { readOrbit, readOrbits } from "./calculate-element-sets";
import type { Outcome } from "./calculate-outcome";
import { isoOf } from "./closure-body";

/** When each object stands within an angle of the line from a station through a target; geometry alone. */
export function calculateCrossings(input: BeamScreenInput): Outcome<BeamScreenBody> {
  const target = readOrbit(input.target);
  if (!target.ok) return { ok: false, path: "target", reason: target.reason };
  const [fromMs, toMs] = [Date.parse(input.from), Date.parse(input.to)];
  const failing = [fromMs, toMs].map((atMs) => target.orbit.stateAt(atMs)).find((state) => !state.ok);
  if (failing && !failing.ok) return { ok: false, path: "target", reason: failing.reason };
  const { latitudeDeg, longitudeDeg, altitudeM } = input.station;
  const { orbits, refused } = readOrbits(input.protected);
  const halfAngleRad = input.halfAngleDeg * DEG;
  const screenings = screenBeamMany({
    frame: makeSiteFrame({ latitudeDeg, longitudeDeg, altitudeM }),
    target: target.orbit,
    others: orbits.map(({ orbit }) => ({ orbit, halfAngleRad: () => halfAngleRad })),
    fromMs,
    toMs,
  });
  const found = orbits.flatMap(({ index, orbit }, i) => {
    const screening = screenings[i];
    if (screening?.ok) return screening.crossings.map((crossing) => ({ crossing, orbit }));
    refused.push({ index, reason: screening?.reason ?? "It was not screened." });
    return [];
  });
  found.sort((a, b) => a.crossing.fromMs - b.crossing.fromMs);
  refused.sort((a, b) => a.index - b.index);
  const closures = found.map(({ crossing, orbit }) => ({
    catalogNumber: orbit.elements.catalogNumber,
    from: isoOf(crossing.fromMs),
    to: isoOf(crossing.toMs),
    minSeparationDeg: crossing.minSeparationRad / DEG,
  }));
  return { ok: true, body: { closures, refused } };
}
