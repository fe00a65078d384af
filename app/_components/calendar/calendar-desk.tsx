"use client";

import dynamic from "next/dynamic";
import { usePathname, useSearchParams } from "next/navigation";
import { useMemo, useState, useSyncExternalStore } from "react";
import { announce } from "@/app/_client/announce";
import { FetchError, sendJson } from "@/app/_client/fetch-json";
import { Button } from "@/app/_components/button";
import { ErrorNote } from "@/app/_components/error-note";
import type { EngagementBody } from "@/lib/contracts/engagements";
import { BookingDialog } from "./booking-dialog";
import { type CalendarView, calendarViewText, readCalendarView } from "./calendar-view";
import { EngagementDialog } from "./engagement-dialog";
import type { OfferEntry } from "./entries";
import { EntryList } from "./entry-list";
import { Legend } from "./legend";
import { Toolbar } from "./toolbar";
import { useEntries } from "./use-entries";
import { useScrollToStart } from "./use-scroll-to-start";

const TimeGrid = dynamic(() => import("./time-grid"), {
  ssr: false,
  loading: () => <p role="status">Drawing the calendar …</p>,
});

interface CalendarDeskProps {
  readonly nowMs: number;
  readonly personId: string;
  readonly mayPropose: boolean;
  readonly stations: readonly { readonly id: string; readonly name: string }[];
  readonly fragments: readonly { readonly id: string; readonly name: string }[];
}

/** The calendar: engagements in front, bookable passes behind, and the dialogs to book and to move. */
export function CalendarDesk({ nowMs, personId, mayPropose, stations, fragments }: CalendarDeskProps) {
  const pathname = usePathname();
  const params = useSearchParams();
  const narrow = useNarrow();
  const asked = useMemo(() => readCalendarView(new URLSearchParams(params), nowMs), [params, nowMs]);
  const show = asked.show ?? (narrow ? "day" : "week");
  const view = useMemo(() => ({ ...asked, show }), [asked, show]);
  const { engagements, offers, reading, error, again } = useEntries(view);
  const scroller = useScrollToStart(view, reading);
  const [picked, setPicked] = useState<OfferEntry | null>(null);
  const [opened, setOpened] = useState<EngagementBody | null>(null);
  const change = (next: CalendarView): void =>
    // Not by the router: nothing of it needs the server, and the next click must see it at once.
    window.history.replaceState(null, "", `${pathname}${calendarViewText(next)}`);
  const told = (words: string, link?: { href: string; label: string }): void => {
    announce(words, "news", link);
    void again();
  };
  const moved = async (e: EngagementBody, fromMs: number, toMs: number, revert: () => void) => {
    try {
      await moveTo(e, fromMs, toMs);
      told(`E-${e.number} is moved; it waits for the answers to the revised notices.`);
    } catch (thrown) {
      revert();
      announce(`E-${e.number} stays where it was. ${wordsOf(thrown)}`, "problem");
      void again();
    }
  };
  return (
    <div className="grid gap-4">
      <Toolbar view={view} stations={stations} fragments={fragments} onChange={change} />
      {error ? (
        <div className="grid justify-items-start gap-3">
          <ErrorNote error={error} title="The calendar could not be read" />
          <Button onClick={() => void again()}>Try again</Button>
        </div>
      ) : null}
      <p role="status" className="text-quiet">
        {reading ? "Reading the book …" : countWords(engagements.length, offers.length, view.fragment !== "")}
      </p>
      {show === "list" ? (
        <EntryList engagements={engagements} offers={offers} onPick={setPicked} />
      ) : (
        <>
          <section
            ref={scroller}
            aria-label="Time grid"
            // biome-ignore lint/a11y/noNoninteractiveTabindex: a scroller must be reachable by keyboard
            tabIndex={0}
            className="time-grid sheet max-h-[75dvh] overflow-auto"
          >
            <div className={show === "week" ? "min-w-[56rem]" : ""}>
              <TimeGrid
                view={{ ...view, show }}
                engagements={engagements}
                offers={offers}
                personId={personId}
                onPick={(pick) => ("offer" in pick ? setPicked(pick.offer) : setOpened(pick.engagement))}
                onMoved={(e, fromMs, toMs, revert) => void moved(e, fromMs, toMs, revert)}
              />
            </div>
          </section>
          <Legend />
        </>
      )}
      <BookingDialog
        pass={picked?.pass ?? null}
        mayPropose={mayPropose}
        onClose={() => setPicked(null)}
        onBooked={(body) => {
          setPicked(null);
          told(`E-${body.number} is proposed; the notices are on their way.`, {
            href: `/engagements/${body.id}`,
            label: `Open or scrub E-${body.number}`,
          });
        }}
      />
      <EngagementDialog
        engagement={opened}
        personId={personId}
        onClose={() => setOpened(null)}
        onDone={(_body, words) => {
          setOpened(null);
          told(words);
        }}
      />
    </div>
  );
}

async function moveTo(e: EngagementBody, fromMs: number, toMs: number): Promise<void> {
  const [from, to] = [new Date(fromMs).toISOString(), new Date(toMs).toISOString()];
  await sendJson<EngagementBody>(`/api/engagements/${e.id}`, "PATCH", { from, to, version: e.version });
}

function wordsOf(thrown: unknown): string {
  if (!(thrown instanceof FetchError)) return "The move failed.";
  const reasons = thrown.details.map((d) => d.message);
  return thrown.status === 422 && reasons.length > 0 ? reasons.join(" ") : thrown.message;
}

function countWords(engagements: number, offers: number, wholeFragment: boolean): string {
  const booked = `${engagements} ${engagements === 1 ? "engagement" : "engagements"}`;
  const kind = wholeFragment ? "of the chosen fragment" : "most worthwhile";
  return `${booked}; ${offers} bookable ${offers === 1 ? "pass" : "passes"}, ${kind}`;
}

/** Whether the window is too narrow for a week; the server takes it for wide. */
function useNarrow(): boolean {
  return useSyncExternalStore(
    (changed) => {
      const query = window.matchMedia("(max-width: 47.99rem)");
      query.addEventListener("change", changed);
      return () => query.removeEventListener("change", changed);
    },
    () => window.matchMedia("(max-width: 47.99rem)").matches,
    () => false,
  );
}
