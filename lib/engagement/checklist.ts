import type { Reason } from "./refusal";

/** The times in a checklist, Unix ms. */
export interface ChecklistTimes {
  readonly airUnitCalledAtMs: number;
  readonly interlockTestedAtMs: number;
  readonly crewedListCheckedAtMs: number;
}

/** Our setting: what was checked longer ago than this has to be checked again. */
export const CHECK_AGE_LIMIT_MS = 24 * 3_600_000;

/** Clocks of two people may differ by this much before a time counts as still to come. */
const CLOCK_SLACK_MS = 60_000;

const WORDS: Readonly<Record<keyof ChecklistTimes, readonly [path: string, what: string]>> = {
  airUnitCalledAtMs: ["checklist.airUnitCalledAt", "call to the air unit"],
  interlockTestedAtMs: ["checklist.interlockTestedAt", "interlock test"],
  crewedListCheckedAtMs: ["checklist.crewedListCheckedAt", "check of the crewed list"],
};

/** Reasons against a checklist: something is said to have been done in the future, or too long ago. */
export function checkChecklist(times: ChecklistTimes, nowMs: number): Reason[] {
  return (Object.keys(WORDS) as (keyof ChecklistTimes)[]).flatMap((key) => {
    const [path, what] = WORDS[key];
    if (times[key] > nowMs + CLOCK_SLACK_MS) {
      return [{ path, message: `The ${what} is still to come: do it, then confirm.` }];
    }
    if (times[key] < nowMs - CHECK_AGE_LIMIT_MS) {
      return [{ path, message: `The ${what} is more than 24 h old: do it again.` }];
    }
    return [];
  });
}
