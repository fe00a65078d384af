"use client";

import { useEffect, useState } from "react";
import useSWR from "swr";
import { fetchJson } from "@/app/_client/fetch-json";
import type { JudgementBody } from "@/lib/contracts/passes";
import type { Span } from "./dwell-time";

export type { Span } from "./dwell-time";

/** Wait after the last change of the dwell before the server is asked, so that a held key asks once. */
const SETTLE_MS = 180;

/** The server's judgement of a dwell that is being edited; the last one stays while the next is on its way. */
export function useJudgement(passId: string, dwell: Span | null) {
  const [settled, setSettled] = useState<Span | null>(dwell);
  useEffect(() => {
    const timer = setTimeout(() => setSettled(dwell), SETTLE_MS);
    return () => clearTimeout(timer);
  }, [dwell]);
  const path =
    settled && settled.fromMs < settled.toMs
      ? `/api/passes/${passId}/judgement?from=${new Date(settled.fromMs).toISOString()}&to=${new Date(settled.toMs).toISOString()}`
      : null;
  const { data, error } = useSWR<JudgementBody>(path, fetchJson, {
    keepPreviousData: true,
    revalidateOnFocus: false,
  });
  const isCurrent =
    data !== undefined &&
    dwell !== null &&
    Date.parse(data.from) === dwell.fromMs &&
    Date.parse(data.to) === dwell.toMs;
  return { judgement: data ?? null, error: error as unknown, isCurrent };
}

/** A span on the wire in milliseconds. */
export function spanOf(body: { readonly from: string; readonly to: string } | null): Span | null {
  return body ? { fromMs: Date.parse(body.from), toMs: Date.parse(body.to) } : null;
}
