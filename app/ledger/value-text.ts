import { numberText } from "@/app/_format/figures";
import { utcText } from "@/app/_format/utc";

/** One changed value: what it is, and how it read before and after; null where there was nothing. */
export interface ChangeLine {
  readonly what: string;
  readonly before: string | null;
  readonly after: string | null;
}

type Values = Readonly<Record<string, unknown>> | null;

/** Old and new values side by side, nested ones by their path; what stayed the same is left out. */
export function changeLines(oldValues: Values, newValues: Values): ChangeLine[] {
  const before = flatten(oldValues);
  const after = flatten(newValues);
  const paths = [...new Set([...before.keys(), ...after.keys()])];
  return paths
    .map((path) => ({
      what: pathWords(path),
      before: before.get(path) ?? null,
      after: after.get(path) ?? null,
    }))
    .filter((line) => line.before !== line.after);
}

function flatten(values: Values): Map<string, string> {
  const lines = new Map<string, string>();
  const walk = (value: unknown, path: string): void => {
    if (typeof value === "object" && value !== null && !Array.isArray(value)) {
      for (const [key, inner] of Object.entries(value)) walk(inner, path === "" ? key : `${path}.${key}`);
    } else {
      lines.set(path, valueText(value));
    }
  };
  if (values) walk(values, "");
  return lines;
}

/** A single value as a person reads it. */
export function valueText(value: unknown): string {
  if (value === null || value === undefined) return "none";
  if (typeof value === "boolean") return value ? "yes" : "no";
  if (typeof value === "number")
    return Number.isInteger(value) ? numberText(value) : String(value).replace("-", "\u2212");
  if (typeof value === "string") {
    if (value === "") return "empty";
    if (/^\d{4}-\d\d-\d\dT\d\d:\d\d:\d\d(\.\d+)?Z$/.test(value)) return utcText(value);
    // Identifiers are for machines: the first eight characters tell two of them apart.
    return /^[0-9a-f]{8}(-[0-9a-f]{4}){3}-[0-9a-f]{12}$/.test(value) ? value.slice(0, 8) : value;
  }
  if (Array.isArray(value)) return value.length === 0 ? "none" : value.map(valueText).join(", ");
  return JSON.stringify(value);
}

/** `effect.deltaV.radialMPerS` reads `effect, delta v, radial m per s`. */
function pathWords(path: string): string {
  return path
    .split(".")
    .map((key) =>
      key
        .replace(/([a-z0-9])([A-Z])/g, "$1 $2")
        .toLowerCase()
        .replace(/ id$/, ""),
    )
    .join(", ");
}
