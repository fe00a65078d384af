import { database, type Queryable } from "@/db/client";
import { stationsWithLaser } from "@/db/queries/facts";
import { passHasNotice, passRowsById } from "@/db/queries/passes";
import { protectedSetsAsOf } from "@/db/queries/protected-sets";
import type { PassSkyBody } from "@/lib/contracts/pass-surroundings";
import { notFound } from "@/lib/engagement/refusal";
import type { Actor } from "@/lib/engagement/roles";
import { halfAngleOf, protectedClassNamed } from "@/lib/planning/keep-out";
import { calculateElsewhere } from "./calculate-pool";
import { calculateSky, type SkyQuestion } from "./calculate-sky";
import { elementsOf, siteOf } from "./domain-rows";
import { elementsByRow } from "./replan-passes";
import { noticedOnly } from "./search-passes";

/** So many objects are looked at on the spot, in some 30 ms; more in another process. */
const MOST_ON_THE_SPOT = 500;

/**
 * What else stands in the sky during a pass. Read by those who may read the pass: a coordinator only where
 * his authority has notices about it (404).
 */
export async function passSky(actor: Actor, passId: string): Promise<PassSkyBody> {
  const authorityId = noticedOnly(actor);
  const q = database();
  if (authorityId !== undefined && !(await passHasNotice(q, passId, authorityId))) throw notFound("pass");
  const question = await questionOf(q, passId);
  if (!question) throw notFound("pass");
  return question.objects.length <= MOST_ON_THE_SPOT
    ? calculateSky(question)
    : calculateElsewhere("pass-sky", question);
}

async function questionOf(q: Queryable, passId: string): Promise<SkyQuestion | null> {
  const [row] = await passRowsById(q, [passId]);
  const target = row && (await elementsByRow(q, [row])).get(row.elementSetId);
  const [place] = row ? await stationsWithLaser(q, [row.stationId]) : [];
  if (!row || !target || !place) return null;
  const objects = row.screenedAt ? await protectedSetsAsOf(q, row.screenedAt) : [];
  return {
    site: siteOf(place.station),
    target,
    riseMs: row.riseAt.getTime(),
    culminateMs: row.culminateAt.getTime(),
    setMs: row.setAt.getTime(),
    minRangeKm: row.minRangeKm,
    screenedAt: row.screenedAt?.toISOString() ?? null,
    objects: objects.map(({ object, set }) => ({
      name: object.name,
      class: object.class,
      halfAngleDeg: halfAngleOf(protectedClassNamed(object.class) ?? "crewed", object.halfAngleDeg),
      elements: set && elementsOf(set),
    })),
  };
}
