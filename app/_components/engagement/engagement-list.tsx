"use client";

import { usePathname, useSearchParams } from "next/navigation";
import { useMemo } from "react";
import useSWR from "swr";
import { fetchJson } from "@/app/_client/fetch-json";
import { Button } from "@/app/_components/button";
import { DataTable } from "@/app/_components/data-table";
import { EmptyState } from "@/app/_components/empty-state";
import { ErrorNote } from "@/app/_components/error-note";
import type { EngagementBody } from "@/lib/contracts/engagements";
import { ENGAGEMENT_COLUMNS } from "./engagement-columns";
import { ListFilterBar } from "./list-filter-bar";
import {
  type EngagementFilters,
  engagementFilterText,
  engagementsPath,
  readEngagementFilters,
} from "./list-filters";

interface EngagementListProps {
  /** The server's time at the first render. */
  readonly nowMs: number;
  readonly stations: readonly { readonly id: string; readonly name: string }[];
}

/** Engagements by the filters in the address bar. */
export function EngagementList({ nowMs, stations }: EngagementListProps) {
  const pathname = usePathname();
  const params = useSearchParams();
  const filters = useMemo(() => readEngagementFilters(new URLSearchParams(params)), [params]);
  const { data, error, mutate } = useSWR<{ engagements: EngagementBody[] }>(
    engagementsPath(filters, nowMs),
    fetchJson,
    { keepPreviousData: true, refreshInterval: 30_000 },
  );
  const change = (next: EngagementFilters): void =>
    window.history.replaceState(null, "", `${pathname}${engagementFilterText(next)}`);
  const rows = useMemo(() => {
    const all = [...(data?.engagements ?? [])];
    // What is past is read backwards: the latest first.
    return filters.when === "past" ? all.reverse() : all;
  }, [data, filters.when]);
  return (
    <div className="grid gap-4">
      <ListFilterBar filters={filters} stations={stations} onChange={change} />
      <p role="status" className="text-quiet">
        {data ? `${rows.length} ${rows.length === 1 ? "engagement" : "engagements"}` : "Reading the book …"}
      </p>
      {error ? (
        <div className="grid justify-items-start gap-3">
          <ErrorNote error={error} title="The engagements could not be read" />
          <Button onClick={() => void mutate()}>Try again</Button>
        </div>
      ) : null}
      {rows.length > 0 ? (
        <DataTable caption="Engagements" columns={ENGAGEMENT_COLUMNS} rows={rows} keyOf={(e) => e.id} />
      ) : null}
      {data && rows.length === 0 ? (
        <EmptyState
          title="No engagement here"
          action={
            <Button onClick={() => change({ state: "", station: "", when: "all" })}>
              Show the whole book
            </Button>
          }
        >
          Planners propose dwells from the list of passes or in the calendar.
        </EmptyState>
      ) : null}
    </div>
  );
}
