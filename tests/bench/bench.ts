import { benchBeam } from "./beam-bench";
import type { Row } from "./clock";
import { benchPasses } from "./pass-bench";
import { catalogue, fragments } from "./population";
import { benchSkyfield } from "./skyfield-bench";
import { benchWorkers } from "./workers-bench";

// npm run bench [-- --json]: how fast the searches are against plain ways to the same events. Figures are processor
// time of one run, for the workers wall clock; a ratio counts only when both sides found the same events.

/** `--quick` takes a tenth of everything, to try the benchmark itself. */
const share = process.argv.includes("--quick") ? 10 : 1;

function print(rows: readonly Row[], peakMb: number): void {
  const cells = rows.map((r) => [
    r.name,
    r.ours,
    r.theirs,
    r.ratio === null ? "-" : `${r.ratio.toFixed(1)} x`,
    `${r.goal} x`,
  ]);
  const table = [["comparison", "ours", "theirs", "ratio", "goal"], ...cells];
  const widths = [0, 1, 2, 3, 4].map((i) => Math.max(...table.map((row) => row[i]?.length ?? 0)));
  for (const row of table) console.log(row.map((cell, i) => cell.padEnd(widths[i] ?? 0)).join("  "));
  console.log();
  for (const row of rows) console.log(`${row.name}: ${row.note}.`);
  console.log(`Peak memory: ${peakMb} MB.`);
}

const population = fragments(1000 / share);
const rows = [
  ...(await benchPasses(population)),
  benchSkyfield(population, share === 1 ? 20 : 5),
  benchBeam(population.orbits, catalogue(population.orbits, 10_000 / share), 200 / share),
  await benchWorkers(share === 1 ? 40 : 8),
];
const peakMemoryMb = Math.round(process.resourceUsage().maxRSS / 1024);
print(rows, peakMemoryMb);
if (process.argv.includes("--json")) {
  const ratios = Object.fromEntries(
    rows.flatMap((r) => (r.ratio === null ? [] : [[r.name, Number(r.ratio.toFixed(2))]])),
  );
  console.log(JSON.stringify({ ratios, peakMemoryMb }));
}
// Sides that disagree are a defect; what could not be measured here is not.
if (rows.some((r) => r.ratio === null && !r.note.startsWith("left out"))) process.exitCode = 1;
