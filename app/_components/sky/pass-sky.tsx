"use client";

import useSWR from "swr";
import { fetchJson } from "@/app/_client/fetch-json";
import { ErrorNote } from "@/app/_components/error-note";
import { SkyChart } from "@/app/_components/pass-sheet/sky-chart";
import { Section } from "@/app/_components/section";
import type { PassSkyBody } from "@/lib/contracts/pass-surroundings";
import type { PassSheetBody } from "@/lib/contracts/passes";
import { HorizonMask } from "./horizon-mask";
import { NearTable } from "./near-table";
import { SkyFigures } from "./sky-figures";
import { SkyOverlay } from "./sky-overlay";

function usePassSky(passId: string) {
  return useSWR<PassSkyBody>(`/api/passes/${passId}/sky`, fetchJson, {
    revalidateOnFocus: false,
    refreshInterval: 300_000,
  });
}

interface PassSkyProps {
  readonly sheet: PassSheetBody;
  readonly dwell: { readonly fromMs: number; readonly toMs: number } | null;
}

/** The sky chart with Sun, Moon and near objects; the chart itself doesn't wait for them. */
export function PassSky({ sheet, dwell }: PassSkyProps) {
  const { data: sky } = usePassSky(sheet.id);
  return (
    <SkyChart
      sheet={sheet}
      dwell={dwell}
      overlay={
        <>
          <HorizonMask mask={sheet.station.horizonMask} />
          {sky ? <SkyOverlay sky={sky} /> : null}
        </>
      }
    />
  );
}

/** What stands near the beam, and how it is lit. */
export function PassLight({ sheet }: { readonly sheet: PassSheetBody }) {
  const { data: sky, error } = usePassSky(sheet.id);
  return (
    <Section title="Light, and what comes near the beam">
      {error ? <ErrorNote error={error} title="The sky of this pass could not be worked out" /> : null}
      {sky ? (
        <div className="grid gap-5">
          <SkyFigures sky={sky} />
          <NearTable sky={sky} sheet={sheet} />
        </div>
      ) : error ? null : (
        <p role="status" className="text-quiet">
          Working out the sky …
        </p>
      )}
    </Section>
  );
}
