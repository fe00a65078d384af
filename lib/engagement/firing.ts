import type { Reason } from "./refusal";

/** What an operator says was fired; times in Unix ms. */
export interface FiringClaim {
  readonly outcome: "fired" | "in part" | "not fired";
  readonly openedMs: number | null;
  readonly closedMs: number | null;
  readonly pulses: number | null;
  readonly interruptions: readonly { readonly atMs: number; readonly secondsLost: number }[];
  readonly note: string | null;
}

/** What the claim is held against. */
export interface FiringFrame {
  readonly dwellFromMs: number;
  readonly dwellToMs: number;
  readonly repetitionRateHz: number;
  readonly nowMs: number;
}

/** Our setting: a pulse count may differ from rate times open seconds by this share, and by one pulse. */
export const PULSE_TOLERANCE = 0.05;

/** Our setting: a shutter time this far outside the dwell still counts as inside (ms). */
export const SHUTTER_TOLERANCE_MS = 1000;

/** Every reason why the record cannot be true or whole; none when it can. */
export function checkFiring(claim: FiringClaim, frame: FiringFrame): Reason[] {
  return claim.outcome === "not fired" ? checkNotFired(claim) : checkFired(claim, frame);
}

function checkNotFired(claim: FiringClaim): Reason[] {
  const reasons: Reason[] = [];
  if (claim.openedMs !== null) reasons.push(says("openedAt", "Not fired: there is no shutter time to give."));
  if (claim.closedMs !== null) reasons.push(says("closedAt", "Not fired: there is no shutter time to give."));
  if ((claim.pulses ?? 0) !== 0) reasons.push(says("pulses", "Not fired: the pulses must be 0."));
  return reasons;
}

function checkFired(claim: FiringClaim, frame: FiringFrame): Reason[] {
  const { openedMs, closedMs, pulses } = claim;
  const reasons: Reason[] = [];
  if (openedMs === null) reasons.push(says("openedAt", "When did the shutter open?"));
  if (closedMs === null) reasons.push(says("closedAt", "When did the shutter close?"));
  if (pulses === null) reasons.push(says("pulses", "How many pulses were fired?"));
  if (openedMs === null || closedMs === null) return reasons;
  if (openedMs >= closedMs) {
    return [...reasons, says("closedAt", "The shutter must close after it opened.")];
  }
  reasons.push(...checkTimes(openedMs, closedMs, claim, frame));
  reasons.push(...checkInterruptions(openedMs, closedMs, claim));
  if (pulses !== null) reasons.push(...checkPulses(pulses, (closedMs - openedMs) / 1000, claim, frame));
  return reasons;
}

function checkTimes(openedMs: number, closedMs: number, claim: FiringClaim, frame: FiringFrame): Reason[] {
  const reasons: Reason[] = [];
  if (closedMs > frame.nowMs) reasons.push(says("closedAt", "This time is still to come."));
  const outside =
    openedMs < frame.dwellFromMs - SHUTTER_TOLERANCE_MS || closedMs > frame.dwellToMs + SHUTTER_TOLERANCE_MS;
  if (outside && !claim.note?.trim()) {
    reasons.push(says("note", "The shutter was open outside the booked dwell: say in the note why."));
  }
  return reasons;
}

function checkInterruptions(openedMs: number, closedMs: number, claim: FiringClaim): Reason[] {
  const reasons = claim.interruptions.flatMap(({ atMs }, index) =>
    atMs < openedMs || atMs >= closedMs
      ? [says(`interruptions.${index}.at`, "The shutter was not open at this time.")]
      : [],
  );
  const openS = (closedMs - openedMs) / 1000;
  if (secondsLost(claim) > openS) {
    reasons.push(says("interruptions", `More seconds lost than the ${openS} s that the shutter was open.`));
  }
  return reasons;
}

function checkPulses(pulses: number, openS: number, claim: FiringClaim, frame: FiringFrame): Reason[] {
  const rate = frame.repetitionRateHz;
  const most = Math.floor(openS * rate * (1 + PULSE_TOLERANCE) + 1);
  if (pulses > most) {
    return [says("pulses", `At ${rate} Hz the shutter's ${openS} s give at most ${most} pulses.`)];
  }
  if (pulses === 0) return [says("pulses", "No pulse at all is the outcome “not fired”.")];
  const usedS = Math.max(0, openS - secondsLost(claim));
  const least = Math.ceil(usedS * rate * (1 - PULSE_TOLERANCE) - 1);
  if (claim.outcome === "fired" && pulses < least) {
    const words = `At ${rate} Hz, ${usedS} s without interruption give at least ${least} pulses.`;
    return [says("pulses", `${words} Name the interruptions, or record it as fired in part.`)];
  }
  return [];
}

function secondsLost(claim: FiringClaim): number {
  return claim.interruptions.reduce((sum, { secondsLost: lost }) => sum + lost, 0);
}

function says(path: string, message: string): Reason {
  return { path, message };
}
