"use client";

import type { ReactNode } from "react";
import useSWR from "swr";
import { fetchJson } from "@/app/_client/fetch-json";
import { ErrorNote } from "@/app/_components/error-note";
import { Section } from "@/app/_components/section";
import { PassLight, PassSky } from "@/app/_components/sky/pass-sky";
import type { PassSheetBody } from "@/lib/contracts/passes";
import { ClosureList } from "./closure-list";
import { DwellSection } from "./dwell-section";
import { PassHead } from "./pass-head";
import { SamplesTable } from "./samples-table";
import { spanOf } from "./use-judgement";

interface PassSheetViewProps {
  readonly initial: PassSheetBody;
  /** Only planners propose; others read why not. */
  readonly mayPropose: boolean;
  /** The ground track, drawn on the server: the coastline stays there. */
  readonly ground: ReactNode;
}

/** One pass in full: strip, figures, dwell, closures, sky, samples and what it all rests on. */
export function PassSheetView({ initial, mayPropose, ground }: PassSheetViewProps) {
  const { data: sheet = initial, error } = useSWR<PassSheetBody>(`/api/passes/${initial.id}`, fetchJson, {
    fallbackData: initial,
    refreshInterval: 60_000,
    revalidateOnFocus: false,
    revalidateOnMount: false,
  });
  return (
    <div className="grid gap-5">
      <PassHead sheet={sheet} />
      {error ? (
        <ErrorNote error={error} title="The pass could not be read anew; this is the last state known" />
      ) : null}
      <DwellSection sheet={sheet} mayPropose={mayPropose} />
      <div className="grid gap-5 xl:grid-cols-[minmax(0,1fr)_26rem]">
        <Section
          title="What closes it"
          intro="What is closed first, then what is not checked, then what is still awaited."
        >
          <ClosureList closures={sheet.closures} />
        </Section>
        <Section title="Sky">
          <PassSky sheet={sheet} dwell={spanOf(sheet.booked ?? sheet.dwell)} />
        </Section>
      </div>
      <div className="grid gap-5 xl:grid-cols-[minmax(0,1fr)_minmax(0,1fr)]">
        <Section title="Ground track">{ground}</Section>
        <PassLight sheet={sheet} />
      </div>
      <Section
        title="Samples"
        intro={`Every few seconds from rise to set. Worth is the gain in the aim “${sheet.aim}”${sheet.aimUnit ? `, in ${sheet.aimUnit} for each second of lasing` : ""}.`}
        actions={
          <a className="link" href={`/api/passes/${sheet.id}/samples`} download>
            Download as CSV
          </a>
        }
      >
        <SamplesTable sheet={sheet} />
      </Section>
      <Section title="What the figures assume">
        <ul className="grid gap-2">
          {sheet.assumptions.map((a) => (
            <li key={a.text} className="max-w-[80ch]">
              {a.text} <span className="text-quiet">({a.source})</span>
            </li>
          ))}
        </ul>
      </Section>
    </div>
  );
}
