"use client";

import { useState } from "react";
import useSWR from "swr";
import { announce } from "@/app/_client/announce";
import { fetchJson } from "@/app/_client/fetch-json";
import { Button, ButtonLink } from "@/app/_components/button";
import { EmptyState } from "@/app/_components/empty-state";
import { ScrubDialog } from "@/app/_components/engagement/scrub-dialog";
import { useNow } from "@/app/_components/engagement/use-now";
import { ErrorNote } from "@/app/_components/error-note";
import type { EngagementBody } from "@/lib/contracts/engagements";
import { WatchCard } from "./watch-card";

const LIVE = "proposed,cleared,confirmed";

interface WatchDeskProps {
  readonly nowMs: number;
  readonly initial: readonly EngagementBody[];
  readonly mayScrub: boolean;
}

/** Live engagements in the order of their dwells, with the time that is left; read anew every ten seconds. */
export function WatchDesk({ nowMs: serverNowMs, initial, mayScrub }: WatchDeskProps) {
  const nowMs = useNow(serverNowMs);
  const { data, error, mutate } = useSWR<{ engagements: readonly EngagementBody[] }>(
    `/api/engagements?state=${LIVE}`,
    fetchJson,
    { fallbackData: { engagements: initial }, refreshInterval: 10_000, revalidateOnMount: false },
  );
  const [scrubbing, setScrubbing] = useState<EngagementBody | null>(null);
  const rows = data?.engagements ?? [];
  return (
    <div className="grid gap-4">
      {error ? (
        <div className="grid justify-items-start gap-3">
          <ErrorNote error={error} title="The watch could not be read anew; this is the last state known" />
          <Button onClick={() => void mutate()}>Try again</Button>
        </div>
      ) : null}
      {rows.length === 0 ? (
        <EmptyState
          title="Nothing is booked"
          action={<ButtonLink href="/engagements?when=past">What was fired lately</ButtonLink>}
        >
          Engagements appear here as soon as a planner proposes them.
        </EmptyState>
      ) : null}
      <ul className="grid gap-3">
        {rows.map((e) => (
          <WatchCard key={e.id} engagement={e} nowMs={nowMs} mayScrub={mayScrub} onScrub={setScrubbing} />
        ))}
      </ul>
      {scrubbing ? (
        <ScrubDialog
          open
          engagement={scrubbing}
          onClose={() => setScrubbing(null)}
          onDone={(_body, words) => {
            setScrubbing(null);
            announce(words);
            void mutate();
          }}
        />
      ) : null}
    </div>
  );
}
