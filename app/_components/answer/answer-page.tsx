"use client";

import { useEffect, useState } from "react";
import { sendJson } from "@/app/_client/fetch-json";
import { Button } from "@/app/_components/button";
import { UtcTime } from "@/app/_components/utc-time";
import { durationText } from "@/app/_format/figures";
import type { AnswerPageBody } from "@/lib/contracts/answers";
import { AnswerForm } from "./answer-form";

/** What somebody sees who opened the link in a notice: the question, the answer in force, and the form. */
export function AnswerPage({ token, initial }: { readonly token: string; readonly initial: AnswerPageBody }) {
  const [body, setBody] = useState(initial);
  const [changing, setChanging] = useState(false);
  const path = `/api/answers/${encodeURIComponent(token)}`;
  useEffect(() => {
    // The page's script tells that somebody has it open; a mail scanner that only reads the address does not.
    void sendJson(`${path}/opened`, "POST").catch(() => undefined);
  }, [path]);
  const asks = body.canAnswer && (body.answer === null || changing);
  return (
    <div className="mx-auto grid w-full max-w-2xl gap-5">
      <Question body={body} />
      {body.answer ? <Given body={body} /> : null}
      {body.closedBecause ? <p className="border-l-4 border-dwell px-3 py-1">{body.closedBecause}</p> : null}
      {asks ? (
        <section className="sheet p-4 sm:p-5" aria-label="Answer">
          <AnswerForm<AnswerPageBody>
            path={path}
            asksName
            {...(body.answer ? { given: body.answer } : {})}
            onAnswered={(answered) => {
              setBody(answered);
              setChanging(false);
              window.scrollTo({ top: 0 });
            }}
          />
        </section>
      ) : null}
      {body.canAnswer && body.answer && !changing ? (
        <Button className="justify-self-start" onClick={() => setChanging(true)}>
          Change the answer
        </Button>
      ) : null}
      <details className="sheet p-4" open={body.canAnswer}>
        <summary className="min-h-8 cursor-pointer font-semibold">
          The notice in full{isRequest(body) ? ", with the beam’s azimuth and elevation" : ""}
        </summary>
        <p className="mt-3 whitespace-pre-line wrap-anywhere">{body.text}</p>
      </details>
      <Meaning body={body} />
    </div>
  );
}

function Question({ body }: { readonly body: AnswerPageBody }) {
  const zone = body.authorityTimeZone;
  return (
    <header>
      <p className="text-quiet">For {body.authorityName}</p>
      <h1 className="mt-1 text-2xl leading-tight font-bold">
        {asking(body)} E-{body.engagementNumber}
      </h1>
      <p className="mt-2">{sentenceOf(body)}</p>
      <dl className="mt-4 grid grid-cols-[5.5rem_1fr] gap-x-4 gap-y-2">
        <dt className="text-quiet">From</dt>
        <dd className="figures">
          <UtcTime at={body.dwellFrom} zone={zone} />
        </dd>
        <dt className="text-quiet">To</dt>
        <dd className="figures">
          <UtcTime at={body.dwellTo} zone={zone} />
        </dd>
        {body.answerBy && body.canAnswer ? (
          <>
            <dt className="text-quiet">Answer by</dt>
            <dd className="figures">
              <UtcTime at={body.answerBy} zone={zone} />
            </dd>
          </>
        ) : null}
      </dl>
    </header>
  );
}

function asking(body: AnswerPageBody): string {
  if (body.kind === "cancellation") return "Cancelled: engagement";
  if (body.kind === "completion") return "Completed: engagement";
  if (body.answer) return "Your answer to engagement";
  return body.canAnswer ? "May we lase? Engagement" : "Engagement";
}

function isRequest(body: AnswerPageBody): boolean {
  return body.kind === "request" || body.kind === "revised request";
}

/** What it is about, for somebody who has never heard of it. */
function sentenceOf(body: AnswerPageBody): string {
  const length = durationText((Date.parse(body.dwellTo) - Date.parse(body.dwellFrom)) / 1000);
  const target = `the debris fragment ${body.fragmentName}`;
  if (body.kind === "cancellation") {
    return `The laser station ${body.stationName} will not point its laser at ${target} in the time below. You need not do anything.`;
  }
  if (body.kind === "completion") {
    return `The laser station ${body.stationName} has finished with ${target}. You need not do anything.`;
  }
  return `The laser station ${body.stationName} asks to point its laser at ${target}, a piece of orbital debris, for ${length}, so that it comes down sooner.`;
}

/** What an answer does, and what it doesn't. */
function Meaning({ body }: { readonly body: AnswerPageBody }) {
  if (!isRequest(body)) return null;
  return (
    <section className="text-sm text-quiet" aria-label="What an answer means">
      <p>
        Your answer goes into the engagement book and to the people at the station. Without it the laser is
        not fired. It is not a NOTAM, it is no clearance by itself, and it replaces none that other rules ask
        for.
      </p>
    </section>
  );
}

function Given({ body }: { readonly body: AnswerPageBody }) {
  if (!body.answer) return null;
  const { outcome, conditions, reasons, answeredBy, answeredAt } = body.answer;
  return (
    <div role="status" className="sheet border-ink p-4">
      <p>
        Recorded: <strong>{outcome}</strong>, by {answeredBy},{" "}
        <UtcTime at={answeredAt} zone={body.authorityTimeZone} />.
      </p>
      {conditions ? <p className="mt-1">Conditions: {conditions}</p> : null}
      {reasons ? <p className="mt-1">Reasons: {reasons}</p> : null}
      {body.canAnswer ? (
        <p className="mt-2 text-quiet">
          You can change it from this same page until the dwell begins; the newer answer then counts.
        </p>
      ) : null}
    </div>
  );
}
