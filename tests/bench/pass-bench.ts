import { type Bulk, openBulk } from "@/lib/physics/orbit/bulk";
import type { Orbit } from "@/lib/physics/orbit/propagate";
import { satrecOf } from "@/lib/physics/orbit/satrec";
import { findPasses, type StationPass } from "@/lib/physics/passes/find-passes";
import { type Row, type Stopwatch, seconds, timed } from "./clock";
import { scanCompiled } from "./compiled-scan";
import { type Found, scanPasses } from "./fixed-scan";
import type { Population } from "./population";
import { STATIONS } from "./stations";

const DAYS = 7;
/** Both sides take turns of this many objects, so that a busy machine slows both. */
const TURN = 50;
/** Rises and sets of both sides must agree to this. */
const TOLERANCE_MS = 100;
/** A scan can only be held to passes longer than its step. */
const SCAN_STEP_MS = 30_000;

interface Tally {
  passes: number;
  short: number;
  disagreements: number;
}

/** Our search against the 30-second scan in JavaScript and against the one with compiled SGP4. */
export async function benchPasses(population: Population): Promise<Row[]> {
  const bulk = await openBulk();
  const { orbits, what } = population;
  const fromMs = Math.max(...orbits.map((o) => o.elements.epochMs));
  const ours: Stopwatch = { cpuS: 0 };
  const scan: Stopwatch = { cpuS: 0 };
  const compiled: Stopwatch = { cpuS: 0 };
  const tallies: [Tally, Tally] = [blankTally(), blankTally()];
  // The first turn only warms the compiler up.
  for (let start = -TURN; start < orbits.length; start += TURN) {
    const turn = start < 0 ? orbits.slice(0, TURN) : orbits.slice(start, start + TURN);
    if (start < 0)
      takeTurn(turn, fromMs, bulk, { cpuS: 0 }, { cpuS: 0 }, { cpuS: 0 }, [blankTally(), blankTally()]);
    else takeTurn(turn, fromMs, bulk, ours, scan, compiled, tallies);
  }
  const size = `${orbits.length} ${what}, ${STATIONS.length} stations, ${DAYS} days`;
  const row = (name: string, theirs: Stopwatch, goal: number, tally: Tally): Row => ({
    name,
    ours: seconds(ours.cpuS),
    theirs: seconds(theirs.cpuS),
    ratio: tally.disagreements === 0 ? theirs.cpuS / ours.cpuS : null,
    goal,
    note:
      `${size}; ${tally.passes} passes compared, ${tally.disagreements} disagreements, ` +
      `${tally.short} too short for a scan`,
  });
  return [
    row("passSearchVsFixedScan", scan, 15, tallies[0]),
    row("passSearchVsCompiledScan", compiled, 5, tallies[1]),
  ];
}

function blankTally(): Tally {
  return { passes: 0, short: 0, disagreements: 0 };
}

function takeTurn(
  orbits: readonly Orbit[],
  fromMs: number,
  bulk: Bulk,
  ours: Stopwatch,
  scan: Stopwatch,
  compiled: Stopwatch,
  tallies: readonly [Tally, Tally],
): void {
  const toMs = fromMs + DAYS * 86_400_000;
  const sites = STATIONS.map((s) => s.site);
  const limitRad = STATIONS[0]?.minElevationRad ?? 0;
  const records = orbits.map((o) => satrecOf(o.elements));
  const found = timed(ours, () => orbits.map((o) => findPasses(o, STATIONS, fromMs, toMs).passes));
  const scanned = timed(scan, () => records.map((r) => scanPasses(r, sites, limitRad, fromMs, toMs)));
  const bulked = timed(compiled, () => orbits.map((o) => scanCompiled(bulk, o, STATIONS, fromMs, toMs)));
  for (const [i, passes] of found.entries()) {
    compare(passes, scanned[i] ?? [], tallies[0]);
    compare(passes, bulked[i] ?? [], tallies[1]);
  }
}

/** Counts passes of ours, those too short for a scan, and every pass that one side lacks. */
function compare(passes: readonly StationPass[], theirs: readonly (readonly Found[])[], tally: Tally): void {
  for (const [station, found] of theirs.entries()) {
    const mine = passes.filter((p) => p.stationIndex === station).map((p) => p.pass);
    const same = (p: (typeof mine)[number], f: Found) =>
      Math.abs(p.riseMs - f.riseMs) < TOLERANCE_MS && Math.abs(p.setMs - f.setMs) < TOLERANCE_MS;
    tally.passes += mine.length;
    for (const f of found) if (!mine.some((p) => same(p, f))) tally.disagreements++;
    for (const p of mine) {
      if (found.some((f) => same(p, f))) continue;
      if (p.setMs - p.riseMs < SCAN_STEP_MS) tally.short++;
      else tally.disagreements++;
    }
  }
}
