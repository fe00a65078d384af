import { database } from "@/db/client";
import { engagementsOfFragment, fragmentRow, setsOfFragment } from "@/db/queries/objects";
import type { FragmentSheetBody, OrbitBody } from "@/lib/contracts/fragments";
import { notFound } from "@/lib/engagement/refusal";
import type { Actor } from "@/lib/engagement/roles";
import { EARTH_RADIUS_KM, WGS72_MU_KM3_PER_S2 } from "@/lib/physics/constants";
import { fragmentBodies } from "./list-fragments";
import { mustReadBook } from "./must-read-book";

/** One fragment with its orbit, the history of its element sets and its engagements. */
export async function fragmentSheet(actor: Actor, id: string, nowMs: number): Promise<FragmentSheetBody> {
  mustReadBook(actor);
  const q = database();
  if (!(await fragmentRow(q, id))) throw notFound("fragment");
  const body = (await fragmentBodies(q, nowMs)).find((fragment) => fragment.id === id);
  if (!body) throw notFound("fragment");
  const sets = await setsOfFragment(q, id);
  const engagements = await engagementsOfFragment(q, id);
  return {
    ...body,
    orbit: sets[0] ? orbitBody(sets[0]) : null,
    elementSets: sets.map((set) => ({
      id: set.id,
      epochAt: set.epochAt.toISOString(),
      importedAt: set.importedAt.toISOString(),
      source: set.source,
      format: set.format,
      raw: set.raw,
    })),
    engagements: engagements.map(({ dwellFrom, dwellTo, ...engagement }) => ({
      ...engagement,
      from: dwellFrom.toISOString(),
      to: dwellTo.toISOString(),
    })),
  };
}

/** Mean elements with the axis that the mean motion means (Kepler, WGS-72 gravity as SGP4 uses). */
function orbitBody(set: Awaited<ReturnType<typeof setsOfFragment>>[number]): OrbitBody {
  const radPerS = (set.meanMotionRevPerDay * 2 * Math.PI) / 86_400;
  const semiMajorAxisKm = Math.cbrt(WGS72_MU_KM3_PER_S2 / radPerS ** 2);
  return {
    meanMotionRevPerDay: set.meanMotionRevPerDay,
    periodMin: 1440 / set.meanMotionRevPerDay,
    eccentricity: set.eccentricity,
    inclinationDeg: set.inclinationDeg,
    raanDeg: set.raanDeg,
    argPericenterDeg: set.argPericenterDeg,
    meanAnomalyDeg: set.meanAnomalyDeg,
    bstar: set.bstar,
    semiMajorAxisKm,
    perigeeKm: semiMajorAxisKm * (1 - set.eccentricity) - EARTH_RADIUS_KM,
    apogeeKm: semiMajorAxisKm * (1 + set.eccentricity) - EARTH_RADIUS_KM,
  };
}
