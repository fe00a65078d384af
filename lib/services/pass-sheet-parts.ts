import type { PassRow } from "@/db/queries/passes";
import type { EstimateBody, PassSheetBody } from "@/lib/contracts/passes";
import type { Effect } from "@/lib/planning/effect";
import type { Interval } from "@/lib/planning/interval";
import { alongTrackErrorKm } from "@/lib/planning/keep-out";
import { trimmed } from "@/lib/planning/words";
import { isoOf } from "./closure-body";
import type { FactBook } from "./fact-book";
import type { ConcernedAuthority } from "./judge-dwell";
import type { StationScene } from "./station-scene";

/** The station with the limits that shape its dwells. */
export function stationBody(scene: StationScene): PassSheetBody["station"] {
  const { station } = scene;
  return {
    id: station.id,
    name: station.name,
    timeZone: station.timeZone,
    latitudeDeg: station.latitudeDeg,
    longitudeDeg: station.longitudeDeg,
    altitudeM: station.altitudeM,
    minElevationDeg: station.minElevationDeg,
    maxElevationDeg: station.maxElevationDeg,
    horizonMask: station.horizonMask,
    maxAzimuthRateDegPerS: station.maxAzimuthRateDegPerS,
    acquisitionS: station.acquisitionS,
    guardS: station.guardS,
    minDwellS: station.minDwellS,
    maxDwellS: station.maxDwellS,
  };
}

/** The laser in one line; a station without an active setting says so. */
export function laserBody(scene: StationScene): PassSheetBody["laser"] {
  const { laser } = scene;
  if (!laser) return { id: "", name: "no active laser setting", summary: "", version: 0 };
  return { id: laser.id, name: laser.name, summary: laserSummary(laser), version: laser.version };
}

/** "1064 nm, 7000 J, 5 ns, 10 Hz, 12 m aperture, M² 1.6". */
export function laserSummary(laser: NonNullable<StationScene["laser"]>): string {
  return [
    `${trimmed(laser.wavelengthNm, 1)} nm`,
    `${trimmed(laser.pulseEnergyJ, 1)} J`,
    `${trimmed(laser.pulseWidthNs, 2)} ns`,
    `${trimmed(laser.repetitionRateHz, 2)} Hz`,
    `${trimmed(laser.apertureM, 2)} m aperture`,
    `M² ${trimmed(laser.beamQuality, 2)}`,
  ].join(", ");
}

/** The element set with its along-track error at culmination. */
export function elementSetBody(row: PassRow): PassSheetBody["elementSet"] {
  return {
    id: row.elementSetId,
    epochAt: isoOf(Math.round(row.epochMs)),
    source: row.elementSource,
    alongTrackKm: alongTrackErrorKm(row.epochMs, row.culminateAt.getTime()),
  };
}

/** Protected objects near the beam, the timing guard already in their times. */
export function crossingBodies(book: FactBook, row: PassRow): PassSheetBody["crossings"] {
  return (book.crossings.get(row.id) ?? []).map((crossing) => ({
    name: crossing.objectName,
    class: crossing.objectClass,
    from: crossing.fromAt.toISOString(),
    to: crossing.toAt.toISOString(),
    minSeparationDeg: crossing.minSeparationDeg,
    halfAngleDeg: crossing.halfAngleDeg,
    addedDeg: crossing.addedDeg,
    timingGuardS: crossing.timingGuardS,
  }));
}

/** What a dwell does, as it goes over the wire. */
export function estimateBody(dwell: Interval, effect: Effect): EstimateBody {
  const { meltOnsetS: _meltOnsetS, ...figures } = effect;
  return { from: isoOf(dwell.fromMs), to: isoOf(dwell.toMs), ...figures };
}

/** Who would be asked, without the addresses that only notices need. */
export function concernedBodies(concerned: readonly ConcernedAuthority[]): PassSheetBody["concerned"] {
  return concerned.map(({ authorityId, name, kind, because, leadTimeMin }) => {
    return { authorityId, name, kind, because, leadTimeMin };
  });
}
