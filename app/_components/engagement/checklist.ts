import { readUtc } from "./read-utc";

/** The operators' checklist as it is typed; nothing has a default, so that every value is somebody's. */
export interface TypedChecklist {
  readonly airUnitCalledAt: string;
  readonly spotterInPlace: boolean;
  readonly interlockTestedAt: string;
  readonly clockOffsetMs: string;
  readonly weather: string;
  readonly crewedListCheckedAt: string;
}

export const EMPTY_CHECKLIST: TypedChecklist = {
  airUnitCalledAt: "",
  spotterInPlace: false,
  interlockTestedAt: "",
  clockOffsetMs: "",
  weather: "",
  crewedListCheckedAt: "",
};

/** `-0,4` and `−0.4` are numbers too; null for what is none. */
function numberOf(words: string): number | null {
  const plain = words.trim().replace("\u2212", "-").replace(",", ".");
  return /^[+-]?\d+(\.\d+)?$/.test(plain) ? Number(plain) : null;
}

/** The checklist for the wire. What is missing is left out: the server names every missing value. */
export function checklistBody(typed: TypedChecklist): Record<string, unknown> {
  const values = {
    airUnitCalledAt: readUtc(typed.airUnitCalledAt),
    spotterInPlace: typed.spotterInPlace ? true : null,
    interlockTestedAt: readUtc(typed.interlockTestedAt),
    clockOffsetMs: numberOf(typed.clockOffsetMs),
    weather: typed.weather.trim() || null,
    crewedListCheckedAt: readUtc(typed.crewedListCheckedAt),
  };
  return Object.fromEntries(Object.entries(values).filter(([, value]) => value !== null));
}
