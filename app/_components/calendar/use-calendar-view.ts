"use client";

import { usePathname, useSearchParams } from "next/navigation";
import { useMemo, useSyncExternalStore } from "react";
import { type CalendarView, calendarViewText, readCalendarView } from "./calendar-view";

/** The view in the address bar, with the screen's default filled in, and how to change it. */
export function useCalendarView(nowMs: number) {
  const pathname = usePathname();
  const params = useSearchParams();
  const narrow = useNarrow();
  const view = useMemo(() => {
    const asked = readCalendarView(new URLSearchParams(params), nowMs);
    return { ...asked, show: asked.show ?? (narrow ? ("day" as const) : ("week" as const)) };
  }, [params, nowMs, narrow]);
  // Not by the router: nothing of it needs the server, and the next click must see it at once.
  const change = (next: CalendarView): void =>
    window.history.replaceState(null, "", `${pathname}${calendarViewText(next)}`);
  return { view, change };
}

/** Whether the window is too narrow for a week; the server takes it for wide. */
function useNarrow(): boolean {
  return useSyncExternalStore(
    (changed) => {
      const query = window.matchMedia("(max-width: 47.99rem)");
      query.addEventListener("change", changed);
      return () => query.removeEventListener("change", changed);
    },
    () => window.matchMedia("(max-width: 47.99rem)").matches,
    () => false,
  );
}
