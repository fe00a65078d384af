import { numberText } from "@/app/_format/figures";

/** A collision probability as "3.2 in a million"; under one in a thousand million only that. */
export function probabilityText(probability: number | null): string {
  if (probability === null || !Number.isFinite(probability)) return "no value";
  if (probability < 1e-9) return "under 1 in 1000 million";
  if (probability < 1e-6) return `${numberText(probability * 1e9, 1)} in 1000 million`;
  if (probability < 1e-3) return `${numberText(probability * 1e6, 1)} in a million`;
  return `${numberText(probability * 1e3, 1)} in a thousand`;
}
