"use client";

import { type FormEvent, useState } from "react";
import { announce } from "@/app/_client/announce";
import { FetchError, sendJson } from "@/app/_client/fetch-json";
import { Button } from "@/app/_components/button";
import { Dialog } from "@/app/_components/dialog";
import { ErrorNote } from "@/app/_components/error-note";
import { errorOf, Field } from "@/app/_components/field";
import type { PersonBody } from "@/lib/contracts/people";

interface DialogProps {
  /** Whom it is about; null closes it. */
  readonly person: PersonBody | null;
  readonly onClose: () => void;
  readonly onDone: () => void;
}

/** Ends all sessions of one person, with the reason. */
export function EndSessionsDialog({ person, onClose, onDone }: DialogProps) {
  return (
    <Dialog
      open={person !== null}
      onClose={onClose}
      title={person ? `End all sessions of ${person.name}` : "End"}
    >
      {person ? <EndForm person={person} onDone={onDone} /> : null}
    </Dialog>
  );
}

function EndForm({ person, onDone }: { readonly person: PersonBody; readonly onDone: () => void }) {
  const [error, setError] = useState<unknown>(null);
  const [busy, setBusy] = useState(false);
  const details = error instanceof FetchError ? error.details : [];

  const submit = async (event: FormEvent<HTMLFormElement>) => {
    event.preventDefault();
    const reason = new FormData(event.currentTarget).get("reason");
    setBusy(true);
    setError(null);
    try {
      await sendJson(`/api/people/${person.id}/end-sessions`, "POST", { reason });
      announce(`All sessions of ${person.name} have ended.`);
      onDone();
    } catch (refusal) {
      setError(refusal);
      setBusy(false);
    }
  };

  return (
    <form onSubmit={submit} className="grid gap-4">
      <p>They have to sign in again everywhere. Access tokens keep working.</p>
      <Field label="Reason" hint="Stands in the ledger." error={errorOf(details, "reason")}>
        {(control) => <input {...control} name="reason" maxLength={300} autoComplete="off" required />}
      </Field>
      <ErrorNote error={error} shownElsewhere={["reason"]} />
      <Button type="submit" look="grave" busy={busy} className="justify-self-start">
        End all sessions
      </Button>
    </form>
  );
}
