const MINUS = "\u2212";
const THIN = "\u202f"; // narrow no-break space between thousands and before units

/** A number with a true minus, thin spaces between thousands and a fixed count of decimals. */
export function numberText(value: number, decimals = 0): string {
  if (!Number.isFinite(value)) return "no value";
  const [whole = "", part] = Math.abs(value).toFixed(decimals).split(".");
  const grouped = whole.replace(/\B(?=(\d{3})+(?!\d))/g, THIN);
  const digits = part === undefined ? grouped : `${grouped}.${part}`;
  return value < 0 && Number(digits.replaceAll(THIN, "")) !== 0 ? MINUS + digits : digits;
}

/** A number to so many significant digits, without exponents: for figures of unknown size. */
export function significantText(value: number, digits = 3): string {
  if (!Number.isFinite(value)) return "no value";
  if (value === 0) return "0";
  const decimals = Math.max(0, digits - 1 - Math.floor(Math.log10(Math.abs(value))));
  return numberText(value, Math.min(decimals, 12));
}

/** A setting as it was entered: up to so many decimals, without zeros behind. */
export function settingText(value: number, mostDecimals = 4): string {
  const text = numberText(value, mostDecimals);
  return text.includes(".") ? text.replace(/\.?0+$/, "") : text;
}

/** `9 min 18 s`, `1 h 04 min`, `42 s`. Whole seconds. */
export function durationText(seconds: number): string {
  if (!Number.isFinite(seconds)) return "no value";
  const s = Math.round(Math.abs(seconds));
  const sign = seconds < 0 && s > 0 ? MINUS : "";
  if (s < 60) return `${sign}${s} s`;
  if (s < 3600) return `${sign}${Math.floor(s / 60)} min ${pad(s % 60)} s`;
  if (s < 172_800) return `${sign}${Math.floor(s / 3600)} h ${pad(Math.floor((s % 3600) / 60))} min`;
  return `${sign}${Math.floor(s / 86_400)} d ${Math.floor((s % 86_400) / 3600)} h`;
}

const PREFIXES = [
  { factor: 1e9, sign: "G" },
  { factor: 1e6, sign: "M" },
  { factor: 1e3, sign: "k" },
  { factor: 1, sign: "" },
  { factor: 1e-3, sign: "m" },
  { factor: 1e-6, sign: "µ" },
] as const;

/** A figure with its SI prefix: 4100000 J reads as value "4.10", unit "MJ". */
export function scaled(value: number, unit: string, digits = 3): { value: string; unit: string } {
  const prefix = prefixFor(value);
  return { value: significantText(value / prefix.factor, digits), unit: prefix.sign + unit };
}

/** A setting with its unit and SI prefix, as it was entered: `7 kJ`. */
export function settingWithUnit(value: number, unit: string): string {
  const prefix = prefixFor(value);
  return `${settingText(value / prefix.factor)}${THIN}${prefix.sign}${unit}`;
}

function prefixFor(value: number) {
  const size = Math.abs(value);
  return PREFIXES.find((p) => size >= p.factor) ?? (size === 0 ? PREFIXES[3] : PREFIXES[5]);
}

/** Degrees of latitude or longitude with a letter for the half: `12.345° N`. */
export function coordinateText(degrees: number, axis: "latitude" | "longitude", decimals = 3): string {
  const letter = axis === "latitude" ? (degrees < 0 ? "S" : "N") : degrees < 0 ? "W" : "E";
  return `${numberText(Math.abs(degrees), decimals)}°${THIN}${letter}`;
}

function pad(n: number): string {
  return String(n).padStart(2, "0");
}
