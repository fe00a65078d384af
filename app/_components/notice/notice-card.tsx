"use client";

import Link from "next/link";
import { useState } from "react";
import { AnswerForm } from "@/app/_components/answer/answer-form";
import { Button } from "@/app/_components/button";
import { NoticeAnswer } from "@/app/_components/engagement/notice-list";
import { asks, deliveryWords } from "@/app/_components/engagement/notice-words";
import { StateMark } from "@/app/_components/state-mark";
import { UtcTime } from "@/app/_components/utc-time";
import { durationText } from "@/app/_format/figures";
import { utcShort } from "@/app/_format/utc";
import type { NoticeBody } from "@/lib/contracts/engagements";

interface NoticeCardProps {
  readonly notice: NoticeBody;
  readonly nowMs: number;
  readonly mayAnswer: boolean;
  readonly onAnswered: (body: NoticeBody) => void;
}

/** One notice: what it asks about, how it got there, what was answered, and the form to answer it. */
export function NoticeCard({ notice, nowMs, mayAnswer, onAnswered }: NoticeCardProps) {
  const [answering, setAnswering] = useState(false);
  const open = mayAnswer && asks(notice) && Date.parse(notice.dwellFrom) > nowMs;
  const waits = notice.answer === null && asks(notice);
  const lengthS = (Date.parse(notice.dwellTo) - Date.parse(notice.dwellFrom)) / 1000;
  return (
    <li className="grid gap-2 border-b border-line pb-3 last:border-0 last:pb-0">
      <div className="grid gap-x-6 gap-y-2 lg:grid-cols-[minmax(0,1.2fr)_minmax(0,1fr)_auto]">
        <div>
          <p className="flex flex-wrap items-center gap-x-3 gap-y-1">
            <Link href={`/engagements/${notice.engagementId}`} className="link font-bold text-ink">
              E-{notice.engagementNumber}
            </Link>
            <StateMark state={notice.engagementState} />
            <span>
              {notice.fragmentName} over {notice.stationName}
            </span>
          </p>
          <p className="mt-1">
            <UtcTime at={notice.dwellFrom} show="short" />{" "}
            <span className="text-quiet">for {durationText(lengthS)}</span>
          </p>
        </div>
        <div className="text-[0.875rem] text-quiet">
          <p>
            {notice.kind} to {notice.authorityName}
          </p>
          <p className="wrap-anywhere">
            {deliveryWords(notice)}
            {notice.openedAt ? `, opened ${utcShort(notice.openedAt)}` : ""}
          </p>
        </div>
        {waits && notice.answerBy ? <Due at={notice.answerBy} nowMs={nowMs} /> : null}
      </div>
      {notice.answer ? <NoticeAnswer notice={notice} /> : null}
      {open && !answering ? (
        <Button
          className="justify-self-start"
          look={waits ? "solid" : "plain"}
          aria-label={`${waits ? "Answer" : "Change the answer to"} E-${notice.engagementNumber}`}
          onClick={() => setAnswering(true)}
        >
          {waits ? "Answer" : "Change the answer"}
        </Button>
      ) : null}
      {open && answering ? (
        <div className="mt-2 grid max-w-2xl gap-3 border-l-2 border-line pl-4">
          <AnswerForm<NoticeBody>
            path={`/api/notices/${notice.id}/answer`}
            asksName={false}
            {...(notice.answer ? { given: notice.answer } : {})}
            onAnswered={(body) => {
              setAnswering(false);
              onAnswered(body);
            }}
          />
          <button type="button" className="act justify-self-start" onClick={() => setAnswering(false)}>
            Leave it for now
          </button>
        </div>
      ) : null}
    </li>
  );
}

function Due({ at, nowMs }: { readonly at: string; readonly nowMs: number }) {
  const leftS = (Date.parse(at) - nowMs) / 1000;
  return (
    <p className="lg:text-right">
      <span className="font-semibold">
        until <UtcTime at={at} show="short" />
      </span>
      <span className="block text-[0.875rem] text-quiet">
        {leftS > 0 ? `${durationText(Math.floor(leftS / 60) * 60)} left` : "the time for it is over"}
      </span>
    </p>
  );
}
