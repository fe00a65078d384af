import { sql } from "drizzle-orm";
import { database } from "@/db/client";
import { elementSets, protectedObjects } from "@/db/schema/objects";
import { addFragment, elementSetRow, HOUR, only } from "../world";

/** Sets of these tests carry an epoch six hours before the sweep, unless told otherwise. */
export function epoch(atMs: number): { epochMs: number; epochAt: Date } {
  return { epochMs: atMs, epochAt: new Date(atMs) };
}

/** Some invented fragments around one orbit, spread along it. */
export async function addFragments(count: number, nowMs: number): Promise<string[]> {
  const ids: string[] = [];
  for (let i = 0; i < count; i++) {
    const spread = { meanAnomalyDeg: (i * 67) % 360, raanDeg: 120 + i };
    const fragment = await addFragment(database(), 88_001 + i, { ...spread, ...epoch(nowMs - 6 * HOUR) });
    ids.push(fragment.id);
  }
  return ids;
}

/** A protected object with one set, or with none. */
export async function addGuarded(
  catalogNumber: number,
  objectClass: string,
  set: Partial<typeof elementSets.$inferInsert> | null,
): Promise<string> {
  const values = { name: `Object ${catalogNumber}`, catalogNumber, class: objectClass };
  const object = only(await database().insert(protectedObjects).values(values).returning());
  if (set !== null) {
    const row = elementSetRow(catalogNumber, { protectedObjectId: object.id, ...set });
    await database().insert(elementSets).values(row);
  }
  return object.id;
}

/** Every pass with its crossings, without what differs from run to run: identifiers and times of computation. */
export async function passSnapshot(fromMs: number): Promise<unknown[]> {
  const { rows } = await database().execute(sql`
    select s.name as station, f.catalog_number::int as fragment, p.rise_at, p.culminate_at, p.set_at,
      p.max_elevation_deg, p.rise_azimuth_deg, p.culmination_azimuth_deg, p.set_azimuth_deg, p.min_range_km,
      p.under_way_at_from, p.under_way_at_to, p.vanished_at, p.plan, p.screening_gaps, p.element_set_id,
      p.screened_at is not null as screened,
      (select jsonb_agg(jsonb_build_array(c.protected_object_id, c.from_at, c.to_at, c.min_separation_deg,
          c.half_angle_deg, c.added_deg, c.timing_guard_s) order by c.from_at, c.protected_object_id)
        from beam_crossings c where c.pass_id = p.id) as crossings
    from passes p join stations s on s.id = p.station_id join fragments f on f.id = p.fragment_id
    where p.rise_at >= ${new Date(fromMs).toISOString()}::timestamptz
    order by p.rise_at, station, fragment`);
  return rows;
}
