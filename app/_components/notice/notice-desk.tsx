"use client";

import useSWR from "swr";
import { announce } from "@/app/_client/announce";
import { fetchJson } from "@/app/_client/fetch-json";
import { Button } from "@/app/_components/button";
import { EmptyState } from "@/app/_components/empty-state";
import { useNow } from "@/app/_components/engagement/use-now";
import { ErrorNote } from "@/app/_components/error-note";
import { Section } from "@/app/_components/section";
import type { NoticeBody } from "@/lib/contracts/engagements";
import { NoticeCard } from "./notice-card";
import { sortNotices } from "./sort-notices";

interface NoticeDeskProps {
  /** The server's time at the first render. */
  readonly nowMs: number;
  readonly initial: readonly NoticeBody[];
  /** Coordinators answer for their authority; everybody else reads. */
  readonly mayAnswer: boolean;
}

const OTHERS_SHOWN = 30;

/** Notices in the order of work: what waits, what is answered, the rest. */
export function NoticeDesk({ nowMs: serverNowMs, initial, mayAnswer }: NoticeDeskProps) {
  const nowMs = useNow(serverNowMs, 20_000);
  const { data, error, mutate } = useSWR<{ notices: readonly NoticeBody[] }>("/api/notices", fetchJson, {
    fallbackData: { notices: initial },
    refreshInterval: 30_000,
    revalidateOnMount: false,
  });
  const { waiting, answered, others } = sortNotices(data?.notices ?? []);
  const answeredNow = (body: NoticeBody): void => {
    announce(`E-${body.engagementNumber}: ${body.answer?.outcome ?? "your answer"} is recorded.`);
    void mutate();
  };
  const list = (notices: readonly NoticeBody[]) => (
    <ul className="grid gap-3">
      {notices.map((n) => (
        <NoticeCard key={n.id} notice={n} nowMs={nowMs} mayAnswer={mayAnswer} onAnswered={answeredNow} />
      ))}
    </ul>
  );
  return (
    <div className="grid gap-5">
      {error ? (
        <div className="grid justify-items-start gap-3">
          <ErrorNote error={error} title="The notices could not be read anew; this is the last state known" />
          <Button onClick={() => void mutate()}>Try again</Button>
        </div>
      ) : null}
      <Section title={`Waiting for an answer: ${waiting.length}`}>
        {waiting.length > 0 ? list(waiting) : <p className="text-quiet">Nothing waits.</p>}
      </Section>
      {answered.length > 0 ? (
        <Section title={`Answered: ${answered.length}`}>{list(answered)}</Section>
      ) : null}
      {others.length > 0 ? (
        <Section title="Cancelled, completed and replaced" intro="Newest first; they ask for no answer.">
          {list(others.slice(0, OTHERS_SHOWN))}
          {others.length > OTHERS_SHOWN ? (
            <p className="mt-3 text-quiet">
              {others.length - OTHERS_SHOWN} older ones stand with their engagements.
            </p>
          ) : null}
        </Section>
      ) : null}
      {data?.notices.length === 0 ? (
        <EmptyState title="No notice yet">
          A notice goes out as soon as a planner proposes a dwell that concerns an authority.
        </EmptyState>
      ) : null}
    </div>
  );
}
