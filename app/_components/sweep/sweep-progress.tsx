"use client";

import { useEffect, useRef } from "react";
import useSWR from "swr";
import { fetchJson } from "@/app/_client/fetch-json";
import { ErrorNote } from "@/app/_components/error-note";
import { numberText } from "@/app/_format/figures";
import type { SweepBody } from "@/lib/contracts/sweeps";

/** How far a sweep is, until it is done; then what it found, and what it could not work out. */
export function SweepProgress(props: { readonly sweepId: string; readonly onDone?: () => void }) {
  const { data, error } = useSWR<SweepBody>(`/api/sweeps/${props.sweepId}`, fetchJson, {
    refreshInterval: (latest) => (latest && latest.state !== "running" ? 0 : 1500),
  });
  const told = useRef(false);
  const { onDone } = props;
  useEffect(() => {
    if (data?.state === "done" && !told.current) {
      told.current = true;
      onDone?.();
    }
  }, [data?.state, onDone]);
  if (error) return <ErrorNote error={error} title="The progress of the sweep could not be read" />;
  if (!data) return <p role="status">Reading the progress of the sweep …</p>;
  return <SweepBar sweep={data} />;
}

/** One sweep as a bar with its words. */
export function SweepBar({ sweep }: { readonly sweep: SweepBody }) {
  const { total, done, failed } = sweep.fragments;
  return (
    <div>
      <p role="status">{wordsOf(sweep)}</p>
      <progress
        className="mt-2 h-2 w-full max-w-xl accent-(--dwell)"
        max={Math.max(1, total)}
        value={done + failed}
        aria-label="Fragments swept"
      />
      {sweep.failures.length > 0 ? (
        <ul className="mt-2 list-disc pl-5 text-[0.875rem]">
          {sweep.failures.map((f) => (
            <li key={`${f.fragmentId} ${f.message}`}>
              {f.fragmentName}: {f.message}
            </li>
          ))}
        </ul>
      ) : null}
    </div>
  );
}

function wordsOf(sweep: SweepBody): string {
  const { total, done, failed } = sweep.fragments;
  const passes = `${numberText(sweep.passCount)} ${sweep.passCount === 1 ? "pass" : "passes"}`;
  const lost = failed > 0 ? `, ${failed} could not be worked out` : "";
  if (sweep.state === "cancelled") return `The sweep was cancelled after ${done} of ${total} fragments.`;
  if (sweep.state === "done")
    return `Swept ${done} of ${total} fragments over all stations: ${passes} in seven days${lost}.`;
  return `Sweeping: ${done} of ${total} fragments, ${passes} so far${lost}.`;
}
