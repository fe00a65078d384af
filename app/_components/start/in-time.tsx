"use client";

import { useEffect, useState } from "react";
import { untilText } from "./until-text";

/** `in 42 min`, kept true while the page stands; the first picture is the server's. */
export function InTime({ atMs, nowMs }: { readonly atMs: number; readonly nowMs: number }) {
  const [leftMs, setLeftMs] = useState(atMs - nowMs);
  useEffect(() => {
    const startedAt = performance.now();
    const timer = setInterval(() => setLeftMs(atMs - nowMs - (performance.now() - startedAt)), 5000);
    return () => clearInterval(timer);
  }, [atMs, nowMs]);
  return untilText(leftMs);
}
