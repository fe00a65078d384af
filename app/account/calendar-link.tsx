"use client";

import { useState } from "react";
import { announce } from "@/app/_client/announce";
import { sendJson } from "@/app/_client/fetch-json";
import { Button } from "@/app/_components/button";
import { ErrorNote } from "@/app/_components/error-note";
import { Section } from "@/app/_components/section";
import { ShownOnce } from "./shown-once";

/** A secret address under which a person's own calendar program reads the book. */
export function CalendarLink() {
  const [url, setUrl] = useState<string | null>(null);
  const [error, setError] = useState<unknown>(null);
  const attempt = async (work: () => Promise<void>) => {
    setError(null);
    try {
      await work();
    } catch (refusal) {
      setError(refusal);
    }
  };
  const renew = () =>
    attempt(async () => {
      setUrl((await sendJson<{ url: string }>("/api/calendar", "POST")).url);
    });
  const end = () =>
    attempt(async () => {
      await sendJson("/api/calendar", "DELETE");
      setUrl(null);
      announce("The calendar address no longer opens anything.");
    });
  return (
    <Section
      title="Calendar address"
      intro="Subscribe to the engagements you may read in your own calendar. Whoever knows the address can read them: keep it to yourself. A new one ends the one before."
    >
      {url ? (
        <ShownOnce
          title="Your calendar address"
          label="Calendar address"
          secret={url}
          onDone={() => setUrl(null)}
        />
      ) : null}
      <ErrorNote error={error} />
      <div className="flex flex-wrap gap-2.5">
        <Button onClick={renew}>Make a new address</Button>
        <Button look="grave" onClick={end}>
          End the address
        </Button>
      </div>
    </Section>
  );
}
