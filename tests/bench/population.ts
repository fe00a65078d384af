import { existsSync, readFileSync } from "node:fs";
import type { Elements } from "@/lib/physics/orbit/elements";
import { makeOrbit, type Orbit } from "@/lib/physics/orbit/propagate";
import { elementsFromLines } from "../fixtures/read-tle";

/** The objects that are searched and screened. */
export interface Population {
  readonly what: string;
  readonly orbits: readonly Orbit[];
  /** The two lines of each, where the sets are real; the comparison with Skyfield needs them. */
  readonly lines: readonly (readonly [string, string])[];
}

const REAL_SETS = "../shared/reference/published-debris-2021.tle";

/** Real element sets of 2021 where that file lies beside the project, else an invented cloud. */
export function fragments(count: number): Population {
  if (!existsSync(REAL_SETS)) {
    return { what: "invented fragments", orbits: orbitsOf(inventedCloud(count)), lines: [] };
  }
  const text = readFileSync(REAL_SETS, "utf8").split(/\r?\n/);
  const lines = text.flatMap((line, i) => {
    const next = text[i + 1];
    return line.startsWith("1 ") && next?.startsWith("2 ") ? [[line, next] as const] : [];
  });
  const chosen = lines.slice(0, count);
  const orbits = orbitsOf(chosen.map(([a, b]) => elementsFromLines(a, b)));
  return { what: "real element sets of 2021", orbits, lines: chosen };
}

/**
 * A protected catalogue of any size: the given orbits and copies of them with node and anomaly turned by
 * golden angles, so that they fill the sky evenly.
 */
export function catalogue(orbits: readonly Orbit[], count: number): Orbit[] {
  const golden = 137.50776405;
  const sets = Array.from({ length: count }, (_, i) => {
    const { elements } = orbits[i % orbits.length] as Orbit;
    const turns = Math.floor(i / orbits.length);
    return {
      ...elements,
      catalogNumber: 990_000_000 + i,
      raanDeg: (elements.raanDeg + turns * golden) % 360,
      meanAnomalyDeg: (elements.meanAnomalyDeg + turns * golden * 2) % 360,
    };
  });
  return orbitsOf(sets);
}

function orbitsOf(sets: readonly Elements[]): Orbit[] {
  return sets.map((set) => {
    const made = makeOrbit(set);
    if (!made.ok) throw new Error(`${set.catalogNumber}: ${made.reason}`);
    return made.orbit;
  });
}

function inventedCloud(count: number): Elements[] {
  const epochMs = Date.UTC(2031, 3, 6);
  return Array.from({ length: count }, (_, i) => ({
    catalogNumber: 990_000 + i,
    objectName: null,
    objectId: null,
    epochMs,
    meanMotionRevPerDay: 13.2 + 2 * ((i * 0.618034) % 1),
    eccentricity: 0.02 * ((i * 0.414214) % 1),
    inclinationDeg: 97 + 4 * ((i * 0.732051) % 1),
    raanDeg: (i * 137.50776405) % 360,
    argPericenterDeg: (i * 99.5) % 360,
    meanAnomalyDeg: (i * 222.49) % 360,
    bstar: 1e-4,
    meanMotionDot: 0,
    meanMotionDdot: 0,
  }));
}
