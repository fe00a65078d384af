import { eq } from "drizzle-orm";
import { database, type Queryable } from "@/db/client";
import { airspaceVolumes } from "@/db/schema/authorities";
import { elementSets } from "@/db/schema/objects";
import { beamCrossings } from "@/db/schema/passes";
import { DEG } from "@/lib/physics/constants";
import { makeOrbit } from "@/lib/physics/orbit/propagate";
import { findPasses } from "@/lib/physics/passes/find-passes";
import { elementsOf, siteOf } from "@/lib/services/domain-rows";
import { replanPasses } from "@/lib/services/replan-passes";
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

const FRAGMENTS = 4;

/**
 * An invented sky: two stations, fragments on orbits of their own with their real passes of two days, one
 * clearing desk, a volume that an air unit may lift and one that nobody may, and protected objects.
 */
export async function makeSky() {
  const db = database();
  const alder = await addStation(db, "Alder Point", { maxElevationDeg: 75 });
  const brine = await addStation(db, "Brine Flat", {
    latitudeDeg: -24.1,
    longitudeDeg: 133.4,
    timeZone: "Australia/Darwin",
    openingHours: [{ fromMin: 9 * 60, toMin: 3 * 60 }],
  });
  const crewedId = await addProtected(db, 70_001, "crewed");
  const payloadId = await addProtected(db, 70_002, "payload");
  const desk = await addAuthority(db, "Tessel Clearing Desk", alder.id);
  const airUnit = await addAuthority(db, "Brume Air Unit", null, { kind: "air unit", leadTimeMin: 45 });
  await addVolumes(db, airUnit.id);
  const passIds: string[] = [];
  for (let i = 0; i < FRAGMENTS; i++) passIds.push(...(await addFragmentPasses(db, i, [alder, brine])));
  await replanPasses(db, passIds, NOW);
  return {
    alder,
    brine,
    desk,
    airUnit,
    crewedId,
    payloadId,
    passIds,
    planner: await addPerson(db, "Plan Ner", "planner"),
    operator: await addPerson(db, "Op One", "operator"),
    coordinator: await addPerson(db, "Co Ord", "coordinator", { authorityId: desk.id }),
  };
}

export type Sky = Awaited<ReturnType<typeof makeSky>>;

type Station = Awaited<ReturnType<typeof addStation>>;

/** Fragment number i with its passes over the stations, found as a sweep finds them. */
async function addFragmentPasses(db: Queryable, i: number, stations: readonly Station[]): Promise<string[]> {
  const orbit = {
    meanMotionRevPerDay: 13.9 + 0.13 * i,
    inclinationDeg: 62 + 7 * i,
    raanDeg: (57 * i) % 360,
    meanAnomalyDeg: (101 * i) % 360,
    eccentricity: 0.002 + 0.002 * i,
  };
  const catalogNumber = 88_001 + i;
  const fragment = await addFragment(db, catalogNumber, orbit);
  const row = elementSetRow(catalogNumber, orbit);
  const made = makeOrbit(elementsOf({ ...row, objectName: null, objectId: null }));
  if (!made.ok) throw new Error(made.reason);
  const sites = stations.map((s) => ({ site: siteOf(s), minElevationRad: s.minElevationDeg * DEG }));
  const { passes } = findPasses(made.orbit, sites, NOW, NOW + 48 * HOUR);
  const ids: string[] = [];
  for (const { stationIndex, pass } of passes) {
    const station = stations[stationIndex];
    if (!station) throw new Error("a pass over no station");
    const place = {
      stationId: station.id,
      laserSettingId: station.laserSettingId,
      fragmentId: fragment.id,
      elementSetId: fragment.elementSetId,
    };
    const stored = await addPass(db, place, pass.riseMs, pass.setMs, {
      culminateAt: new Date(pass.culminateMs),
      maxElevationDeg: pass.maxElevationRad / DEG,
      minRangeKm: pass.minRangeKm,
    });
    ids.push(stored.id);
  }
  return ids;
}

/** A liftable volume east of Alder Point that sleeps at night, and one over it that nothing lifts. */
async function addVolumes(db: Queryable, authorityId: string): Promise<void> {
  const day = 24 * HOUR;
  const spans = [0, 1, 2].map((n) => ({
    from: new Date(NOW + n * day + 5 * HOUR).toISOString(),
    to: new Date(NOW + n * day + 21 * HOUR).toISOString(),
  }));
  const common = { activeSpans: spans, scheduleKnownUntil: new Date(NOW + 3 * day), source: "test" };
  await db.insert(airspaceVolumes).values([
    {
      ...common,
      name: "Brume east",
      authorityId,
      ring: box(8.35, 46.5, 0.1, 0.4),
      floorText: "FL 100",
      ceilingText: "FL 300",
      floorM: 3048,
      ceilingM: 9144,
      liftable: true,
    },
    {
      ...common,
      name: "Alder range",
      ring: box(8.2, 46.6, 0.05, 0.06),
      floorText: "SFC",
      ceilingText: "FL 250",
      floorM: 0,
      ceilingM: 7620,
      liftable: false,
    },
  ]);
}

function box(longitudeDeg: number, latitudeDeg: number, halfWidth: number, halfHeight: number) {
  const [w, e, s, n] = [
    longitudeDeg - halfWidth,
    longitudeDeg + halfWidth,
    latitudeDeg - halfHeight,
    latitudeDeg + halfHeight,
  ];
  const ring: [number, number][] = [
    [w, s],
    [e, s],
    [e, n],
    [w, n],
    [w, s],
  ];
  return ring;
}

/** Puts a protected object in the way of a pass's offered dwell. */
export async function cross(passId: string, objectId: string, from: Date, to: Date): Promise<void> {
  const db = database();
  const [set] = await db.select().from(elementSets).where(eq(elementSets.protectedObjectId, objectId));
  if (!set) throw new Error("the protected object has no element set");
  await db.insert(beamCrossings).values({
    passId,
    protectedObjectId: objectId,
    elementSetId: set.id,
    fromAt: from,
    toAt: to,
    minSeparationDeg: 0.8,
    halfAngleDeg: 1,
    addedDeg: 0.2,
    timingGuardS: 2,
  });
}
