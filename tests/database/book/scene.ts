import { database } from "@/db/client";
import { makeSiteFrame } from "@/lib/physics/frames/earth";
import { makeOrbit } from "@/lib/physics/orbit/propagate";
import { findPasses } from "@/lib/physics/passes/find-passes";
import { elementsOf } from "@/lib/services/domain-rows";
import {
  addAuthority,
  addFragment,
  addPass,
  addPerson,
  addProtected,
  addStation,
  elementSetRow,
  HOUR,
  NOW,
} from "../world";

/** A station, a fragment with a real pass over it, people and authorities: a book that can be written in. */
export async function makeScene() {
  const db = database();
  const station = await addStation(db, "Alder Point");
  const fragment = await addFragment(db, 88_001);
  await addProtected(db, 70_001, "crewed");
  const clearing = await addAuthority(db, "Tessel Clearing Desk", station.id);
  const airUnit = await addAuthority(db, "Brume Air Unit", station.id, {
    kind: "air unit",
    timeZone: "Australia/Sydney",
    changeDeadlineMin: 60,
  });
  const place = {
    stationId: station.id,
    laserSettingId: station.laserSettingId,
    fragmentId: fragment.id,
    elementSetId: fragment.elementSetId,
  };
  const found = highPasses(station);
  const passRows = [];
  for (const pass of found) {
    passRows.push(
      await addPass(db, place, pass.riseMs, pass.setMs, {
        culminateAt: new Date(pass.culminateMs),
        maxElevationDeg: (pass.maxElevationRad * 180) / Math.PI,
        minRangeKm: pass.minRangeKm,
      }),
    );
  }
  const [pass, laterPass] = passRows;
  if (!pass || !laterPass)
    throw new Error("the invented orbit gives too few high passes: the scene is broken");
  return {
    station,
    fragment,
    place,
    clearing,
    airUnit,
    pass,
    laterPass,
    planner: await addPerson(db, "Plan Ner", "planner"),
    otherPlanner: await addPerson(db, "Ola Plan", "planner"),
    operator: await addPerson(db, "Op One", "operator"),
    secondOperator: await addPerson(db, "Op Two", "operator"),
    safetyOfficer: await addPerson(db, "Saf Ety", "administrator", { isSafetyOfficer: true }),
    administrator: await addPerson(db, "Ad Min", "administrator"),
    coordinator: await addPerson(db, "Co Ord", "coordinator", { authorityId: clearing.id }),
    airCoordinator: await addPerson(db, "Air Co", "coordinator", { authorityId: airUnit.id }),
  };
}

export type Scene = Awaited<ReturnType<typeof makeScene>>;

/** Passes of the invented fragment over the station that rise some hours from now and go high. */
function highPasses(
  station: Scene["station"] | { latitudeDeg: number; longitudeDeg: number; altitudeM: number },
) {
  const row = elementSetRow(88_001, {});
  const made = makeOrbit(elementsOf({ ...row, objectName: row.objectName ?? null, objectId: null }));
  if (!made.ok) throw new Error(made.reason);
  const { site } = makeSiteFrame(station);
  const minElevationRad = (20 * Math.PI) / 180;
  const { passes } = findPasses(made.orbit, [{ site, minElevationRad }], NOW + 6 * HOUR, NOW + 60 * HOUR);
  return passes
    .map(({ pass }) => pass)
    .filter((pass) => pass.setMs - pass.riseMs > 240_000 && pass.maxElevationRad < (80 * Math.PI) / 180);
}

/** A dwell around a pass's culmination, in whole seconds. */
export function dwellIn(pass: { culminateAt: Date }, beforeS = 20, lastsS = 40) {
  const fromMs = Math.floor(pass.culminateAt.getTime() / 1000) * 1000 - beforeS * 1000;
  return { from: new Date(fromMs).toISOString(), to: new Date(fromMs + lastsS * 1000).toISOString() };
}
