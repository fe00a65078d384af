import { numberText, significantText } from "@/app/_format/figures";
import { utcTimeOfDay } from "@/app/_format/utc";
import type { SampleBody } from "@/lib/contracts/passes";

interface SampleColumn {
  readonly head: string;
  readonly csv: string;
  readonly text: (s: SampleBody) => string;
  readonly value: (s: SampleBody) => string | number;
}

/** The columns of the sample table and of its CSV, with units. */
export function sampleColumns(aimUnit: string): readonly SampleColumn[] {
  return [
    { head: "Time", csv: "at", text: (s) => utcTimeOfDay(Date.parse(s.at)), value: (s) => s.at },
    {
      head: "Elevation, °",
      csv: "elevationDeg",
      text: (s) => numberText(s.elevationDeg, 1),
      value: (s) => s.elevationDeg,
    },
    {
      head: "Azimuth, °",
      csv: "azimuthDeg",
      text: (s) => numberText(s.azimuthDeg, 1),
      value: (s) => s.azimuthDeg,
    },
    { head: "Range, km", csv: "rangeKm", text: (s) => numberText(s.rangeKm, 1), value: (s) => s.rangeKm },
    {
      head: "Transmission",
      csv: "transmission",
      text: (s) => numberText(s.transmission, 3),
      value: (s) => s.transmission,
    },
    {
      head: "Spot, m",
      csv: "spotDiameterM",
      text: (s) => numberText(s.spotDiameterM, 3),
      value: (s) => s.spotDiameterM,
    },
    {
      head: "Fluence, kJ/m²",
      csv: "fluenceJPerM2",
      text: (s) => significantText(s.fluenceJPerM2 / 1000),
      value: (s) => s.fluenceJPerM2,
    },
    {
      head: "Coupling, µN/W",
      csv: "couplingNPerW",
      text: (s) => significantText(s.couplingNPerW * 1e6),
      value: (s) => s.couplingNPerW,
    },
    {
      head: "Δv, m/s per s",
      csv: "deltaVMPerS",
      text: (s) => significantText(s.deltaVMPerS),
      value: (s) => s.deltaVMPerS,
    },
    {
      head: `Worth, ${aimUnit}`,
      csv: "worthPerS",
      text: (s) => significantText(s.worthPerS),
      value: (s) => s.worthPerS,
    },
    { head: "Sunlight", csv: "sunlight", text: (s) => s.sunlight ?? "", value: (s) => s.sunlight ?? "" },
  ];
}
