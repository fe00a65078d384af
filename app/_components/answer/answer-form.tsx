"use client";

import { type FormEvent, useState } from "react";
import { FetchError, sendJson } from "@/app/_client/fetch-json";
import { Button } from "@/app/_components/button";
import { ErrorNote } from "@/app/_components/error-note";
import { errorOf, Field } from "@/app/_components/field";
import { type AnswerOutcome, OUTCOMES } from "@/lib/contracts/common";

interface AnswerFormProps<T> {
  /** Where the answer is sent by POST. */
  readonly path: string;
  /** By link nobody is signed in: the name is asked for. */
  readonly asksName: boolean;
  /** What stands in the form at first: the answer in force, when there is one. */
  readonly given?: {
    readonly outcome: string;
    readonly conditions: string | null;
    readonly reasons: string | null;
  };
  readonly onAnswered: (body: T) => void;
}

const EXPLAINED: Record<AnswerOutcome, string> = {
  "no objection": "The dwell may go ahead as far as you are concerned.",
  "no objection with conditions": "It may go ahead if the conditions you write are kept.",
  objection: "It must not go ahead as proposed; say why, so that it can be changed.",
};

/** The three answers of an authority, with the words that two of them need. */
export function AnswerForm<T>({ path, asksName, given, onAnswered }: AnswerFormProps<T>) {
  const [outcome, setOutcome] = useState<AnswerOutcome | null>(
    OUTCOMES.find((o) => o === given?.outcome) ?? null,
  );
  const [words, setWords] = useState({
    conditions: given?.conditions ?? "",
    reasons: given?.reasons ?? "",
    name: "",
  });
  const [busy, setBusy] = useState(false);
  const [error, setError] = useState<unknown>(null);
  const details = error instanceof FetchError ? error.details : [];
  const submit = async (event: FormEvent): Promise<void> => {
    event.preventDefault();
    if (outcome === null) return setError(new Error("Choose one of the three answers."));
    setBusy(true);
    setError(null);
    try {
      const body = {
        outcome,
        ...(outcome === "no objection with conditions" ? { conditions: words.conditions } : {}),
        ...(outcome === "objection" ? { reasons: words.reasons } : {}),
        ...(asksName ? { name: words.name } : {}),
      };
      onAnswered(await sendJson<T>(path, "POST", body));
    } catch (thrown) {
      setError(thrown);
    } finally {
      setBusy(false);
    }
  };
  return (
    <form className="grid gap-4" onSubmit={(e) => void submit(e)} noValidate>
      <fieldset className="grid gap-2">
        <legend className="mb-1 font-semibold">Your answer</legend>
        {OUTCOMES.map((o) => (
          <label
            key={o}
            className="flex min-h-11 cursor-pointer items-start gap-3 rounded border border-line p-3 has-checked:border-ink"
          >
            <input
              type="radio"
              name="outcome"
              className="mt-0.5 size-5 accent-(--ink)"
              checked={outcome === o}
              onChange={() => setOutcome(o)}
            />
            <span>
              <span className="font-semibold first-letter:uppercase">{o}</span>{" "}
              <span className="block text-[0.875rem] text-quiet">{EXPLAINED[o]}</span>
            </span>
          </label>
        ))}
      </fieldset>
      {outcome === "no objection with conditions" ? (
        <Field
          label="Conditions"
          hint="What must be kept, in your words"
          error={errorOf(details, "conditions")}
        >
          {(control) => (
            <textarea
              {...control}
              rows={3}
              value={words.conditions}
              onChange={(e) => setWords({ ...words, conditions: e.target.value })}
            />
          )}
        </Field>
      ) : null}
      {outcome === "objection" ? (
        <Field
          label="Reasons"
          hint="Why it must not go ahead, in your words"
          error={errorOf(details, "reasons")}
        >
          {(control) => (
            <textarea
              {...control}
              rows={3}
              value={words.reasons}
              onChange={(e) => setWords({ ...words, reasons: e.target.value })}
            />
          )}
        </Field>
      ) : null}
      {asksName ? (
        <Field label="Your name" hint="It is recorded with the answer" error={errorOf(details, "name")}>
          {(control) => (
            <input
              {...control}
              autoComplete="name"
              value={words.name}
              onChange={(e) => setWords({ ...words, name: e.target.value })}
            />
          )}
        </Field>
      ) : null}
      <ErrorNote error={error} title="The answer was not recorded" />
      <div>
        <Button type="submit" look="solid" busy={busy}>
          Send this answer
        </Button>
      </div>
    </form>
  );
}
