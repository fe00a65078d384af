const DAY_MS = 86_400_000;
const HOUR_MS = 3_600_000;

export const ZOOMS = [24, 6, 1] as const;
/** Hours that a day's view shows. */
export type Zoom = (typeof ZOOMS)[number];

/** What the calendar shows; it lives in the address bar. */
export interface CalendarView {
  /** null: week where there is room, day on a narrow screen. */
  readonly show: "week" | "day" | "list" | null;
  /** First instant shown: a midnight, or a window's start with a zoom. Unix ms. */
  readonly atMs: number;
  readonly zoom: Zoom;
  readonly station: string;
  readonly fragment: string;
}

/** Reads the address; what it cannot read falls back to now. */
export function readCalendarView(params: URLSearchParams, nowMs: number): CalendarView {
  const show = params.get("show");
  const zoom = ZOOMS.find((z) => String(z) === params.get("zoom")) ?? 24;
  const at = Date.parse(params.get("at") ?? "");
  const year = Number.isFinite(at) ? new Date(at).getUTCFullYear() : 0;
  const id = (name: string): string => {
    const value = params.get(name) ?? "";
    return /^[0-9a-f-]{36}$/i.test(value) ? value : "";
  };
  return {
    show: show === "week" || show === "day" || show === "list" ? show : null,
    atMs: alignTo(zoom, year > 1970 && year < 2200 ? at : nowMs),
    zoom,
    station: id("station"),
    fragment: id("fragment"),
  };
}

/** The address of a view; defaults are left out. */
export function calendarViewText(view: CalendarView): string {
  const params = new URLSearchParams();
  if (view.show) params.set("show", view.show);
  params.set("at", `${new Date(view.atMs).toISOString().slice(0, 16)}Z`);
  if (view.zoom !== 24) params.set("zoom", String(view.zoom));
  if (view.station) params.set("station", view.station);
  if (view.fragment) params.set("fragment", view.fragment);
  return `?${params}`;
}

/** Windows lie on multiples of their length, so that none runs over midnight. */
export function alignTo(zoom: Zoom, atMs: number): number {
  const step = zoom * HOUR_MS;
  return Math.floor(atMs / step) * step;
}

/** The span on show. A week begins on the day that was chosen. */
export function spanOfView(view: CalendarView): { readonly fromMs: number; readonly toMs: number } {
  if (view.show === "day") return { fromMs: view.atMs, toMs: view.atMs + view.zoom * HOUR_MS };
  const fromMs = alignTo(24, view.atMs);
  return { fromMs, toMs: fromMs + 7 * DAY_MS };
}

/** The view one step earlier or later: a week, a day, or a zoomed window. */
export function stepView(view: CalendarView, steps: number): CalendarView {
  const { fromMs, toMs } = spanOfView(view);
  return { ...view, atMs: fromMs + steps * (toMs - fromMs) };
}

/** The span in words: `2031-04-06`, with hours where it is shorter than a day. */
export function spanWords(view: CalendarView): string {
  const { fromMs, toMs } = spanOfView(view);
  const [from, to] = [new Date(fromMs).toISOString(), new Date(toMs - 1).toISOString()];
  if (toMs - fromMs > DAY_MS) return `${from.slice(0, 10)} to ${to.slice(0, 10)}`;
  const weekday = new Intl.DateTimeFormat("en-GB", { weekday: "long", timeZone: "UTC" }).format(fromMs);
  if (toMs - fromMs === DAY_MS) return `${weekday} ${from.slice(0, 10)}`;
  const end = new Date(toMs).toISOString().slice(11, 16);
  return `${weekday} ${from.slice(0, 10)}, ${from.slice(11, 16)}Z to ${end === "00:00" ? "24:00" : end}Z`;
}
