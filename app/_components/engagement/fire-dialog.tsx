"use client";

import { type FormEvent, useState } from "react";
import { Button } from "@/app/_components/button";
import { Dialog } from "@/app/_components/dialog";
import { ErrorNote } from "@/app/_components/error-note";
import { errorOf, Field } from "@/app/_components/field";
import type { EngagementBody } from "@/lib/contracts/engagements";
import { EMPTY_FIRING, firingBody, firingProblem, OUTCOME_WORDS, type TypedFiring } from "./firing-form";
import { InterruptionRows } from "./interruption-rows";
import { utcWords } from "./read-utc";
import type { CommandDialogProps } from "./scrub-dialog";
import { apartFrom, useCommand } from "./use-command";
import { UtcField } from "./utc-field";

type FireProps = CommandDialogProps & { readonly engagement: EngagementBody };

/** Reasons that stand beside their fields. */
const FIELDS = /^(openedAt|closedAt|pulses|note|interruptions\.\d+\..+)$/;

/** The record of what was fired, or that nothing was. */
export function FireDialog({ engagement, ...dialog }: FireProps) {
  return (
    <Dialog open={dialog.open} onClose={dialog.onClose} title={`Firing record of E-${engagement.number}`}>
      <FireForm engagement={engagement} {...dialog} />
    </Dialog>
  );
}

function FireForm({ engagement, onClose, onDone }: FireProps) {
  const [typed, setTyped] = useState(EMPTY_FIRING);
  const { send, busy, error, details, refuse } = useCommand((body) =>
    onDone(body, `The firing record of E-${body.number} is kept; completion notices are on their way.`),
  );
  const submit = (event: FormEvent): void => {
    event.preventDefault();
    const problem = firingProblem(typed);
    if (problem) refuse(new Error(problem));
    else void send(`/api/engagements/${engagement.id}/fire`, "POST", firingBody(typed));
  };
  return (
    <form className="grid gap-4" onSubmit={submit} noValidate>
      <p>
        The dwell was booked from <span className="figures">{utcWords(Date.parse(engagement.from))}</span> to{" "}
        <span className="figures">{utcWords(Date.parse(engagement.to))}</span>. A record can’t be changed
        later.
      </p>
      <Outcomes typed={typed} onChange={setTyped} />
      {typed.outcome === "fired" || typed.outcome === "in part" ? (
        <ShutterFields typed={typed} onChange={setTyped} details={details} />
      ) : null}
      <Field
        label="Note"
        hint={typed.outcome === "not fired" ? "Why nothing was fired" : "Anything the next crew should know"}
        error={errorOf(details, "note")}
      >
        {(control) => (
          <textarea
            {...control}
            rows={2}
            value={typed.note}
            onChange={(e) => setTyped({ ...typed, note: e.target.value })}
          />
        )}
      </Field>
      <ErrorNote error={apartFrom(error, (path) => FIELDS.test(path))} title="The record was not kept" />
      <div className="flex flex-wrap gap-3">
        <Button type="submit" look="solid" busy={busy}>
          Keep this record
        </Button>
        <Button onClick={onClose}>Not yet</Button>
      </div>
    </form>
  );
}

interface PartProps {
  readonly typed: TypedFiring;
  readonly onChange: (next: TypedFiring) => void;
}

function Outcomes({ typed, onChange }: PartProps) {
  return (
    <fieldset className="grid gap-2 sm:grid-cols-3">
      <legend className="mb-1 font-semibold">What happened</legend>
      {OUTCOME_WORDS.map(({ outcome, words }) => (
        <label
          key={outcome}
          className="flex min-h-11 items-start gap-2 rounded border border-line p-2.5 has-checked:border-ink"
        >
          <input
            type="radio"
            name="firing-outcome"
            className="mt-0.5 size-5 shrink-0 accent-(--ink)"
            checked={typed.outcome === outcome}
            onChange={() => onChange({ ...typed, outcome })}
          />
          <span>
            <span className="font-semibold">{outcome}</span>
            <span className="block text-[0.8125rem] text-quiet">{words}</span>
          </span>
        </label>
      ))}
    </fieldset>
  );
}

function ShutterFields({
  typed,
  onChange,
  details,
}: PartProps & { readonly details: readonly { path: string; message: string }[] }) {
  return (
    <>
      <UtcField
        label="Shutter opened"
        milliseconds
        value={typed.openedAt}
        onChange={(openedAt) => onChange({ ...typed, openedAt })}
        error={errorOf(details, "openedAt")}
      />
      <UtcField
        label="Shutter closed"
        milliseconds
        value={typed.closedAt}
        onChange={(closedAt) => onChange({ ...typed, closedAt })}
        error={errorOf(details, "closedAt")}
      />
      <Field label="Pulses" hint="Number of pulses fired" error={errorOf(details, "pulses")}>
        {(control) => (
          <input
            {...control}
            className={`${control.className} figures sm:max-w-48`}
            inputMode="numeric"
            autoComplete="off"
            value={typed.pulses}
            onChange={(e) => onChange({ ...typed, pulses: e.target.value })}
          />
        )}
      </Field>
      <InterruptionRows
        rows={typed.interruptions}
        onChange={(interruptions) => onChange({ ...typed, interruptions })}
        details={details}
      />
    </>
  );
}
