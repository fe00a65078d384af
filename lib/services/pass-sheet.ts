import { database, type Queryable } from "@/db/client";
import { type PassRow, passHasNotice, passRowsById } from "@/db/queries/passes";
import type { EstimateBody, PassSheetBody, SampleBody } from "@/lib/contracts/passes";
import { notFound } from "@/lib/engagement/refusal";
import type { Actor } from "@/lib/engagement/roles";
import type { Orbit } from "@/lib/physics/orbit/propagate";
import { lightAt } from "@/lib/physics/sky/light-stretches";
import { assumptionsOf } from "@/lib/planning/assumptions";
import { effectOfDwell } from "@/lib/planning/effect";
import type { Interval } from "@/lib/planning/interval";
import { buildProfile } from "@/lib/planning/profile";
import { isoOf } from "./closure-body";
import { type FactBook, loadFactBook } from "./fact-book";
import { intervalOf } from "./fact-rows";
import { concernedAuthorities } from "./judge-dwell";
import { passBody } from "./pass-body";
import { groundBody } from "./pass-ground";
import {
  concernedBodies,
  crossingBodies,
  elementSetBody,
  estimateBody,
  laserBody,
  stationBody,
} from "./pass-sheet-parts";
import { AIM, orbitOrNull } from "./pass-work";
import { type OfferedPass, planOffers } from "./plan-offers";
import { elementsByRow } from "./replan-passes";
import { noticedOnly } from "./search-passes";

/** Samples of a sheet, at most; a pass of ten minutes has one every 5 s. */
const MOST_SAMPLES = 120;

/**
 * Everything about one pass, worked out now. A coordinator may read the passes that his authority has
 * notices about; of others he learns nothing (404).
 */
export async function passSheet(actor: Actor, passId: string, nowMs: number): Promise<PassSheetBody> {
  const authorityId = noticedOnly(actor);
  const q = database();
  const [row] = await passRowsById(q, [passId]);
  if (!row) throw notFound("pass");
  if (authorityId !== undefined && !(await passHasNotice(q, passId, authorityId))) throw notFound("pass");
  const book = await loadFactBook(q, [row]);
  const [offered] = await planOffers(q, book, [row], { nowMs, budgetMs: Number.POSITIVE_INFINITY });
  if (!offered) throw notFound("pass");
  return await sheetOf(q, book, row, offered);
}

async function sheetOf(
  q: Queryable,
  book: FactBook,
  row: PassRow,
  offered: OfferedPass,
): Promise<PassSheetBody> {
  const { scene, figured, facts, geometry, engagement } = offered.reading;
  const orbit = orbitOrNull((await elementsByRow(q, [row])).get(row.elementSetId));
  const profile = orbit && profileOf(offered, orbit);
  const dwell = engagement ? intervalOf(engagement.dwellFrom, engagement.dwellTo) : offered.offer.dwell;
  const { riseAzimuthDeg, culminationAzimuthDeg, setAzimuthDeg, underWayAtFrom, underWayAtTo } = row;
  return {
    ...passBody(offered),
    station: stationBody(scene),
    laser: laserBody(scene),
    riseAzimuthDeg,
    culminationAzimuthDeg,
    setAzimuthDeg,
    underWayAtFrom,
    underWayAtTo,
    elementSet: elementSetBody(row),
    aim: profile?.aim ?? AIM,
    aimUnit: profile?.aimUnit ?? "",
    samples: profile?.samples ?? [],
    estimate: engagement ? bookedEstimate(engagement) : orbit && dwell && estimateOf(offered, orbit, dwell),
    concerned: concernedBodies(concernedAuthorities(book, geometry, facts, dwell)),
    assumptions: figured.ok ? assumptionsOf(figured.figures.laser, figured.figures.body, row.bodySource) : [],
    crossings: crossingBodies(book, row),
    ground: orbit && (await groundBody(q, orbit, row, dwell)),
  };
}

/** The worth curve and the samples of the whole pass; null where the model refuses it. */
function profileOf(
  offered: OfferedPass,
  orbit: Orbit,
): { aim: string; aimUnit: string; samples: SampleBody[] } | null {
  const { figured, geometry, scene } = offered.reading;
  if (!figured.ok) return null;
  const { laser, body } = figured.figures;
  const span = { fromMs: geometry.riseMs, toMs: geometry.setMs };
  const stepS = Math.max(5, Math.ceil((span.toMs - span.fromMs) / 1000 / MOST_SAMPLES));
  const built = buildProfile({ orbit, frame: scene.map.frame, laser, body, ...span, stepS, aim: AIM });
  if (!built.ok) return null;
  const samples = built.profile.samples.map((sample) => ({
    at: isoOf(sample.atMs),
    elevationDeg: sample.elevationDeg,
    azimuthDeg: sample.azimuthDeg,
    rangeKm: sample.rangeKm,
    transmission: sample.transmission,
    spotDiameterM: sample.spotDiameterM,
    fluenceJPerM2: sample.fluenceJPerM2,
    couplingNPerW: sample.couplingNPerW,
    deltaVMPerS: sample.deltaVMPerS,
    worthPerS: sample.worthPerS,
    sunlight: lightAt(orbit, sample.atMs),
  }));
  return { aim: built.profile.aim, aimUnit: built.profile.aimUnit, samples };
}

/** What was predicted when the dwell was booked. */
function bookedEstimate(engagement: NonNullable<OfferedPass["reading"]["engagement"]>): EstimateBody {
  const { aim: _aim, ...effect } = engagement.effect;
  return { from: engagement.dwellFrom.toISOString(), to: engagement.dwellTo.toISOString(), ...effect };
}

function estimateOf(offered: OfferedPass, orbit: Orbit, dwell: Interval): EstimateBody | null {
  const { figured, scene } = offered.reading;
  if (!figured.ok) return null;
  const { laser, body } = figured.figures;
  const { fromMs, toMs } = dwell;
  const worked = effectOfDwell({ orbit, frame: scene.map.frame, laser, body, fromMs, toMs });
  return worked.ok ? estimateBody(dwell, worked.effect) : null;
}
