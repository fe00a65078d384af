import { desc, isNotNull, sql } from "drizzle-orm";
import { closePool, database } from "@/db/client";
import { elementSets } from "@/db/schema/objects";
import { people } from "@/db/schema/people";
import { inTransaction } from "@/db/transaction";
import { inventBreakUp } from "./break-up";
import { fillBodies } from "./fill-bodies";
import { actorOf, fillPeople, hasAccess, renewAccess, writeAccess } from "./fill-people";
import { extendSchedules, fillStations } from "./fill-stations";
import { importFragments, importProtected } from "./import-orbits";
import { inventProtected } from "./protected";
import { bookComing } from "./story-coming";
import { bookPast } from "./story-past";
import { sweepHere } from "./sweep-here";

const HOUR_MS = 3_600_000;
const say = (words: string): void => console.log(words);

/** A demo whose newest element sets are older than this gets fresh ones at the next start. */
const STALE_MS = 8 * HOUR_MS;

/** The past needs few fragments; the coming week sweeps them all. */
const PAST_FRAGMENTS = 14;

const PLANNER = "ines@dwellbook.invalid";

/** Fills an empty database with the invented demo; brings an older demo up to date. */
async function main(): Promise<void> {
  const nowMs = Date.now();
  const [count] = await database().select({ people: sql<number>`count(*)::int` }).from(people);
  if (count?.people === 0) await fillAll(nowMs);
  else await refresh(nowMs);
}

async function fillAll(nowMs: number): Promise<void> {
  say("inventing stations, authorities and people");
  const access = await inTransaction(async (tx) => fillPeople(tx, await fillStations(tx, nowMs)));
  await writeAccess(access);
  const planner = await actorOf(database(), PLANNER);
  const fragments = inventBreakUp();
  // Two days back first, so that the demo has a past: objects with a history, and passes that were booked.
  const pastMs = nowMs - 50 * HOUR_MS;
  say("importing element sets of some three hundred protected objects and forty fragments");
  await importProtected(planner, inventProtected(), pastMs - HOUR_MS, pastMs);
  const past = await importFragments(planner, fragments.slice(0, PAST_FRAGMENTS), pastMs - HOUR_MS, pastMs);
  await inTransaction((tx) => fillBodies(tx, fragments.slice(0, PAST_FRAGMENTS)));
  say("sweeping passes of the last two days");
  if (past) await sweepHere(past, pastMs);
  await bookPast(pastMs, nowMs);
  say("importing today's element sets and sweeping the coming week");
  await importProtected(planner, inventProtected(), nowMs - HOUR_MS, nowMs);
  const fresh = await importFragments(planner, fragments, nowMs - HOUR_MS, nowMs);
  await inTransaction((tx) => fillBodies(tx, fragments.slice(PAST_FRAGMENTS)));
  if (fresh) await sweepHere(fresh, nowMs);
  await bookComing(nowMs);
  say("the demo is filled");
}

async function refresh(nowMs: number): Promise<void> {
  if (!(await hasAccess())) await writeAccess(await inTransaction((tx) => renewAccess(tx)));
  await inTransaction((tx) => extendSchedules(tx, nowMs));
  const [newest] = await database()
    .select({ epochAt: elementSets.epochAt })
    .from(elementSets)
    .where(isNotNull(elementSets.protectedObjectId))
    .orderBy(desc(elementSets.epochAt))
    .limit(1);
  if (newest && nowMs - newest.epochAt.getTime() < STALE_MS) return say("the demo is fresh");
  say("adding fresh element sets to the demo; the workers sweep it");
  const planner = await actorOf(database(), PLANNER);
  await importProtected(planner, inventProtected(), nowMs - HOUR_MS, nowMs);
  await importFragments(planner, inventBreakUp(), nowMs - HOUR_MS, nowMs);
}

try {
  await main();
} catch (error) {
  console.error(error instanceof Error ? (error.stack ?? error.message) : error);
  process.exitCode = 1;
} finally {
  await closePool();
}
