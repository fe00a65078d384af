import { database, type Queryable } from "@/db/client";
import {
  engagementCountByFragment,
  fragmentRows,
  lastFiredByFragment,
  newestSetsOfFragments,
  passesAheadByFragment,
  setCountByFragment,
} from "@/db/queries/objects";
import type { FragmentBody } from "@/lib/contracts/fragments";
import type { Actor } from "@/lib/engagement/roles";
import { mustReadBook } from "./must-read-book";
import { newestSetBody } from "./newest-set-body";

/** Every fragment with its body figures, newest element set and what lies ahead. */
export async function listFragments(actor: Actor, nowMs: number): Promise<{ fragments: FragmentBody[] }> {
  mustReadBook(actor);
  return { fragments: await fragmentBodies(database(), nowMs) };
}

/** The list itself, without asking for rights. */
export async function fragmentBodies(q: Queryable, nowMs: number): Promise<FragmentBody[]> {
  const rows = await fragmentRows(q);
  const newest = new Map((await newestSetsOfFragments(q)).map((set) => [set.ownerId, set]));
  const setCounts = new Map((await setCountByFragment(q)).map((row) => [row.fragmentId, row.count]));
  const ahead = new Map((await passesAheadByFragment(q, new Date(nowMs))).map((r) => [r.fragmentId, r]));
  const booked = new Map((await engagementCountByFragment(q)).map((row) => [row.fragmentId, row.count]));
  const fired = new Map((await lastFiredByFragment(q)).map((row) => [row.fragmentId, row.closedAt]));
  return rows.map((row) => {
    const set = newest.get(row.id);
    const passes = ahead.get(row.id);
    const lastFiredAt = fired.get(row.id) ?? null;
    const { createdAt: _createdAt, ...figures } = row;
    return {
      ...figures,
      newestSet: newestSetBody(set, nowMs),
      elementSetCount: setCounts.get(row.id) ?? 0,
      nextPassAt: passes?.nextAt?.toISOString() ?? null,
      passesAhead: passes?.count ?? 0,
      engagementCount: booked.get(row.id) ?? 0,
      lastFiredAt: lastFiredAt?.toISOString() ?? null,
      awaitsNewElements: lastFiredAt !== null && !(set && set.epochAt > lastFiredAt),
    };
  });
}
