import type { DwellBody, PassBody } from "@/lib/contracts/passes";
import type { PlannedDwell } from "@/lib/planning/stored-plan";
import { closureBody, isoOf, openingBody } from "./closure-body";
import type { OfferedPass } from "./plan-offers";

/** A pass as lists carry it. */
export function passBody(offered: OfferedPass): PassBody {
  const { reading, offer, plan } = offered;
  const { row, engagement } = reading;
  return {
    id: row.id,
    stationId: row.stationId,
    stationName: reading.scene.station.name,
    fragmentId: row.fragmentId,
    fragmentName: row.fragmentName,
    catalogNumber: row.catalogNumber,
    riseAt: row.riseAt.toISOString(),
    culminateAt: row.culminateAt.toISOString(),
    setAt: row.setAt.toISOString(),
    maxElevationDeg: row.maxElevationDeg,
    minRangeKm: row.minRangeKm,
    openings: reading.openings.map(openingBody),
    dwell: offer.dwell ? dwellBody(offer.dwell) : null,
    engagementId: engagement?.id ?? null,
    engagementState: engagement?.state ?? null,
    booked: engagement
      ? { from: engagement.dwellFrom.toISOString(), to: engagement.dwellTo.toISOString() }
      : null,
    closures: reading.closures.map(closureBody),
    strip: plan?.strip ?? { elevationDeg: [], worthPerS: [] },
    elementSetAgeH: Math.abs(row.culminateAt.getTime() - row.epochMs) / 3_600_000,
    noDwellReason: offer.reason,
  };
}

function dwellBody(dwell: PlannedDwell): DwellBody {
  const { perigeeDropM, semiMajorAxisDropM, perigeeDropBandM, semiMajorAxisDropBandM } = dwell;
  return {
    from: isoOf(dwell.fromMs),
    to: isoOf(dwell.toMs),
    perigeeDropM,
    semiMajorAxisDropM,
    perigeeDropBandM,
    semiMajorAxisDropBandM,
  };
}
