"use client";

import Link from "next/link";
import { useState } from "react";
import useSWR from "swr";
import { fetchJson } from "@/app/_client/fetch-json";
import { Button } from "@/app/_components/button";
import { Caution } from "@/app/_components/caution";
import { Dialog } from "@/app/_components/dialog";
import { useCommand } from "@/app/_components/engagement/use-command";
import { ErrorNote } from "@/app/_components/error-note";
import { DwellEditor } from "@/app/_components/pass-sheet/dwell-editor";
import { EffectFigures } from "@/app/_components/pass-sheet/effect-figures";
import { type Span, spanOf, useJudgement } from "@/app/_components/pass-sheet/use-judgement";
import { StripOfPass } from "@/app/_components/pass-strip/strip-of-pass";
import type { EngagementBody } from "@/lib/contracts/engagements";
import type { PassBody, PassSheetBody } from "@/lib/contracts/passes";
import { Refusals } from "./refusals";

interface BookingDialogProps {
  /** The pass that was picked; null while the dialog is shut. */
  readonly pass: PassBody | null;
  readonly mayPropose: boolean;
  readonly onClose: () => void;
  readonly onBooked: (body: EngagementBody) => void;
}

/** Books the dwell of a pass that was picked in the calendar. */
export function BookingDialog({ pass, ...rest }: BookingDialogProps) {
  const title = pass ? `${pass.fragmentName} over ${pass.stationName}` : "";
  return (
    <Dialog open={pass !== null} onClose={rest.onClose} title={title}>
      {pass ? <Booking pass={pass} {...rest} /> : null}
    </Dialog>
  );
}

function Booking(props: BookingDialogProps & { readonly pass: PassBody }) {
  const { data: sheet, error } = useSWR<PassSheetBody>(`/api/passes/${props.pass.id}`, fetchJson, {
    revalidateOnFocus: false,
  });
  if (error) return <ErrorNote error={error} title="The pass could not be read" />;
  if (!sheet) return <p role="status">Reading the pass …</p>;
  const offered = spanOf(sheet.dwell);
  if (!offered) {
    return <p>{sheet.noDwellReason ?? "This pass offers no dwell any more."}</p>;
  }
  return <BookingForm {...props} sheet={sheet} offered={offered} />;
}

function BookingForm(props: BookingDialogProps & { readonly sheet: PassSheetBody; readonly offered: Span }) {
  const { sheet, offered, mayPropose, onClose, onBooked } = props;
  const [dwell, setDwell] = useState(offered);
  const { judgement, error: unjudged, isCurrent } = useJudgement(sheet.id, mayPropose ? dwell : null);
  const { send, busy, error } = useCommand(onBooked);
  const booked = { from: new Date(dwell.fromMs).toISOString(), to: new Date(dwell.toMs).toISOString() };
  const estimate = judgement?.estimate ?? sheet.estimate;
  const refusals = isCurrent ? (judgement?.refusals ?? []) : [];
  const concerned = (judgement ?? sheet).concerned.map((c) => c.name);
  return (
    <div className="grid gap-4">
      <StripOfPass pass={{ ...sheet, booked }} size="medium" />
      {estimate ? <EffectFigures estimate={estimate} /> : null}
      {mayPropose ? (
        <DwellEditor
          dwell={dwell}
          pass={{ fromMs: Date.parse(sheet.riseAt), toMs: Date.parse(sheet.setAt) }}
          onChange={setDwell}
        />
      ) : null}
      <p>
        {concerned.length === 0 ? "Nobody has to be asked." : `A notice goes to ${concerned.join(", ")}.`}
      </p>
      <Refusals refusals={refusals} />
      <ErrorNote error={unjudged} title="The dwell could not be judged" />
      <ErrorNote error={error} title="The dwell was not booked" />
      <div className="flex flex-wrap items-center gap-3">
        {mayPropose ? (
          <Button
            look="solid"
            busy={busy}
            disabled={!isCurrent || refusals.length > 0}
            onClick={() => void send("/api/engagements", "POST", { passId: sheet.id, ...booked })}
          >
            Propose and send notices
          </Button>
        ) : (
          <p className="text-quiet">Planners propose dwells.</p>
        )}
        <Button onClick={onClose}>Not yet</Button>
        <Link href={`/passes/${sheet.id}`} className="act">
          The pass in full
        </Link>
      </div>
      <Caution />
    </div>
  );
}
