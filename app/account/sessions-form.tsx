"use client";

import { useState } from "react";
import { sendJson } from "@/app/_client/fetch-json";
import { Button } from "@/app/_components/button";
import { ErrorNote } from "@/app/_components/error-note";
import { Section } from "@/app/_components/section";

/** Signs out everywhere at once. */
export function SessionsForm() {
  const [error, setError] = useState<unknown>(null);
  const [busy, setBusy] = useState(false);
  const end = async () => {
    setBusy(true);
    try {
      await sendJson("/api/account/end-sessions", "POST");
      location.assign("/sign-in?after=sessions");
    } catch (refusal) {
      setError(refusal);
      setBusy(false);
    }
  };
  return (
    <Section title="Sessions" intro="For a computer that was left signed in. Tokens keep working.">
      <ErrorNote error={error} />
      <Button look="grave" busy={busy} onClick={end}>
        End all my sessions, here too
      </Button>
    </Section>
  );
}
