"use client";

import { type FormEvent, useState } from "react";
import { Button } from "@/app/_components/button";
import { Dialog } from "@/app/_components/dialog";
import { ErrorNote } from "@/app/_components/error-note";
import { errorOf, Field } from "@/app/_components/field";
import type { EngagementBody } from "@/lib/contracts/engagements";
import { useCommand } from "./use-command";

export interface CommandDialogProps {
  readonly open: boolean;
  readonly onClose: () => void;
  readonly onDone: (body: EngagementBody, words: string) => void;
}

/** Ends an engagement before it is fired. The reason goes to everybody who was asked. */
export function ScrubDialog({
  engagement,
  ...dialog
}: CommandDialogProps & { readonly engagement: EngagementBody }) {
  return (
    <Dialog open={dialog.open} onClose={dialog.onClose} title={`Scrub E-${engagement.number}`}>
      <ScrubForm engagement={engagement} {...dialog} />
    </Dialog>
  );
}

function ScrubForm({ engagement, onClose, onDone }: CommandDialogProps & { engagement: EngagementBody }) {
  const [reason, setReason] = useState("");
  const { send, busy, error, details } = useCommand((body) =>
    onDone(body, `E-${body.number} is scrubbed; cancellations are on their way.`),
  );
  const submit = (event: FormEvent): void => {
    event.preventDefault();
    void send(`/api/engagements/${engagement.id}/scrub`, "POST", { reason });
  };
  return (
    <form className="grid gap-4" onSubmit={submit} noValidate>
      <p>
        {engagement.fragmentName} over {engagement.stationName}. The slot becomes free, and every authority
        that was asked gets a cancellation with your reason. This can’t be undone; the dwell can be proposed
        anew.
      </p>
      <Field label="Reason" hint="Everybody who was asked will read it" error={errorOf(details, "reason")}>
        {(control) => (
          <textarea {...control} rows={3} value={reason} onChange={(e) => setReason(e.target.value)} />
        )}
      </Field>
      <ErrorNote error={error} title="It was not scrubbed" />
      <div className="flex flex-wrap gap-3">
        <Button type="submit" look="grave" busy={busy}>
          Scrub this engagement
        </Button>
        <Button onClick={onClose}>Keep it</Button>
      </div>
    </form>
  );
}
