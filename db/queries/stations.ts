import { and, asc, count, eq, gt, inArray, isNull, min } from "drizzle-orm";
import type { Queryable } from "../client";
import { airspaceVolumes, answers, authorities, stationAuthorities } from "../schema/authorities";
import { engagements } from "../schema/engagements";
import { notices } from "../schema/notices";
import { passes } from "../schema/passes";
import { people } from "../schema/people";
import { laserSettings, stations } from "../schema/stations";
import { LIVE_STATES } from "./passes";

/** Every station with every laser setting and authority, by name. */
export async function stationRows(q: Queryable) {
  return {
    stations: await q.select().from(stations).orderBy(asc(stations.name)),
    lasers: await q.select().from(laserSettings).orderBy(asc(laserSettings.name)),
    links: await q
      .select({
        stationId: stationAuthorities.stationId,
        stationName: stations.name,
        authorityId: authorities.id,
        authorityName: authorities.name,
        kind: authorities.kind,
      })
      .from(stationAuthorities)
      .innerJoin(authorities, eq(authorities.id, stationAuthorities.authorityId))
      .innerJoin(stations, eq(stations.id, stationAuthorities.stationId))
      .orderBy(asc(authorities.name), asc(stations.name)),
  };
}

/** Passes of each station that rise from now on: how many, and the first. */
export async function passesAheadByStation(q: Queryable, now: Date) {
  return await q
    .select({ stationId: passes.stationId, count: count(), nextAt: min(passes.riseAt) })
    .from(passes)
    .where(and(gt(passes.riseAt, now), isNull(passes.vanishedAt)))
    .groupBy(passes.stationId);
}

/** Live engagements of each station. */
export async function liveCountByStation(q: Queryable) {
  return await q
    .select({ stationId: engagements.stationId, count: count() })
    .from(engagements)
    .where(inArray(engagements.state, LIVE_STATES))
    .groupBy(engagements.stationId);
}

/** Every authority, with its volumes and the names of its coordinators. */
export async function authorityRows(q: Queryable) {
  return {
    authorities: await q.select().from(authorities).orderBy(asc(authorities.name)),
    volumes: await q
      .select({
        id: airspaceVolumes.id,
        name: airspaceVolumes.name,
        authorityId: airspaceVolumes.authorityId,
      })
      .from(airspaceVolumes)
      .orderBy(asc(airspaceVolumes.name)),
    coordinators: await q
      .select({ name: people.name, authorityId: people.authorityId })
      .from(people)
      .where(and(eq(people.role, "coordinator"), eq(people.active, true)))
      .orderBy(asc(people.name)),
  };
}

/** Requests in force without an answer in force, of live engagements, by authority. */
export async function openNoticeCounts(q: Queryable) {
  return await q
    .select({ authorityId: notices.authorityId, count: count() })
    .from(notices)
    .innerJoin(engagements, eq(engagements.id, notices.engagementId))
    .leftJoin(answers, and(eq(answers.noticeId, notices.id), isNull(answers.voidedAt)))
    .where(
      and(
        inArray(notices.kind, ["request", "revised request"]),
        isNull(notices.supersededAt),
        isNull(answers.id),
        inArray(engagements.state, LIVE_STATES),
      ),
    )
    .groupBy(notices.authorityId);
}
