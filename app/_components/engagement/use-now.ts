"use client";

import { useEffect, useState } from "react";

/** The time by this computer's clock, anew every so often (ms); the server's at first. */
export function useNow(serverNowMs: number, everyMs = 1000): number {
  const [nowMs, setNowMs] = useState(serverNowMs);
  useEffect(() => {
    const tick = (): void => setNowMs(Date.now());
    tick();
    const timer = setInterval(tick, everyMs);
    return () => clearInterval(timer);
  }, [everyMs]);
  return nowMs;
}
