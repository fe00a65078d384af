"use client";

import { type FormEvent, useState } from "react";
import { FetchError, sendJson } from "@/app/_client/fetch-json";
import { Button } from "@/app/_components/button";
import { ErrorNote } from "@/app/_components/error-note";
import { errorOf, Field } from "@/app/_components/field";
import { Section } from "@/app/_components/section";

/** Changes the password; afterwards every session has ended, so it leads to the sign-in page. */
export function PasswordForm() {
  const [error, setError] = useState<unknown>(null);
  const [busy, setBusy] = useState(false);

  const submit = async (event: FormEvent<HTMLFormElement>) => {
    event.preventDefault();
    const form = new FormData(event.currentTarget);
    setBusy(true);
    setError(null);
    try {
      await sendJson("/api/account/password", "POST", {
        current: form.get("current"),
        next: form.get("next"),
      });
      location.assign("/sign-in?after=password");
    } catch (refusal) {
      setError(refusal);
      setBusy(false);
    }
  };
  const details = error instanceof FetchError ? error.details : [];

  return (
    <Section title="Password" intro="Changing it ends all your sessions; you then sign in with the new one.">
      <form method="post" onSubmit={submit} className="grid gap-4">
        <Field label="Present password" error={errorOf(details, "current")}>
          {(control) => (
            <input
              {...control}
              name="current"
              type="password"
              autoComplete="current-password"
              maxLength={200}
              required
            />
          )}
        </Field>
        <Field
          label="New password"
          hint="Twelve characters or more. Length is what counts: four or five words do well."
          error={errorOf(details, "next")}
        >
          {(control) => (
            <input
              {...control}
              name="next"
              type="password"
              autoComplete="new-password"
              maxLength={200}
              required
            />
          )}
        </Field>
        <ErrorNote error={error} shownElsewhere={["current", "next"]} />
        <Button type="submit" busy={busy} className="justify-self-start">
          Change password
        </Button>
      </form>
    </Section>
  );
}
