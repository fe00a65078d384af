import { readUtc } from "./read-utc";

/** One interruption as it is typed; the key only tells rows apart. */
export interface TypedInterruption {
  readonly key: number;
  readonly at: string;
  readonly cause: string;
  readonly secondsLost: string;
}

export interface TypedFiring {
  readonly outcome: "fired" | "in part" | "not fired" | null;
  readonly openedAt: string;
  readonly closedAt: string;
  readonly pulses: string;
  readonly interruptions: readonly TypedInterruption[];
  readonly note: string;
}

export const EMPTY_FIRING: TypedFiring = {
  outcome: null,
  openedAt: "",
  closedAt: "",
  pulses: "",
  interruptions: [],
  note: "",
};

export const OUTCOME_WORDS = [
  { outcome: "fired", words: "the whole dwell, apart from interruptions" },
  { outcome: "in part", words: "stopped before the end, or begun late" },
  { outcome: "not fired", words: "the shutter stayed closed" },
] as const;

/** What the form itself can't read, in words; null when the rest is for the server to judge. */
export function firingProblem(typed: TypedFiring): string | null {
  if (typed.outcome === null) return "Choose what happened.";
  if (typed.outcome === "not fired") return null;
  for (const [name, words] of [
    ["Shutter opened", typed.openedAt],
    ["Shutter closed", typed.closedAt],
  ] as const) {
    if (words.trim() !== "" && readUtc(words) === null) return `${name}: write a UTC time.`;
  }
  if (typed.pulses.trim() !== "" && countOf(typed.pulses) === null) return "Pulses: write a whole number.";
  for (const [i, row] of typed.interruptions.entries()) {
    if (readUtc(row.at) === null) return `Interruption ${i + 1}: write a UTC time.`;
    if (row.cause.trim() === "") return `Interruption ${i + 1}: say what caused it.`;
    if (secondsOf(row.secondsLost) === null) return `Interruption ${i + 1}: how many seconds were lost?`;
  }
  return null;
}

/** The record for the wire; what was left empty is left out, and the server says what is missing. */
export function firingBody(typed: TypedFiring): Record<string, unknown> {
  const note = typed.note.trim() || null;
  if (typed.outcome === "not fired") return { outcome: typed.outcome, pulses: 0, note };
  return {
    outcome: typed.outcome,
    openedAt: readUtc(typed.openedAt),
    closedAt: readUtc(typed.closedAt),
    pulses: countOf(typed.pulses),
    interruptions: typed.interruptions.map((row) => ({
      at: readUtc(row.at),
      cause: row.cause.trim(),
      secondsLost: secondsOf(row.secondsLost),
    })),
    note,
  };
}

/** Thin spaces and plain ones between thousands are fine. */
function countOf(words: string): number | null {
  const plain = words.replaceAll(/[\s\u202f]/g, "");
  return /^\d{1,9}$/.test(plain) ? Number(plain) : null;
}

function secondsOf(words: string): number | null {
  const plain = words.trim().replace(",", ".");
  return /^\d+(\.\d+)?$/.test(plain) ? Number(plain) : null;
}
