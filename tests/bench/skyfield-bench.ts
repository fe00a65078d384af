import { spawnSync } from "node:child_process";
import { fileURLToPath } from "node:url";
import { findPasses } from "@/lib/physics/passes/find-passes";
import { type Row, type Stopwatch, seconds, timed } from "./clock";
import type { Population } from "./population";
import { STATIONS } from "./stations";

const DAYS = 7;
const NAME = "passSearchVsSkyfield";
const GOAL = 50;
/**
 * Skyfield's search stops at a second and leaves the rises and sets of shallow passes up to a minute off (found
 * when the test fixture was made): that is its tolerance here, the count of events must be the same.
 */
const TOLERANCE_MS = 60_000;

interface Answer {
  readonly cpuS: number;
  readonly version: string;
  readonly events: readonly (readonly (readonly (readonly [number, number])[])[])[];
}

/** Our search against Skyfield's, on a sample; says so where Debian's python3-skyfield is missing. */
export function benchSkyfield(population: Population, sample: number): Row {
  const missing = (note: string): Row => ({
    name: NAME,
    ours: "-",
    theirs: "-",
    ratio: null,
    goal: GOAL,
    note,
  });
  if (population.lines.length === 0)
    return missing("left out: there are no real element sets beside the project");
  const step = Math.floor(population.lines.length / sample);
  const chosen = Array.from({ length: sample }, (_, i) => i * step);
  const orbits = chosen.flatMap((i) => population.orbits[i] ?? []);
  const fromMs = Math.ceil(Math.max(...population.orbits.map((o) => o.elements.epochMs)) / 1000) * 1000;
  const toMs = fromMs + DAYS * 86_400_000;
  const task = {
    sets: chosen.map((i) => population.lines[i]),
    stations: STATIONS.map((s) => s.site),
    limitDeg: 10,
    fromMs,
    toMs,
  };
  const script = fileURLToPath(new URL("skyfield_events.py", import.meta.url));
  const run = spawnSync("/usr/bin/python3", [script], {
    input: JSON.stringify(task),
    encoding: "utf8",
    maxBuffer: 1e9,
  });
  if (run.status !== 0) return missing("left out: Debian's python3-skyfield is not there");
  const answer = JSON.parse(run.stdout) as Answer;

  const ours: Stopwatch = { cpuS: 0 };
  for (const orbit of orbits) findPasses(orbit, STATIONS, fromMs, toMs);
  const found = timed(ours, () => orbits.map((o) => findPasses(o, STATIONS, fromMs, toMs).passes));
  let [events, disagreements] = [0, 0];
  for (const [i, passes] of found.entries()) {
    for (const station of STATIONS.keys()) {
      const mine = passes
        .filter((p) => p.stationIndex === station)
        .flatMap(({ pass: p }) => [
          ...(p.underWayAtFrom ? [] : [[0, p.riseMs] as const]),
          ...(p.underWayAtTo ? [] : [[2, p.setMs] as const]),
        ]);
      const theirs = (answer.events[i]?.[station] ?? []).filter(([kind]) => kind !== 1);
      events += mine.length;
      const same = theirs.every(([kind, atMs], k) => {
        const [myKind, myMs] = mine[k] ?? [-1, 0];
        return myKind === kind && Math.abs(myMs - atMs) < TOLERANCE_MS;
      });
      if (!same || mine.length !== theirs.length) disagreements++;
    }
  }
  return {
    name: NAME,
    ours: seconds(ours.cpuS),
    theirs: seconds(answer.cpuS),
    ratio: disagreements === 0 ? answer.cpuS / ours.cpuS : null,
    goal: GOAL,
    note:
      `Skyfield ${answer.version} on a sample of ${sample} of ${population.lines.length} sets, ${STATIONS.length} ` +
      `stations, ${DAYS} days; ${events} rises and sets compared, ${disagreements} disagreements`,
  };
}
