import type { elementSets, fragments } from "@/db/schema/objects";
import type { laserSettings, stations } from "@/db/schema/stations";
import { materialNamed } from "@/lib/physics/ablation/materials";
import { shapeNamed } from "@/lib/physics/ablation/shape";
import type { Elements, Site } from "@/lib/physics/orbit/elements";
import type { DwellLimits } from "@/lib/planning/choose-dwell";
import type { FragmentBody, PulsedLaser } from "@/lib/planning/laser";

type StationRow = typeof stations.$inferSelect;
type LaserRow = typeof laserSettings.$inferSelect;
type FragmentRow = typeof fragments.$inferSelect;
type ElementSetRow = typeof elementSets.$inferSelect;

/** The SGP4 mean elements of a stored set, with the exact epoch. */
export function elementsOf(
  row: Pick<
    ElementSetRow,
    | "catalogNumber"
    | "objectName"
    | "objectId"
    | "epochMs"
    | "meanMotionRevPerDay"
    | "eccentricity"
    | "inclinationDeg"
    | "raanDeg"
    | "argPericenterDeg"
    | "meanAnomalyDeg"
    | "bstar"
    | "meanMotionDot"
    | "meanMotionDdot"
  >,
): Elements {
  return {
    catalogNumber: row.catalogNumber,
    objectName: row.objectName,
    objectId: row.objectId,
    epochMs: row.epochMs,
    meanMotionRevPerDay: row.meanMotionRevPerDay,
    eccentricity: row.eccentricity,
    inclinationDeg: row.inclinationDeg,
    raanDeg: row.raanDeg,
    argPericenterDeg: row.argPericenterDeg,
    meanAnomalyDeg: row.meanAnomalyDeg,
    bstar: row.bstar,
    meanMotionDot: row.meanMotionDot,
    meanMotionDdot: row.meanMotionDdot,
  };
}

/** Where a station stands. */
export function siteOf(row: Pick<StationRow, "latitudeDeg" | "longitudeDeg" | "altitudeM">): Site {
  return { latitudeDeg: row.latitudeDeg, longitudeDeg: row.longitudeDeg, altitudeM: row.altitudeM };
}

/** A station's laser setting for the pulsed model, or the sentence that says why the model can't take it. */
export function laserOf(row: LaserRow): { ok: true; laser: PulsedLaser } | { ok: false; reason: string } {
  if (row.mode !== "pulsed") return { ok: false, reason: `A laser in the mode ${row.mode} is not modelled.` };
  const spotConvention = conventionOf(row.spotConvention);
  if (spotConvention === null) {
    return { ok: false, reason: `The spot convention ${row.spotConvention} is neither a name nor a number.` };
  }
  const laser: PulsedLaser = {
    mode: "pulsed",
    wavelengthNm: row.wavelengthNm,
    pulseEnergyJ: row.pulseEnergyJ,
    pulseWidthNs: row.pulseWidthNs,
    repetitionRateHz: row.repetitionRateHz,
    apertureM: row.apertureM,
    beamQuality: row.beamQuality,
    zenithTransmission: row.zenithTransmission,
    strehl: row.strehl,
    jitterUrad: row.jitterUrad,
    spotConvention,
  };
  return { ok: true, laser };
}

/** "gaussian", "airy" or a factor above zero; null when the text is none of them. */
function conventionOf(text: string): PulsedLaser["spotConvention"] | null {
  if (text === "gaussian" || text === "airy") return text;
  const factor = Number(text);
  return text.trim() !== "" && Number.isFinite(factor) && factor > 0 ? factor : null;
}

/** What the ablation model needs of a fragment, or the sentence that names the figure it doesn't know. */
export function bodyOf(
  row: Pick<FragmentRow, "massKg" | "areaM2" | "material" | "couplingNPerW" | "shape" | "spinRateHz">,
): { ok: true; body: FragmentBody } | { ok: false; reason: string } {
  const material = materialNamed(row.material);
  if (material === null) return { ok: false, reason: `There are no ablation data for ${row.material}.` };
  const shape = shapeNamed(row.shape);
  if (shape === null) return { ok: false, reason: `The shape ${row.shape} is not modelled.` };
  const { massKg, areaM2, couplingNPerW, spinRateHz } = row;
  return { ok: true, body: { massKg, areaM2, material, couplingNPerW, shape, spinRateHz } };
}

/** The limits of a dwell that are settings of the station; melting is judged with the effect. */
export function limitsOf(
  row: Pick<StationRow, "acquisitionS" | "guardS" | "minDwellS" | "maxDwellS" | "maxPulses" | "maxEnergyJ">,
): DwellLimits {
  return {
    acquisitionS: row.acquisitionS,
    guardS: row.guardS,
    minDwellS: row.minDwellS,
    maxDwellS: row.maxDwellS,
    maxPulses: row.maxPulses,
    maxEnergyJ: row.maxEnergyJ,
    maxHeatingS: null,
  };
}
