import type { Queryable } from "@/db/client";
import { authorities, stationAuthorities } from "@/db/schema/authorities";
import { elementSets, fragments, protectedObjects } from "@/db/schema/objects";
import { passes } from "@/db/schema/passes";
import { people } from "@/db/schema/people";
import { laserSettings, stations } from "@/db/schema/stations";
import type { Actor } from "@/lib/engagement/roles";

/** The invented world of the book's tests: everything in it was made up for them. */
export const NOW = Date.UTC(2031, 3, 6);
export const HOUR = 3_600_000;

/** The only row of an insert; a test without it has no ground. */
export function only<T>(rows: readonly T[]): T {
  const [row] = rows;
  if (row === undefined) throw new Error("the insert gave no row");
  return row;
}

export type StationRow = typeof stations.$inferSelect;
export type FragmentRow = typeof fragments.$inferSelect;
export type AuthorityRow = typeof authorities.$inferSelect;

/** A station with one active laser setting. */
export async function addStation(
  q: Queryable,
  name: string,
  amend: Partial<typeof stations.$inferInsert> = {},
): Promise<StationRow & { laserSettingId: string }> {
  const station = only(
    await q
      .insert(stations)
      .values({
        name,
        latitudeDeg: 46.5,
        longitudeDeg: 8.2,
        altitudeM: 1400,
        timeZone: "Europe/Zurich",
        minElevationDeg: 20,
        maxElevationDeg: 88,
        openingHours: [{ fromMin: 0, toMin: 1440 }],
        acquisitionS: 30,
        guardS: 2,
        slewS: 60,
        coolDownS: 120,
        minDwellS: 10,
        maxDwellS: 240,
        elementAgeLimitH: 72,
        ...amend,
      })
      .returning(),
  );
  const laser = only(
    await q
      .insert(laserSettings)
      .values({
        stationId: station.id,
        name: "Survey head",
        mode: "pulsed",
        wavelengthNm: 1064,
        pulseEnergyJ: 20_000,
        pulseWidthNs: 5,
        repetitionRateHz: 10,
        apertureM: 8,
        beamQuality: 1.5,
        zenithTransmission: 0.8,
        strehl: 0.6,
        jitterUrad: 0.1,
        spotConvention: "gaussian",
        wallPlugEfficiency: 0.1,
      })
      .returning(),
  );
  return { ...station, laserSettingId: laser.id };
}

/** A fragment with one element set, at 14.4 revolutions a day. */
export async function addFragment(
  q: Queryable,
  catalogNumber: number,
  amend: Partial<typeof elementSets.$inferInsert> = {},
): Promise<FragmentRow & { elementSetId: string }> {
  const fragment = only(
    await q
      .insert(fragments)
      .values({
        name: `Fragment ${catalogNumber}`,
        catalogNumber,
        massKg: 0.8,
        areaM2: 0.02,
        material: "aluminium",
        shape: "plate",
        bodySource: "invented for a test",
      })
      .returning(),
  );
  const set = only(
    await q
      .insert(elementSets)
      .values(elementSetRow(catalogNumber, { fragmentId: fragment.id, ...amend }))
      .returning(),
  );
  return { ...fragment, elementSetId: set.id };
}

/** A protected object with one element set. */
export async function addProtected(
  q: Queryable,
  catalogNumber: number,
  objectClass: string,
): Promise<string> {
  const object = only(
    await q
      .insert(protectedObjects)
      .values({ name: `Object ${catalogNumber}`, catalogNumber, class: objectClass })
      .returning(),
  );
  const set = elementSetRow(catalogNumber, { protectedObjectId: object.id, inclinationDeg: 51.6 });
  await q.insert(elementSets).values(set);
  return object.id;
}

export function elementSetRow(
  catalogNumber: number,
  amend: Partial<typeof elementSets.$inferInsert>,
): typeof elementSets.$inferInsert {
  const epochMs = NOW - 6 * HOUR;
  return {
    catalogNumber,
    objectName: `Object ${catalogNumber}`,
    epochAt: new Date(epochMs),
    epochMs,
    meanMotionRevPerDay: 14.4,
    eccentricity: 0.004,
    inclinationDeg: 74,
    raanDeg: 120,
    argPericenterDeg: 80,
    meanAnomalyDeg: 20,
    bstar: 0.0002,
    meanMotionDot: 0.000_01,
    meanMotionDdot: 0,
    format: "omm-json",
    raw: "invented for a test",
    source: "test",
    ...amend,
  };
}

export interface PassPlace {
  readonly stationId: string;
  readonly laserSettingId: string;
  readonly fragmentId: string;
  readonly elementSetId: string;
}

/** A pass row; times are free, for tests that need no geometry. */
export async function addPass(
  q: Queryable,
  place: PassPlace,
  riseMs: number,
  setMs: number,
  amend: Partial<typeof passes.$inferInsert> = {},
): Promise<typeof passes.$inferSelect> {
  return only(
    await q
      .insert(passes)
      .values({
        ...place,
        riseAt: new Date(riseMs),
        culminateAt: new Date((riseMs + setMs) / 2),
        setAt: new Date(setMs),
        maxElevationDeg: 60,
        riseAzimuthDeg: 200,
        culminationAzimuthDeg: 290,
        setAzimuthDeg: 10,
        minRangeKm: 800,
        underWayAtFrom: false,
        underWayAtTo: false,
        screenedAt: new Date(NOW),
        ...amend,
      })
      .returning(),
  );
}

/** An authority that every engagement of the station concerns, when a station is given. */
export async function addAuthority(
  q: Queryable,
  name: string,
  stationId: string | null,
  amend: Partial<typeof authorities.$inferInsert> = {},
): Promise<AuthorityRow> {
  const authority = only(
    await q
      .insert(authorities)
      .values({
        name,
        kind: "clearing authority",
        email: `${name.toLowerCase().replaceAll(" ", ".")}@example.invalid`,
        phone: "+00 000 0000",
        dutyHours: "08:00–16:00",
        timeZone: "Europe/Zurich",
        leadTimeMin: 30,
        changeDeadlineMin: 20,
        ...amend,
      })
      .returning(),
  );
  if (stationId !== null) await q.insert(stationAuthorities).values({ stationId, authorityId: authority.id });
  return authority;
}

type PersonActor = Actor & { readonly id: string };

/** A person, as the actor that a sign-in would give. */
export async function addPerson(
  q: Queryable,
  name: string,
  role: "planner" | "operator" | "coordinator" | "administrator",
  more: { authorityId?: string; isSafetyOfficer?: boolean } = {},
): Promise<PersonActor> {
  const email = `${name.toLowerCase().replaceAll(" ", ".")}@example.invalid`;
  const authorityId = more.authorityId ?? null;
  const isSafetyOfficer = more.isSafetyOfficer ?? false;
  const row = only(
    await q
      .insert(people)
      .values({ name, email, role, passwordHash: "none", authorityId, isSafetyOfficer })
      .returning(),
  );
  return { id: row.id, name, role, authorityId, isSafetyOfficer, via: "screen" };
}
