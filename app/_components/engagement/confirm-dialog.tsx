"use client";

import { type FormEvent, useState } from "react";
import { Button } from "@/app/_components/button";
import { Dialog } from "@/app/_components/dialog";
import { ErrorNote } from "@/app/_components/error-note";
import { Field } from "@/app/_components/field";
import { UtcTime } from "@/app/_components/utc-time";
import type { EngagementSheetBody } from "@/lib/contracts/engagements";
import { checklistBody, EMPTY_CHECKLIST } from "./checklist";
import { ChecklistFields } from "./checklist-fields";
import { Conditions } from "./conditions";
import type { CommandDialogProps } from "./scrub-dialog";
import { toAttest } from "./sheet-facts";
import { apartFrom, useCommand } from "./use-command";

type ConfirmProps = CommandDialogProps & { readonly sheet: EngagementSheetBody };

/** One of the two names: the checklist, and a person's word for what reads "not checked". */
export function ConfirmDialog({ sheet, ...dialog }: ConfirmProps) {
  const second = sheet.confirmations.length > 0;
  const title = `${second ? "Second" : "First"} confirmation of E-${sheet.number}`;
  return (
    <Dialog open={dialog.open} onClose={dialog.onClose} title={title}>
      <ConfirmForm sheet={sheet} {...dialog} />
    </Dialog>
  );
}

function ConfirmForm({ sheet, onClose, onDone }: ConfirmProps) {
  const [typed, setTyped] = useState(EMPTY_CHECKLIST);
  const [words, setWords] = useState<Readonly<Record<string, string>>>({});
  const { send, busy, error, details } = useCommand((body) => onDone(body, doneWords(body)));
  const submit = (event: FormEvent): void => {
    event.preventDefault();
    const attestations = Object.entries(words)
      .filter(([, statement]) => statement.trim() !== "")
      .map(([rule, statement]) => ({ rule, statement }));
    void send(`/api/engagements/${sheet.id}/confirm`, "POST", {
      checklist: checklistBody(typed),
      attestations,
    });
  };
  const first = sheet.confirmations[0];
  return (
    <form className="grid gap-4" onSubmit={submit} noValidate>
      <p>
        {sheet.fragmentName} over {sheet.stationName}, <UtcTime at={sheet.from} />.{" "}
        {first
          ? `${first.personName} has confirmed; with your name it is confirmed.`
          : "After yours it needs a second person's name: another operator's or a safety officer's."}
      </p>
      <Conditions notices={sheet.notices} />
      <ChecklistFields typed={typed} onChange={setTyped} details={details} />
      {toAttest(sheet).map(({ rule, causes }) => (
        <Field
          key={rule}
          label={`Your word for “${rule}”`}
          hint={`Not checked: ${causes.join(" ")} Say what you know and how.`}
        >
          {(control) => (
            <textarea
              {...control}
              rows={2}
              value={words[rule] ?? ""}
              onChange={(e) => setWords({ ...words, [rule]: e.target.value })}
            />
          )}
        </Field>
      ))}
      <ErrorNote
        error={apartFrom(error, (path) => path.startsWith("checklist."))}
        title="It was not confirmed"
      />
      <div className="flex flex-wrap gap-3">
        <Button type="submit" look="solid" busy={busy}>
          Confirm with my name
        </Button>
        <Button onClick={onClose}>Not yet</Button>
      </div>
    </form>
  );
}

function doneWords(body: { readonly number: number; readonly state: string }): string {
  if (body.state === "confirmed") return `E-${body.number} is confirmed by two people.`;
  return `Your name stands under E-${body.number}; a second person has to confirm.`;
}
