"use client";

import Link from "next/link";
import useSWR from "swr";
import { fetchJson } from "@/app/_client/fetch-json";
import { AfterDwell } from "@/app/_components/after-dwell/after-dwell";
import { Caution } from "@/app/_components/caution";
import { ErrorNote } from "@/app/_components/error-note";
import { ClosureList } from "@/app/_components/pass-sheet/closure-list";
import { EffectFigures } from "@/app/_components/pass-sheet/effect-figures";
import { StripOfPass } from "@/app/_components/pass-strip/strip-of-pass";
import { Section } from "@/app/_components/section";
import { LedgerTable } from "@/app/ledger/ledger-table";
import type { EngagementSheetBody } from "@/lib/contracts/engagements";
import type { PassSheetBody } from "@/lib/contracts/passes";
import { Commands } from "./commands";
import { Conditions } from "./conditions";
import { EngagementHead } from "./engagement-head";
import { FiringRecord } from "./firing-record";
import { NoticeList } from "./notice-list";
import { Outstanding } from "./outstanding";
import { WordsGiven } from "./words-given";

interface EngagementViewProps {
  readonly initial: EngagementSheetBody;
  /** Coordinators don't: fragments and stations are no links for them. */
  readonly readsBook: boolean;
}

/** One engagement in full, read anew every half minute. */
export function EngagementView({ initial, readsBook }: EngagementViewProps) {
  const {
    data: sheet = initial,
    error,
    mutate,
  } = useSWR<EngagementSheetBody>(`/api/engagements/${initial.id}`, fetchJson, {
    fallbackData: initial,
    refreshInterval: 30_000,
    revalidateOnMount: false,
  });
  const { data: pass, error: passError } = useSWR<PassSheetBody>(`/api/passes/${sheet.passId}`, fetchJson, {
    revalidateOnFocus: false,
  });
  return (
    <div className="grid gap-5">
      <EngagementHead sheet={sheet} zone={pass?.station.timeZone ?? null} readsBook={readsBook} />
      {error ? (
        <ErrorNote error={error} title="It could not be read anew; this is the last state known" />
      ) : null}
      <Conditions notices={sheet.notices} />
      <Commands sheet={sheet} onChanged={() => void mutate()} />
      <div className="grid gap-5 xl:grid-cols-2">
        <Section title="What it waits for">
          <Outstanding sheet={sheet} />
        </Section>
        <Section title="Names and words given">
          <WordsGiven sheet={sheet} />
        </Section>
      </div>
      {sheet.firing ? (
        <Section title="Firing record">
          <FiringRecord firing={sheet.firing} />
        </Section>
      ) : null}
      <DwellPart sheet={sheet} pass={pass} passError={passError} />
      <AfterDwell engagementId={sheet.id} />
      <Section title="Notices and answers">
        <NoticeList notices={sheet.notices} />
      </Section>
      {sheet.history.length > 0 ? (
        <Section title="History" intro="From the ledger, newest first.">
          <LedgerTable entries={sheet.history} />
        </Section>
      ) : null}
    </div>
  );
}

interface DwellPartProps {
  readonly sheet: EngagementSheetBody;
  readonly pass: PassSheetBody | undefined;
  readonly passError: unknown;
}

/** What the dwell was predicted to do, and where it lies in its pass. */
function DwellPart({ sheet, pass, passError }: DwellPartProps) {
  // What has ended is not for booking: today's closures would only cover what was.
  const ended = ["fired", "scrubbed", "lapsed"].includes(sheet.state);
  return (
    <Section
      title="The dwell"
      intro="Predicted when it was booked, from the element set of then."
      actions={
        <Link className="act" href={`/passes/${sheet.passId}`}>
          Open the pass
        </Link>
      }
    >
      <EffectFigures estimate={sheet.effect} />
      <div className="mt-4">
        {pass ? (
          <StripOfPass pass={{ ...pass, booked: sheet, closures: ended ? [] : pass.closures }} size="large" />
        ) : null}
        {!pass && !passError ? <p role="status">Reading the pass …</p> : null}
        <ErrorNote error={passError} title="The pass could not be read" />
      </div>
      {sheet.closures.length > 0 ? (
        <div className="mt-4">
          <h3 className="font-semibold">What touches these seconds</h3>
          <ClosureList closures={sheet.closures} />
        </div>
      ) : null}
      <Caution />
    </Section>
  );
}
