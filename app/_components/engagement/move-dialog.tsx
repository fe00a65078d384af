"use client";

import { useState } from "react";
import useSWR from "swr";
import { fetchJson } from "@/app/_client/fetch-json";
import { Button } from "@/app/_components/button";
import { Dialog } from "@/app/_components/dialog";
import { ErrorNote } from "@/app/_components/error-note";
import { DwellEditor } from "@/app/_components/pass-sheet/dwell-editor";
import type { Span } from "@/app/_components/pass-sheet/use-judgement";
import { StripOfPass } from "@/app/_components/pass-strip/strip-of-pass";
import { durationText } from "@/app/_format/figures";
import type { EngagementBody } from "@/lib/contracts/engagements";
import type { PassSheetBody } from "@/lib/contracts/passes";
import type { CommandDialogProps } from "./scrub-dialog";
import { useCommand } from "./use-command";

type MoveProps = CommandDialogProps & { readonly engagement: EngagementBody };

/** Gives a dwell other times in its pass: typed, by steps or by arrow keys. */
export function MoveDialog({ engagement, ...dialog }: MoveProps) {
  return (
    <Dialog open={dialog.open} onClose={dialog.onClose} title={`Move E-${engagement.number}`}>
      <MoveForm engagement={engagement} {...dialog} />
    </Dialog>
  );
}

function MoveForm({ engagement, onClose, onDone }: MoveProps) {
  const before: Span = { fromMs: Date.parse(engagement.from), toMs: Date.parse(engagement.to) };
  const [dwell, setDwell] = useState(before);
  const { data: pass, error: unread } = useSWR<PassSheetBody>(`/api/passes/${engagement.passId}`, fetchJson, {
    revalidateOnFocus: false,
  });
  const { send, busy, error } = useCommand((body) =>
    onDone(body, `E-${body.number} is moved; it waits for the answers to the revised notices.`),
  );
  const unmoved = dwell.fromMs === before.fromMs && dwell.toMs === before.toMs;
  const move = (): void => {
    const [from, to] = [new Date(dwell.fromMs).toISOString(), new Date(dwell.toMs).toISOString()];
    void send(`/api/engagements/${engagement.id}`, "PATCH", { from, to, version: engagement.version });
  };
  if (unread) return <ErrorNote error={unread} title="The pass could not be read" />;
  if (!pass) return <p role="status">Reading the pass …</p>;
  const booked = { from: new Date(dwell.fromMs).toISOString(), to: new Date(dwell.toMs).toISOString() };
  return (
    <div className="grid gap-4">
      <p>
        {engagement.fragmentName} over {engagement.stationName}. A move takes back the answers and
        confirmations that there are; every authority gets a revised notice.
      </p>
      <StripOfPass pass={{ ...pass, booked }} size="medium" />
      <DwellEditor
        dwell={dwell}
        pass={{ fromMs: Date.parse(pass.riseAt), toMs: Date.parse(pass.setAt) }}
        onChange={setDwell}
      />
      <p>
        Length: <span className="figures">{durationText((dwell.toMs - dwell.fromMs) / 1000)}</span>
      </p>
      <ErrorNote error={error} title="It was not moved; it stands where it was" />
      <div className="flex flex-wrap gap-3">
        <Button look="solid" busy={busy} disabled={unmoved} onClick={move}>
          Move and send revised notices
        </Button>
        <Button onClick={onClose}>Leave it</Button>
      </div>
    </div>
  );
}
