"use client";

import Link from "next/link";
import { useState } from "react";
import { Button } from "@/app/_components/button";
import { Caution } from "@/app/_components/caution";
import { ErrorNote } from "@/app/_components/error-note";
import { Section } from "@/app/_components/section";
import { StateMark } from "@/app/_components/state-mark";
import type { PassSheetBody } from "@/lib/contracts/passes";
import { type EngagementState, STATES } from "@/lib/engagement/states";
import { DwellEditor } from "./dwell-editor";
import { DwellStrip } from "./dwell-strip";
import type { Span } from "./dwell-time";
import { EffectFigures } from "./effect-figures";
import { ProposeDialog } from "./propose-dialog";
import { spanOf, useJudgement } from "./use-judgement";

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
  // Until the first answer about a changed dwell is here, the best one's figures keep their place, dimmed.
  const estimate = edited === null || judgement === null ? sheet.estimate : judgement.estimate;
  const working = edited !== null && !isCurrent && !error;
  const first = useJudgement(sheet.id, !booked && edited === null ? offered : null);
  const shown = edited === null ? first.judgement : judgement;
  const refusals = edited === null ? [] : (judgement?.refusals ?? []);
  return (
    <Section title={titleOf(booked, dwell, edited)} intro={booked ? undefined : introOf(sheet, edited)}>
      <div className={working ? "opacity-50" : ""} aria-busy={working}>
        {estimate ? <EffectFigures estimate={estimate} /> : null}
      </div>
      <p role="status" className="text-[0.8125rem] text-quiet">
        {working ? "Working out the dwell as you set it …" : ""}
      </p>
      <DwellStrip sheet={sheet} dwell={dwell} onChange={!booked && mayPropose ? setEdited : null} />
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
      {!booked && !mayPropose ? <p className="mt-4 text-quiet">Only planners propose dwells.</p> : null}
      <Caution />
    </Section>
  );
}

function titleOf(booked: boolean, dwell: Span | null, edited: Span | null): string {
  if (booked) return "The booked dwell";
  if (dwell === null) return "No dwell to propose";
  return edited === null ? "The best dwell" : "Your dwell";
}

function introOf(sheet: PassSheetBody, edited: Span | null): string {
  if (edited !== null)
    return "As you set it. The rules and the effect are worked out anew after each change.";
  if (sheet.dwell === null) return sheet.noDwellReason ?? "No stretch of this pass can be lased.";
  return "The open stretch that gains most in the aim, after acquisition and inside every limit of the station.";
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
