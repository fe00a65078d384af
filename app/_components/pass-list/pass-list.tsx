"use client";

import { usePathname, useRouter, useSearchParams } from "next/navigation";
import { useMemo, useState } from "react";
import useSWR from "swr";
import { fetchJson } from "@/app/_client/fetch-json";
import { Button } from "@/app/_components/button";
import { DataTable } from "@/app/_components/data-table";
import { EmptyState } from "@/app/_components/empty-state";
import { ErrorNote } from "@/app/_components/error-note";
import type { PassBody } from "@/lib/contracts/passes";
import { PASS_COLUMNS } from "./columns";
import { FilterBar } from "./filter-bar";
import { arrange, countText, type PassFilters, passesPath, readFilters, writeFilters } from "./filters";
import { ListSkeleton } from "./list-skeleton";
import { PassBlocks } from "./pass-blocks";

/** Rows drawn at once; more on demand, so that a week of passes does not weigh on the page. */
const STEP = 60;

interface PassListProps {
  /** The server's time at the first render. */
  readonly nowMs: number;
  /** On a fragment's own page: only its passes, over the whole week, without the bar of filters. */
  readonly fragmentId?: string;
  readonly stations: readonly { readonly id: string; readonly name: string }[];
  readonly fragments: readonly { readonly id: string; readonly name: string }[];
}

/** Passes by the filters in the address bar, with what each is worth and what closes it. */
export function PassList({ nowMs, fragmentId, stations, fragments }: PassListProps) {
  const router = useRouter();
  const pathname = usePathname();
  const params = useSearchParams();
  const filters = useMemo((): PassFilters => {
    const read = readFilters(new URLSearchParams(params));
    return fragmentId
      ? { ...read, fragment: fragmentId, station: "", from: "", hours: 168, worthOnly: false }
      : read;
  }, [params, fragmentId]);
  const [shown, setShown] = useState(STEP);
  const { data, error, isLoading, mutate } = useSWR<{ passes: PassBody[] }>(
    passesPath(filters, nowMs),
    fetchJson,
    { keepPreviousData: true, refreshInterval: 60_000, revalidateOnFocus: false },
  );
  const rows = useMemo(() => arrange(data?.passes ?? [], filters), [data, filters]);
  const change = (next: PassFilters): void => {
    setShown(STEP);
    router.replace(`${pathname}${writeFilters(next)}`, { scroll: false });
  };
  return (
    <div className="grid gap-4">
      {fragmentId ? null : (
        <FilterBar
          filters={filters}
          onChange={change}
          stations={stations}
          fragments={fragments}
          nowMs={nowMs}
        />
      )}
      <div className="max-w-[90ch] text-quiet">
        <p role="status">{data ? countText(rows.length, data.passes.length, filters) : "Reading passes …"}</p>
        {rows.length > 0 ? (
          <p className="text-[0.8125rem]">
            Changes by the best dwell that may be proposed now: the median, under it the middle 80 % of
            outcomes (P10 … P90).
          </p>
        ) : null}
      </div>
      {error ? (
        <div className="grid justify-items-start gap-3">
          <ErrorNote error={error} title="The passes could not be read" />
          <Button onClick={() => void mutate()}>Try again</Button>
        </div>
      ) : null}
      {isLoading && !data ? <ListSkeleton /> : null}
      {data && rows.length === 0 ? <NothingHere filters={filters} onChange={change} /> : null}
      {rows.length > 0 ? (
        <div className="min-w-0">
          <div className="hidden md:block">
            <DataTable
              caption="Passes"
              columns={PASS_COLUMNS}
              rows={rows.slice(0, shown)}
              keyOf={(p) => p.id}
            />
          </div>
          <PassBlocks passes={rows.slice(0, shown)} bare={fragmentId !== undefined} className="md:hidden" />
        </div>
      ) : null}
      {rows.length > shown ? (
        <Button className="justify-self-start" onClick={() => setShown(shown + STEP)}>
          Show {Math.min(STEP, rows.length - shown)} more of {rows.length}
        </Button>
      ) : null}
    </div>
  );
}

function NothingHere(props: { readonly filters: PassFilters; readonly onChange: (f: PassFilters) => void }) {
  const { filters, onChange } = props;
  return (
    <EmptyState
      title="No pass in this window"
      action={
        filters.worthOnly ? (
          <Button onClick={() => onChange({ ...filters, worthOnly: false })}>Show closed ones too</Button>
        ) : (
          <Button onClick={() => onChange({ ...filters, hours: 168, station: "", fragment: "", from: "" })}>
            Show the whole week
          </Button>
        )
      }
    >
      {filters.worthOnly
        ? "None of the passes has a stretch that may be lased and lowers the orbit."
        : "No fragment rises over the chosen stations. New element sets or a longer window may bring some."}
    </EmptyState>
  );
}
