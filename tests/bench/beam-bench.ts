import { sgp4 } from "satellite.js";
import { makeSiteFrame, type SiteFrame, siteStateTeme } from "@/lib/physics/frames/earth";
import type { Orbit } from "@/lib/physics/orbit/propagate";
import { satrecOf } from "@/lib/physics/orbit/satrec";
import { findPasses } from "@/lib/physics/passes/find-passes";
import { type ConeCrossing, screenBeamMany } from "@/lib/physics/screening/beam-cone";
import { type Row, type Stopwatch, seconds, timed } from "./clock";
import { STATIONS } from "./stations";

const HALF_ANGLE_RAD = Math.PI / 180;
const DWELL_MS = 120_000;
const SCAN_STEP_MS = 100;
/** Objects a dwell that brute force scans: all of them would take hours. */
const SAMPLE = 20;
/** Edges of both sides must agree to the scan's step. */
const TOLERANCE_MS = SCAN_STEP_MS + 5;

interface Dwell {
  readonly frame: SiteFrame;
  readonly target: Orbit;
  readonly fromMs: number;
}

/** A number of dwells of two minutes around culminations over the four stations. */
function makeDwells(targets: readonly Orbit[], count: number): Dwell[] {
  const fromMs = Math.max(...targets.map((o) => o.elements.epochMs));
  const dwells: Dwell[] = [];
  for (const target of targets) {
    const { passes } = findPasses(target, STATIONS, fromMs, fromMs + 2 * 86_400_000);
    for (const { stationIndex, pass } of passes.filter((p) => p.pass.maxElevationRad > 0.5).slice(0, 2)) {
      const site = STATIONS[stationIndex]?.site;
      if (site) dwells.push({ frame: makeSiteFrame(site), target, fromMs: pass.culminateMs - DWELL_MS / 2 });
    }
    if (dwells.length >= count) break;
  }
  return dwells.slice(0, count);
}

/** The screening of every dwell against the whole catalogue, against brute force on a sample of pairs. */
export function benchBeam(targets: readonly Orbit[], catalogue: readonly Orbit[], dwellCount: number): Row {
  const ours: Stopwatch = { cpuS: 0 };
  const scan: Stopwatch = { cpuS: 0 };
  const halfAngleRad = () => HALF_ANGLE_RAD;
  const others = catalogue.map((orbit) => ({ orbit, halfAngleRad }));
  const dwells = makeDwells(targets, dwellCount);
  const first = dwells[0];
  // Warms the compiler up.
  if (first) screenBeamMany({ ...first, toMs: first.fromMs + DWELL_MS, others: others.slice(0, 2000) });
  const total = { pairs: 0, scanned: 0, crossings: 0, compared: 0, unchecked: 0, disagreements: 0 };
  for (const [k, dwell] of dwells.entries()) {
    const results = timed(ours, () => screenBeamMany({ ...dwell, toMs: dwell.fromMs + DWELL_MS, others }));
    total.pairs += results.length;
    const sampled = new Set(
      Array.from({ length: SAMPLE }, (_, i) => (k * 7919 + i * 509) % catalogue.length),
    );
    const scanned = timed(scan, () => bruteForce(dwell, catalogue, [...sampled]));
    total.scanned += sampled.size;
    // Every pair with a crossing is scanned too, but not on the clock: it would not be a fair sample.
    const hits = results.flatMap((r, i) => (r.ok && r.crossings.length > 0 && !sampled.has(i) ? [i] : []));
    for (const [i, spans] of [...scanned, ...bruteForce(dwell, catalogue, hits)]) {
      const result = results[i];
      if (!result?.ok) {
        total.unchecked++;
        continue;
      }
      total.crossings += result.crossings.length;
      total.compared++;
      if (!agrees(result.crossings, spans)) total.disagreements++;
    }
  }
  const perPair = ours.cpuS / total.pairs;
  const theirPerPair = scan.cpuS / total.scanned;
  const agree = total.disagreements === 0 && total.crossings > 0;
  return {
    name: "beamScreenVsBruteForce",
    ours: seconds(ours.cpuS),
    theirs: `${seconds(theirPerPair * total.pairs)} (from ${total.scanned} of ${total.pairs} pairs)`,
    ratio: agree ? theirPerPair / perPair : null,
    goal: 100,
    note:
      `${catalogue.length} objects, ${dwells.length} dwells of ${DWELL_MS / 1000} s, half-angle 1 degree; ` +
      `brute force every 0.1 s; ${total.compared} pairs compared with ${total.crossings} crossings, ` +
      `${total.disagreements} disagreements, ${total.unchecked} not propagable`,
  };
}

/** First and last time inside the cone, for each stretch inside, by satellite.js at every step. */
function bruteForce(
  dwell: Dwell,
  catalogue: readonly Orbit[],
  indices: readonly number[],
): [number, [number, number][]][] {
  if (indices.length === 0) return [];
  const count = DWELL_MS / SCAN_STEP_MS + 1;
  const sites = Array.from(
    { length: count },
    (_, i) => siteStateTeme(dwell.frame, dwell.fromMs + i * SCAN_STEP_MS).rKm,
  );
  const target = satrecOf(dwell.target.elements);
  const beams = sites.map((site, i) => {
    const r = sgp4(
      target,
      (dwell.fromMs + i * SCAN_STEP_MS - dwell.target.elements.epochMs) / 60_000,
    )?.position;
    const [x, y, z] = r ? [r.x - site.x, r.y - site.y, r.z - site.z] : [0, 0, 0];
    const length = Math.sqrt(x * x + y * y + z * z);
    return { x: x / length, y: y / length, z: z / length };
  });
  const cosine = Math.cos(HALF_ANGLE_RAD);
  return indices.map((index) => {
    const { elements } = catalogue[index] as Orbit;
    const record = satrecOf(elements);
    const spans: [number, number][] = [];
    let inside = false;
    for (let i = 0; i < count; i++) {
      const atMs = dwell.fromMs + i * SCAN_STEP_MS;
      const r = sgp4(record, (atMs - elements.epochMs) / 60_000)?.position;
      const site = sites[i] as { x: number; y: number; z: number };
      const beam = beams[i] as { x: number; y: number; z: number };
      const [x, y, z] = r ? [r.x - site.x, r.y - site.y, r.z - site.z] : [0, 0, 0];
      const within = x * beam.x + y * beam.y + z * beam.z > cosine * Math.sqrt(x * x + y * y + z * z);
      if (within && !inside) spans.push([atMs, atMs]);
      const last = spans.at(-1);
      if (within && last) last[1] = atMs;
      inside = within;
    }
    return [index, spans];
  });
}

/** Whether both sides have the same crossings; one shorter than the scan's step may be ours alone. */
function agrees(crossings: readonly ConeCrossing[], spans: readonly [number, number][]): boolean {
  const near = (c: ConeCrossing, [from, to]: [number, number]) =>
    Math.abs(c.fromMs - from) <= TOLERANCE_MS && Math.abs(c.toMs - to) <= TOLERANCE_MS;
  const seen = spans.every((span) => crossings.some((c) => near(c, span)));
  return (
    seen && crossings.every((c) => c.toMs - c.fromMs < SCAN_STEP_MS || spans.some((span) => near(c, span)))
  );
}
