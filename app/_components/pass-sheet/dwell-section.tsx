"use client";

import Link from "next/link";
import { useState } from "react";
import { Button } from "@/app/_components/button";
import { Caution } from "@/app/_components/caution";
import { ErrorNote } from "@/app/_components/error-note";
import { PassStrip } from "@/app/_components/pass-strip/pass-strip";
import { Section } from "@/app/_components/section";
import { StateMark } from "@/app/_components/state-mark";
import { type EngagementState, STATES } from "@/lib/contracts/common";
import type { PassSheetBody } from "@/lib/contracts/passes";
import { DwellEditor } from "./dwell-editor";
import { EffectFigures } from "./effect-figures";
import { ProposeDialog } from "./propose-dialog";
import { type Span, spanOf, useJudgement } from "./use-judgement";

/** The dwell of a pass: what it does, where it lies, how to change it and how to propose it. */
export function DwellSection({
  sheet,
  mayPropose,
}: {
  readonly sheet: PassSheetBody;
  readonly mayPropose: boolean;
}) {
  const offered = spanOf(sheet.booked ?? sheet.dwell);
  const [edited, setEdited] = useState<Span | null>(null);
  const [asking, setAsking] = useState(false);
  const dwell = edited ?? offered;
  const booked = sheet.booked !== null;
  const { judgement, error, isCurrent } = useJudgement(sheet.id, booked || edited === null ? null : dwell);
  const estimate = edited === null ? sheet.estimate : (judgement?.estimate ?? null);
  const first = useJudgement(sheet.id, !booked && edited === null ? offered : null);
  const shown = edited === null ? first.judgement : judgement;
  const refusals = edited === null ? [] : (judgement?.refusals ?? []);
  return (
    <Section
      title={booked ? "The booked dwell" : "The best dwell"}
      intro={booked ? undefined : introOf(sheet)}
    >
      {estimate ? <EffectFigures estimate={estimate} /> : null}
      <div className="mt-4">
        <PassStrip
          size="large"
          riseMs={Date.parse(sheet.riseAt)}
          setMs={Date.parse(sheet.setAt)}
          elevationDeg={sheet.strip.elevationDeg}
          worthPerS={sheet.strip.worthPerS}
          closures={sheet.closures
            .map((c) => ({
              fromMs: Date.parse(c.from),
              toMs: Date.parse(c.to),
              verdict: c.verdict,
              label: c.label,
            }))
            .sort((a, b) => a.fromMs - b.fromMs)}
          dwell={dwell}
          name={`${sheet.fragmentName} over ${sheet.stationName} from ${sheet.riseAt.slice(11, 19)}Z to ${sheet.setAt.slice(11, 19)}Z`}
        />
        <StripLegend />
      </div>
      {booked ? <Booked sheet={sheet} /> : null}
      {!booked && mayPropose && dwell ? (
        <div className="mt-5 grid gap-4">
          <DwellEditor
            dwell={dwell}
            pass={{ fromMs: Date.parse(sheet.riseAt), toMs: Date.parse(sheet.setAt) }}
            onChange={setEdited}
          />
          <div aria-live="polite">
            {error || first.error ? (
              <ErrorNote error={error ?? first.error} title="The dwell could not be judged" />
            ) : null}
            {refusals.length > 0 ? (
              <div className="border-l-4 border-dwell px-3 py-1">
                <p className="font-semibold">This dwell would be refused:</p>
                <ul className="list-disc pl-5">
                  {refusals.map((r) => (
                    <li key={`${r.path} ${r.message}`}>{r.message}</li>
                  ))}
                </ul>
              </div>
            ) : null}
          </div>
          <div className="flex flex-wrap gap-3">
            <Button
              look="solid"
              disabled={shown === null || refusals.length > 0 || (edited !== null && !isCurrent)}
              onClick={() => setAsking(true)}
            >
              Propose this dwell
            </Button>
            <Button disabled={edited === null} onClick={() => setEdited(null)}>
              Reset to best
            </Button>
          </div>
          {shown ? (
            <ProposeDialog
              open={asking}
              onClose={() => setAsking(false)}
              sheet={sheet}
              dwell={dwell}
              judgement={shown}
            />
          ) : null}
        </div>
      ) : null}
      {!booked && !mayPropose ? <p className="mt-4 text-quiet">Planners propose dwells.</p> : null}
      <div className="mt-5">
        <Caution>
          An estimate for planning. It is not a safety stop and not a clearance: follow your laser safety
          officer, your air unit and local codes.
        </Caution>
      </div>
    </Section>
  );
}

function introOf(sheet: PassSheetBody): string {
  if (sheet.dwell === null) return sheet.noDwellReason ?? "No stretch of this pass can be lased.";
  return "The open stretch that gains most in the aim, after acquisition and inside every limit of the station.";
}

function StripLegend() {
  return (
    <p className="mt-1 text-[0.8125rem] text-quiet">
      Line: elevation. Amber: seconds that lower the orbit. Pale, under the line: seconds that would raise it.
      Hatched: closed, not checked or pending. Bar: the dwell.
    </p>
  );
}

function Booked({ sheet }: { readonly sheet: PassSheetBody }) {
  const state = STATES.find((s): s is EngagementState => s === sheet.engagementState);
  return (
    <p className="mt-4 flex flex-wrap items-center gap-3">
      {state ? <StateMark state={state} /> : null}
      <Link prefetch={false} href={`/engagements/${sheet.engagementId}`} className="link">
        Open the engagement that holds this pass
      </Link>
    </p>
  );
}
