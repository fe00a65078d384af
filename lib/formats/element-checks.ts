import type { Elements } from "@/lib/physics/orbit/elements";
import { makeOrbit } from "@/lib/physics/orbit/propagate";

/** An element that is out of its range, and what is wrong with it. */
export interface ElementFault {
  readonly key: keyof Elements;
  readonly message: string;
}

/**
 * A circular orbit at the Earth's surface has 17.07 revolutions a day (two-body,
 * WGS-72 constants of AIAA 2006-6753); decaying objects print a little less.
 */
const MAX_REV_PER_DAY = 17.1;

/**
 * At 0.0098 revolutions a day the semi-major axis is 924,000 km, the radius of the
 * Earth's sphere of influence (from memory): nothing slower circles the Earth.
 */
const MIN_REV_PER_DAY = 0.0098;

const NUMBERS = [
  "epochMs",
  "meanMotionRevPerDay",
  "eccentricity",
  "inclinationDeg",
  "raanDeg",
  "argPericenterDeg",
  "meanAnomalyDeg",
  "bstar",
  "meanMotionDot",
  "meanMotionDdot",
] as const;

/** Every element that is not finite or not in its range; an empty list when all are. */
export function checkRanges(e: Elements): ElementFault[] {
  const faults: ElementFault[] = NUMBERS.filter((key) => !Number.isFinite(e[key])).map((key) => ({
    key,
    message: "The value is not a finite number.",
  }));
  if (faults.length > 0) return faults;
  const demand = (key: keyof Elements, holds: boolean, message: string): void => {
    if (!holds) faults.push({ key, message });
  };
  const angle = (key: keyof Elements, name: string, value: number, most: number): void => {
    const holds = value >= 0 && value <= most;
    demand(key, holds, `The ${name} is ${value} degrees; it lies between 0 and ${most}.`);
  };
  angle("inclinationDeg", "inclination", e.inclinationDeg, 180);
  angle("raanDeg", "right ascension of the ascending node", e.raanDeg, 360);
  const eccentric = e.eccentricity >= 0 && e.eccentricity < 1;
  demand(
    "eccentricity",
    eccentric,
    `The eccentricity is ${e.eccentricity}; it lies between 0 and 1, without 1.`,
  );
  angle("argPericenterDeg", "argument of pericentre", e.argPericenterDeg, 360);
  angle("meanAnomalyDeg", "mean anomaly", e.meanAnomalyDeg, 360);
  const n = e.meanMotionRevPerDay;
  demand("meanMotionRevPerDay", n >= MIN_REV_PER_DAY && n <= MAX_REV_PER_DAY, meanMotionMessage(n));
  return faults;
}

function meanMotionMessage(n: number): string {
  const why =
    n > MAX_REV_PER_DAY ? "that orbit would lie inside the Earth" : "that orbit would leave the Earth";
  return `The mean motion is ${n} revolutions a day: ${why}; ${MIN_REV_PER_DAY} to ${MAX_REV_PER_DAY} is possible.`;
}

/**
 * Why the set cannot be propagated to its own epoch, or null when it can: SGP4 must
 * take it and give a finite state outside the Earth. Ranges must have been checked.
 */
export function checkAtEpoch(e: Elements): string | null {
  const made = makeOrbit(e);
  return made.ok ? null : `SGP4 does not take this set. ${made.reason}`;
}
