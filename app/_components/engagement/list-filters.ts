import { type EngagementState, STATES } from "@/lib/engagement/states";

const DAY_MS = 86_400_000;

/** What the list shows; it lives in the address bar, so that a view can be kept and sent. */
export interface EngagementFilters {
  /** "" is every state, "live" what still holds its time. */
  readonly state: EngagementState | "live" | "";
  readonly station: string;
  readonly when: When;
}

export const WHENS = ["ahead", "today", "past", "all"] as const;
export type When = (typeof WHENS)[number];

/** Reads the address; what it cannot read falls back to the default. */
export function readEngagementFilters(params: URLSearchParams): EngagementFilters {
  const state = params.get("state") ?? "";
  const station = params.get("station") ?? "";
  return {
    state: state === "live" ? "live" : (STATES.find((s) => s === state) ?? ""),
    station: /^[0-9a-f-]{36}$/i.test(station) ? station : "",
    when: WHENS.find((w) => w === params.get("when")) ?? "ahead",
  };
}

/** The address of a view; defaults are left out. */
export function engagementFilterText(filters: EngagementFilters): string {
  const params = new URLSearchParams();
  if (filters.state) params.set("state", filters.state);
  if (filters.station) params.set("station", filters.station);
  if (filters.when !== "ahead") params.set("when", filters.when);
  const text = params.toString();
  return text ? `?${text}` : "";
}

/** The API's address for a view. A dwell under way counts as ahead. */
export function engagementsPath(filters: EngagementFilters, nowMs: number): string {
  const params = new URLSearchParams();
  if (filters.station) params.set("station", filters.station);
  if (filters.state)
    params.set("state", filters.state === "live" ? "proposed,cleared,confirmed" : filters.state);
  const midnightMs = Math.floor(nowMs / DAY_MS) * DAY_MS;
  const set = (name: "from" | "to", ms: number): void => params.set(name, new Date(ms).toISOString());
  if (filters.when === "ahead") set("from", Math.floor(nowMs / 60_000) * 60_000);
  if (filters.when === "past") set("to", Math.floor(nowMs / 60_000) * 60_000);
  if (filters.when === "today") {
    set("from", midnightMs);
    set("to", midnightMs + DAY_MS);
  }
  return `/api/engagements?${params}`;
}
