import { holdImports, protectedWithNewestSet } from "@/db/queries/element-sets";
import { stationsWithLaser } from "@/db/queries/facts";
import { inTransaction } from "@/db/transaction";
import { DEG } from "@/lib/physics/constants";
import { makeSiteFrame, type SiteFrame } from "@/lib/physics/frames/earth";
import { makeOrbit, type Orbit } from "@/lib/physics/orbit/propagate";
import type { PassStation } from "@/lib/physics/passes/find-passes";
import { halfAngleOf, protectedClassNamed } from "@/lib/planning/keep-out";
import { elementsOf, siteOf } from "./domain-rows";

/** A station that passes are searched for. */
export interface SweepStation extends PassStation {
  readonly id: string;
  readonly name: string;
  readonly laserSettingId: string;
  readonly frame: SiteFrame;
}

/** A protected object that can be screened against: its newest element set as an orbit. */
export interface Guarded {
  readonly id: string;
  readonly elementSetId: string;
  readonly epochMs: number;
  readonly halfAngleDeg: number;
  readonly orbit: Orbit;
}

/** What every fragment of a chunk is worked out against. */
export interface SweepGround {
  readonly stations: readonly SweepStation[];
  /** One sentence for each station that can't be searched for. */
  readonly idle: readonly string[];
  readonly guarded: readonly Guarded[];
  /** Protected objects without any usable element set, by id. */
  readonly blind: readonly string[];
  /** Everything imported up to here was read. */
  readonly readAt: Date;
}

/** Reads stations and the whole protected catalogue, at one moment between two imports. */
export async function readGround(): Promise<SweepGround> {
  return inTransaction(async (tx) => {
    const now = await holdImports(tx);
    const rows = await stationsWithLaser(tx, null);
    const protectedRows = await protectedWithNewestSet(tx);
    const stations: SweepStation[] = [];
    const idle: string[] = [];
    for (const { station, laser } of rows) {
      const { id, name } = station;
      if (!laser) {
        idle.push(`${name} has no active laser setting, so no passes over it were searched for.`);
        continue;
      }
      const site = siteOf(station);
      const minElevationRad = station.minElevationDeg * DEG;
      stations.push({
        id,
        name,
        site,
        minElevationRad,
        laserSettingId: laser.id,
        frame: makeSiteFrame(site),
      });
    }
    const guarded: Guarded[] = [];
    const blind: string[] = [];
    for (const row of protectedRows) {
      const seen = guardedOf(row);
      if (seen) guarded.push(seen);
      else blind.push(row.object.id);
    }
    // The column keeps milliseconds, rounded: a moment earlier, an import right after is surely later.
    return { stations, idle, guarded, blind, readAt: new Date(now.getTime() - 1) };
  });
}

/** The object as it is screened against; null when it has no set, or SGP4 refuses its newest one. */
function guardedOf(row: Awaited<ReturnType<typeof protectedWithNewestSet>>[number]): Guarded | null {
  const { object, set } = row;
  const made = set ? makeOrbit(elementsOf(set)) : null;
  if (!set || !made?.ok) return null;
  // The table admits the four classes only; anything else would get the widest cone.
  const halfAngleDeg = halfAngleOf(protectedClassNamed(object.class) ?? "crewed", object.halfAngleDeg);
  return { id: object.id, elementSetId: set.id, epochMs: set.epochMs, halfAngleDeg, orbit: made.orbit };
}
