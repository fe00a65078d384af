import { database } from "@/db/client";
import { findPassRows, type PassFilter } from "@/db/queries/passes";
import { type PassBody, passQuery } from "@/lib/contracts/passes";
import { notAllowed, unreadable } from "@/lib/engagement/refusal";
import { type Actor, may } from "@/lib/engagement/roles";
import { loadFactBook } from "./fact-book";
import { passBody } from "./pass-body";
import { planOffers } from "./plan-offers";
import { readQuery } from "./read-input";

/** Without a span, the passes of the coming week: as far as the sweep looks. */
const DEFAULT_SPAN_MS = 7 * 86_400_000;

/** How long a list may work on passes whose plans no longer fit, ms. */
const LIST_BUDGET_MS = 400;

/**
 * Every pass that matches, by rise, with its closures, openings and best dwell of now. Planners, operators
 * and administrators see all; a coordinator sees the passes that his authority has notices about.
 */
export async function searchPasses(
  actor: Actor,
  query: unknown,
  nowMs: number,
): Promise<{ passes: PassBody[] }> {
  const noticedAuthorityId = noticedOnly(actor);
  const filter = readFilter(query, nowMs);
  const q = database();
  const rows = await findPassRows(q, { ...filter, noticedAuthorityId });
  if (rows.length === 0) return { passes: [] };
  const book = await loadFactBook(q, rows);
  const offered = await planOffers(q, book, rows, { nowMs, budgetMs: LIST_BUDGET_MS });
  return { passes: offered.map(passBody) };
}

/** The authority whose notices bound what the actor sees; undefined when nothing does. Throws a 403. */
export function noticedOnly(actor: Actor): string | undefined {
  if (may(actor, "search passes")) return undefined;
  if (may(actor, "see own notices") && actor.authorityId !== null) return actor.authorityId;
  throw notAllowed("search passes");
}

function readFilter(query: unknown, nowMs: number): PassFilter {
  const { station, fragment, from, to } = readQuery(passQuery, query);
  const fromMs = from ? Date.parse(from) : nowMs;
  const toMs = to ? Date.parse(to) : fromMs + DEFAULT_SPAN_MS;
  if (!(fromMs < toMs)) {
    throw unreadable("The query does not have the expected form.", [
      { path: "to", message: "the end must lie after the beginning" },
    ]);
  }
  return { stationId: station, fragmentId: fragment, from: new Date(fromMs), to: new Date(toMs) };
}
