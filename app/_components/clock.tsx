"use client";

import { useEffect, useState } from "react";
import { dayOfYear, utcText } from "@/app/_format/utc";

/** From here on a computer's clock is worth a word: passes are planned to the second. */
const SKEW_TO_TELL_MS = 3_000;

/**
 * The time in UTC. The first picture is the server's time; then it runs with
 * this computer's clock, corrected when that is off, and says so.
 */
export function Clock({ nowMs }: { readonly nowMs: number }) {
  const [shownMs, setShownMs] = useState(nowMs);
  const [skewMs, setSkewMs] = useState(0);

  useEffect(() => {
    const skew = skewAtLoad(nowMs);
    const correctionMs = Math.abs(skew) > SKEW_TO_TELL_MS ? skew : 0;
    setSkewMs(correctionMs);
    const tick = () => setShownMs(Date.now() - correctionMs);
    tick();
    const timer = setInterval(tick, 1000);
    return () => clearInterval(timer);
  }, [nowMs]);

  return (
    <p className="text-right text-[1.0625rem] font-medium">
      <time dateTime={new Date(shownMs).toISOString()}>{utcText(shownMs)}</time>
      <span className="figures ml-2 text-[0.8125rem] text-quiet max-sm:hidden">
        day {String(dayOfYear(shownMs)).padStart(3, "0")}
      </span>
      {skewMs === 0 ? null : (
        <span className="block text-[0.8125rem] text-dwell">
          This computer’s clock is {Math.round(Math.abs(skewMs) / 1000)} s {skewMs > 0 ? "fast" : "slow"}; the
          server’s is shown.
        </span>
      )}
    </p>
  );
}

/** How far this computer's clock was ahead when the page arrived; nought where the browser can't tell. */
function skewAtLoad(serverMs: number): number {
  const [entry] = performance.getEntriesByType("navigation");
  if (!(entry instanceof PerformanceNavigationTiming) || entry.responseStart === 0) return 0;
  return performance.timeOrigin + entry.responseStart - serverMs;
}
