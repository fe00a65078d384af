"use client";

import { useMemo } from "react";
import useSWR from "swr";
import { fetchJson } from "@/app/_client/fetch-json";
import type { EngagementBody } from "@/lib/contracts/engagements";
import type { PassBody } from "@/lib/contracts/passes";
import { type CalendarView, spanOfView } from "./calendar-view";
import { offersOf } from "./entries";

/** What the grid draws for a view; keyed by span, station and fragment, so that no span shows another's entries. */
export function useEntries(view: CalendarView) {
  const { fromMs, toMs } = spanOfView(view);
  const span = { from: new Date(fromMs).toISOString(), to: new Date(toMs).toISOString() };
  const station = view.station ? { station: view.station } : {};
  const fragment = view.fragment ? { fragment: view.fragment } : {};
  const options = { keepPreviousData: true, refreshInterval: 30_000, revalidateOnFocus: false };
  const book = useSWR<{ engagements: EngagementBody[] }>(
    `/api/engagements?${new URLSearchParams({ ...span, ...station })}`,
    fetchJson,
    options,
  );
  const sky = useSWR<{ passes: PassBody[] }>(
    `/api/passes?${new URLSearchParams({ ...span, ...station, ...fragment })}`,
    fetchJson,
    { ...options, refreshInterval: 120_000 },
  );
  const offers = useMemo(
    () => offersOf(sky.data?.passes ?? [], view.fragment !== ""),
    [sky.data, view.fragment],
  );
  return {
    engagements: book.data?.engagements ?? [],
    offers,
    reading: !(book.data && sky.data) && !(book.error || sky.error),
    error: (book.error ?? sky.error) as unknown,
    again: async (): Promise<void> => {
      await Promise.all([book.mutate(), sky.mutate()]);
    },
  };
}
