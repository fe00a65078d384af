import type { PassBody } from "@/lib/contracts/passes";

const HOUR_MS = 3_600_000;

export const PASS_ORDERS = ["time", "semi-major axis", "perigee"] as const;

/** By rise, or by the greatest drop of the semi-major axis or of the perigee. */
export type PassOrder = (typeof PASS_ORDERS)[number];

/** What the list shows; it lives in the address bar, so that a view can be kept and sent. */
export interface PassFilters {
  readonly station: string;
  readonly fragment: string;
  /** Hours ahead of `from`. */
  readonly hours: number;
  /** Start of the window, ISO with Z; "" is now. */
  readonly from: string;
  readonly worthOnly: boolean;
  readonly sort: PassOrder;
}

export const HOUR_CHOICES = [12, 24, 48, 168] as const;

/** Reads the address; what it cannot read falls back to the default. */
export function readFilters(params: URLSearchParams): PassFilters {
  const hours = Number(params.get("hours"));
  const from = params.get("from") ?? "";
  return {
    station: params.get("station") ?? "",
    fragment: params.get("fragment") ?? "",
    hours: HOUR_CHOICES.find((h) => h === hours) ?? 24,
    from: Number.isFinite(Date.parse(from)) ? from : "",
    worthOnly: params.get("worth") !== "all",
    sort: orderOf(params.get("sort")),
  };
}

/** An order by its name; by rise when there is none of that name. */
export function orderOf(text: string | null): PassOrder {
  return PASS_ORDERS.find((order) => order === text) ?? "time";
}

/** The address of a view; defaults are left out. */
export function writeFilters(filters: PassFilters): string {
  const params = new URLSearchParams();
  if (filters.station) params.set("station", filters.station);
  if (filters.fragment) params.set("fragment", filters.fragment);
  if (filters.hours !== 24) params.set("hours", String(filters.hours));
  if (filters.from) params.set("from", filters.from);
  if (!filters.worthOnly) params.set("worth", "all");
  if (filters.sort !== "time") params.set("sort", filters.sort);
  const text = params.toString();
  return text ? `?${text}` : "";
}

/** The API's address for a view; `nowMs` is rounded down to a minute so that repeated reads share an answer. */
export function passesPath(filters: PassFilters, nowMs: number): string {
  const fromMs = filters.from ? Date.parse(filters.from) : Math.floor(nowMs / 60_000) * 60_000;
  const params = new URLSearchParams({
    from: new Date(fromMs).toISOString(),
    to: new Date(fromMs + filters.hours * HOUR_MS).toISOString(),
  });
  if (filters.station) params.set("station", filters.station);
  if (filters.fragment) params.set("fragment", filters.fragment);
  return `/api/passes?${params}`;
}

/** The passes of a view in its order; those without a dwell come last when sorted by drop. */
export function arrange(passes: readonly PassBody[], filters: PassFilters): PassBody[] {
  const kept = passes.filter((p) => !filters.worthOnly || p.dwell !== null || p.engagementId !== null);
  if (filters.sort === "time") return kept.sort((a, b) => a.riseAt.localeCompare(b.riseAt));
  const field = filters.sort === "perigee" ? "perigeeDropM" : "semiMajorAxisDropM";
  const drop = (p: PassBody): number => p.dwell?.[field] ?? Number.NEGATIVE_INFINITY;
  return kept.sort((a, b) => (drop(a) === drop(b) ? a.riseAt.localeCompare(b.riseAt) : drop(b) - drop(a)));
}

/** How many passes are shown, and how many the filter leaves out. */
export function countText(shown: number, all: number, filters: PassFilters): string {
  const passes = `${shown} ${shown === 1 ? "pass" : "passes"}`;
  const hidden = all - shown;
  if (!filters.worthOnly) return passes;
  const kept = `${passes} worth lasing or booked`;
  return hidden === 0 ? kept : `${kept}; ${hidden} more closed or not worth it`;
}
