"use client";

import { useEffect, useRef } from "react";
import { type CalendarView, spanOfView } from "./calendar-view";

const HOUR_MS = 3_600_000;
const DAY_MS = 24 * HOUR_MS;

/** Room left above the present, in hours of the grid. */
const ABOVE_H = 1;

/**
 * A ref for the grid's scroller: each span that holds the present is opened at
 * the present, once, so that a reader's own scrolling is never undone.
 */
export function useScrollToStart(view: CalendarView, reading: boolean) {
  const scroller = useRef<HTMLElement>(null);
  const { fromMs, toMs } = spanOfView(view);
  const daily = toMs - fromMs >= DAY_MS;
  useEffect(() => {
    if (reading || !daily) return;
    const nowMs = Date.now();
    if (nowMs < fromMs || nowMs >= toMs) return;
    const share = Math.max(0, (nowMs % DAY_MS) - ABOVE_H * HOUR_MS) / DAY_MS;
    // The grid is drawn a moment after its data are there.
    const timer = setTimeout(() => {
      const box = scroller.current;
      if (box) box.scrollTop = share * box.scrollHeight;
    }, 300);
    return () => clearTimeout(timer);
  }, [reading, daily, fromMs, toMs]);
  return scroller;
}
