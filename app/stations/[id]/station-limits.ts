import type { Fact } from "@/app/_components/facts";
import { durationText, numberText, settingText, settingWithUnit } from "@/app/_format/figures";
import type { StationBody } from "@/lib/contracts/stations";

/** The limits of a station as label, value with unit, and what each does. */
export function stationLimits(station: StationBody): Fact[] {
  const seconds = (value: number) => durationText(value);
  const limits: Fact[] = [
    { label: "Lowest elevation", value: `${settingText(station.minElevationDeg)}°` },
    { label: "Highest elevation", value: `${settingText(station.maxElevationDeg)}°` },
    {
      label: "Fastest in azimuth",
      value:
        station.maxAzimuthRateDegPerS === null
          ? "no limit"
          : `${settingText(station.maxAzimuthRateDegPerS)}°/s`,
      note: "shuts the mount out near the zenith",
    },
    {
      label: "Horizon mask",
      value: station.horizonMask.length === 0 ? "none" : maskText(station.horizonMask),
      note: "from each azimuth on, clockwise",
    },
    {
      label: "Acquisition",
      value: seconds(station.acquisitionS),
      note: "from rise to a confirmed identity: no dwell before",
    },
    { label: "Guard", value: seconds(station.guardS), note: "kept free at both edges of every opening" },
    { label: "Slew", value: seconds(station.slewS), note: "held before a dwell" },
    { label: "Cool-down", value: seconds(station.coolDownS), note: "held after a dwell" },
    { label: "Shortest dwell", value: seconds(station.minDwellS) },
    { label: "Longest dwell", value: seconds(station.maxDwellS) },
    { label: "Most pulses", value: station.maxPulses === null ? "no limit" : numberText(station.maxPulses) },
    {
      label: "Most laser energy",
      value: station.maxEnergyJ === null ? "no limit" : settingWithUnit(station.maxEnergyJ, "J"),
    },
    {
      label: "Element sets are fresh for",
      value: `${settingText(station.elementAgeLimitH)} h`,
      note: "older at the dwell: pending; twice as old: not checked",
    },
  ];
  return limits.map((fact) => ({ ...fact, figure: true }));
}

/** "28° from 340°, 12° from 30°". */
function maskText(mask: StationBody["horizonMask"]): string {
  return mask
    .map((step) => `${settingText(step.elevationDeg)}° from ${settingText(step.azimuthDeg)}°`)
    .join(", ");
}
