import { timeWords } from "@/lib/planning/words";
import type { BeamPoint, NoticeFacts } from "./notice-facts";

/** "2031-04-06 03:12:45Z to 03:14:45Z (120 s)". */
export function spanInUtc(fromMs: number, toMs: number): string {
  const from = timeWords(fromMs);
  const to = timeWords(toMs);
  const end = from.slice(0, 10) === to.slice(0, 10) ? to.slice(11) : to;
  return `${from} to ${end} (${Math.round((toMs - fromMs) / 1000)} s)`;
}

/** "2031-04-06 05:12:45 to 05:14:45, Europe/Zurich"; null for a zone that the platform does not know. */
export function spanInZone(fromMs: number, toMs: number, timeZone: string): string | null {
  const from = clockInZone(fromMs, timeZone);
  const to = clockInZone(toMs, timeZone);
  if (from === null || to === null) return null;
  const end = from.slice(0, 10) === to.slice(0, 10) ? to.slice(11) : to;
  return `${from} to ${end}, ${timeZone}`;
}

/** "2031-04-06 05:12:45" on the clocks of a zone. */
export function clockInZone(atMs: number, timeZone: string): string | null {
  try {
    const format = new Intl.DateTimeFormat("en-CA", {
      timeZone,
      hourCycle: "h23",
      year: "numeric",
      month: "2-digit",
      day: "2-digit",
      hour: "2-digit",
      minute: "2-digit",
      second: "2-digit",
    });
    const parts = new Map(format.formatToParts(new Date(atMs)).map(({ type, value }) => [type, value]));
    const part = (name: Intl.DateTimeFormatPartTypes) => parts.get(name) ?? "";
    const date = `${part("year")}-${part("month")}-${part("day")}`;
    return `${date} ${part("hour")}:${part("minute")}:${part("second")}`;
  } catch (error) {
    if (error instanceof RangeError) return null;
    throw error;
  }
}

/** "azimuth 201.3°, elevation 35.2°, slant range 1,203 km". */
export function pointWords(point: BeamPoint): string {
  const azimuth = `azimuth ${point.azimuthDeg.toFixed(1)}°`;
  return `${azimuth}, elevation ${point.elevationDeg.toFixed(1)}°, slant range ${grouped(point.rangeKm)} km`;
}

/** "46.5000° N, 8.2000° E, 1,400 m". */
export function placeWords(station: NoticeFacts["station"]): string {
  const latitude = `${Math.abs(station.latitudeDeg).toFixed(4)}° ${station.latitudeDeg < 0 ? "S" : "N"}`;
  const longitude = `${Math.abs(station.longitudeDeg).toFixed(4)}° ${station.longitudeDeg < 0 ? "W" : "E"}`;
  return `${latitude}, ${longitude}, ${grouped(station.altitudeM)} m`;
}

/** Wavelength, energy, width, rate, mean power and aperture, with units. */
export function laserWords(laser: NoticeFacts["laser"]): string {
  const meanKw = (laser.pulseEnergyJ * laser.repetitionRateHz) / 1000;
  return [
    `pulsed, ${plain(laser.wavelengthNm)} nm`,
    `${grouped(laser.pulseEnergyJ)} J a pulse of ${plain(laser.pulseWidthNs)} ns`,
    `${plain(laser.repetitionRateHz)} Hz (${plain(meanKw)} kW on average)`,
    `aperture ${plain(laser.apertureM)} m`,
  ].join(", ");
}

/** A whole number in groups of three: "1,203". */
export function grouped(value: number): string {
  return Math.round(value).toLocaleString("en-GB");
}

/** Four significant digits at most, without trailing zeros. */
function plain(value: number): string {
  return String(Number(value.toPrecision(4)));
}

/** One line of text: line breaks and other control characters become spaces. */
export function oneLine(text: string): string {
  return text.replace(/[\p{Cc}\u2028\u2029]+/gu, " ").trim();
}
