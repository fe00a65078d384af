import type { PassRow } from "@/db/queries/passes";
import type { Interval } from "@/lib/planning/interval";
import { protectedClassNamed } from "@/lib/planning/keep-out";
import type {
  CrossingFacts,
  FiringFacts,
  OwnFacts,
  PassFacts,
  ProtectedFacts,
  ScreeningFacts,
} from "@/lib/planning/pass-facts";
import type { FactBook } from "./fact-book";
import { answerFacts, intervalOf } from "./fact-rows";
import type { StationScene } from "./station-scene";

/** What is asked about the pass: when, for which dwell, and on behalf of which engagement. */
export interface Question {
  readonly nowMs: number;
  readonly dwell: Interval | null;
  /** Its own hold, requests and answers count as its own; it must be in the book. */
  readonly ownEngagementId: string | null;
}

/** For an engagement whose dwell isn't known: its answers help nowhere. */
const NOWHERE: Interval = { fromMs: 0, toMs: 0 };

/** The facts of one pass for the rules, from what was loaded. Throws when its station wasn't. */
export function factsOf(book: FactBook, row: PassRow, question: Question): PassFacts {
  const scene = sceneOf(book, row);
  const newest = book.newestSets.get(row.fragmentId);
  return {
    nowMs: question.nowMs,
    station: scene.facts,
    fragmentId: row.fragmentId,
    elements: {
      fragmentName: row.fragmentName,
      usedEpochMs: row.epochMs,
      usedSource: row.elementSource,
      newestEpochMs: newest?.epochMs ?? row.epochMs,
      newestSource: newest?.source ?? row.elementSource,
    },
    vanishedAtMs: row.vanishedAt?.getTime() ?? null,
    screening: screeningFacts(book, row),
    volumes: scene.volumes,
    airspaceKey: scene.airspaceKey,
    authorities: book.authorities,
    stationAuthorityIds: scene.authorityIds,
    engagements: near(book, row, question.dwell, scene),
    firings: firingFacts(book, row.fragmentId),
    own: ownFacts(book, row, question),
    dwell: question.dwell,
  };
}

/** The station of a pass with its surroundings. */
export function sceneOf(book: FactBook, row: PassRow): StationScene {
  const scene = book.scenes.get(row.stationId);
  if (!scene) throw new Error(`station ${row.stationId} is not in the fact book`);
  return scene;
}

function screeningFacts(book: FactBook, row: PassRow): ScreeningFacts {
  const crossings = (book.crossings.get(row.id) ?? []).map(
    (crossing): CrossingFacts => ({
      fromMs: crossing.fromAt.getTime(),
      toMs: crossing.toAt.getTime(),
      object: protectedFacts(crossing.objectId, {
        name: crossing.objectName,
        class: crossing.objectClass,
        version: crossing.objectVersion,
      }),
      minSeparationDeg: crossing.minSeparationDeg,
      halfAngleDeg: crossing.halfAngleDeg,
      addedDeg: crossing.addedDeg,
      objectEpochMs: crossing.objectEpochMs,
    }),
  );
  return {
    screenedAtMs: row.screenedAt?.getTime() ?? null,
    catalogueChangedAtMs: book.protectedState.changedAt?.getTime() ?? null,
    crewedCount: book.protectedState.crewedCount,
    crossings,
    gaps: row.screeningGaps.map((id) => protectedFacts(id, book.gapObjects.get(id) ?? null)),
  };
}

/** An object of a class that we don't know, or that is gone, is treated as crewed: nothing lifts it. */
function protectedFacts(
  id: string,
  row: { name: string; class: string; version: number } | null,
): ProtectedFacts {
  const known = row ? protectedClassNamed(row.class) : null;
  return { id, name: row?.name ?? id, class: known ?? "crewed", version: row?.version ?? 0 };
}

/** The engagements that can touch the pass; the rule works out the exact hold. */
function near(book: FactBook, row: PassRow, dwell: Interval | null, scene: StationScene) {
  const marginMs = 1000 * (scene.station.slewS + scene.station.coolDownS);
  const fromMs = Math.min(row.riseAt.getTime(), dwell?.fromMs ?? Number.POSITIVE_INFINITY) - marginMs;
  const toMs = Math.max(row.setAt.getTime(), dwell?.toMs ?? Number.NEGATIVE_INFINITY) + marginMs;
  return book.live.filter(({ hold }) => hold.fromMs < toMs && fromMs < hold.toMs);
}

function firingFacts(book: FactBook, fragmentId: string): FiringFacts[] {
  const firing = book.firings.get(fragmentId);
  if (!firing?.closedAt) return [];
  const outcome = firing.outcome === "fired" ? "fired" : "in part";
  return [{ engagementNumber: firing.number, outcome, closedMs: firing.closedAt.getTime() }];
}

function ownFacts(book: FactBook, row: PassRow, question: Question): OwnFacts | null {
  const engagementId = question.ownEngagementId;
  if (engagementId === null) return null;
  const shown = book.passEngagements.get(row.id);
  const booked = shown?.id === engagementId ? intervalOf(shown.dwellFrom, shown.dwellTo) : null;
  const { requests, answers } = book.asked;
  return {
    engagementId,
    dwell: question.dwell ?? booked ?? NOWHERE,
    requestedOf: new Set(requests.filter((r) => r.engagementId === engagementId).map((r) => r.authorityId)),
    answers: answers.filter((answer) => answer.engagementId === engagementId).map(answerFacts),
  };
}
