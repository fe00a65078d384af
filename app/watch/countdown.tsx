"use client";

import { useEffect, useState } from "react";

/** `T−01:23:45` before an instant, `T+00:00:12` after it; days are counted in hours. */
export function countdownText(leftMs: number): string {
  const s = Math.floor(Math.abs(leftMs) / 1000);
  const part = (value: number): string => String(value).padStart(2, "0");
  const sign = leftMs >= 0 ? "\u2212" : "+";
  return `T${sign}${part(Math.floor(s / 3600))}:${part(Math.floor((s % 3600) / 60))}:${part(s % 60)}`;
}

/** The time by this computer's clock, anew each second; the server's at first. */
export function useNow(serverNowMs: number): number {
  const [nowMs, setNowMs] = useState(serverNowMs);
  useEffect(() => {
    const tick = (): void => setNowMs(Date.now());
    tick();
    const timer = setInterval(tick, 1000);
    return () => clearInterval(timer);
  }, []);
  return nowMs;
}
