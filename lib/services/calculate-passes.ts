import type { PassSearchBody, PassSearchInput } from "@/lib/contracts/calculations";
import { DEG } from "@/lib/physics/constants";
import { findPasses, type PassEvent } from "@/lib/physics/passes/find-passes";
import { readOrbits } from "./calculate-element-sets";
import { isoOf } from "./closure-body";

/** Passes of many objects over one station, by rise. */
export function calculatePasses(input: PassSearchInput): PassSearchBody {
  const { orbits, refused } = readOrbits(input.elementSets);
  const { latitudeDeg, longitudeDeg, altitudeM, minElevationDeg } = input.station;
  const station = {
    site: { latitudeDeg, longitudeDeg, altitudeM },
    minElevationRad: minElevationDeg * DEG,
  };
  const found: { catalogNumber: number; pass: PassEvent }[] = [];
  for (const { index, orbit } of orbits) {
    const { passes, failure } = findPasses(orbit, [station], Date.parse(input.from), Date.parse(input.to));
    for (const { pass } of passes) found.push({ catalogNumber: orbit.elements.catalogNumber, pass });
    // What was found before the failure stays; the sentence says that more may be missing.
    if (failure) refused.push({ index, reason: failure });
  }
  found.sort((a, b) => a.pass.riseMs - b.pass.riseMs);
  refused.sort((a, b) => a.index - b.index);
  return { passes: found.map(({ catalogNumber, pass }) => passBody(catalogNumber, pass)), refused };
}

function passBody(catalogNumber: number, pass: PassEvent): PassSearchBody["passes"][number] {
  return {
    catalogNumber,
    riseAt: isoOf(pass.riseMs),
    culminateAt: isoOf(pass.culminateMs),
    setAt: isoOf(pass.setMs),
    maxElevationDeg: pass.maxElevationRad / DEG,
    riseAzimuthDeg: pass.riseAzimuthRad / DEG,
    culminationAzimuthDeg: pass.culminationAzimuthRad / DEG,
    setAzimuthDeg: pass.setAzimuthRad / DEG,
    minRangeKm: pass.minRangeKm,
    underWayAtFrom: pass.underWayAtFrom,
    underWayAtTo: pass.underWayAtTo,
  };
}
