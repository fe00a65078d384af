"use client";

import dynamic from "next/dynamic";
import { useState } from "react";
import { announce } from "@/app/_client/announce";
import { Button } from "@/app/_components/button";
import { ErrorNote } from "@/app/_components/error-note";
import type { EngagementBody } from "@/lib/contracts/engagements";
import { BookingDialog } from "./booking-dialog";
import { EngagementDialog } from "./engagement-dialog";
import type { OfferEntry } from "./entries";
import { EntryList } from "./entry-list";
import { Legend } from "./legend";
import { moveOrRevert } from "./move-or-revert";
import type { TimeGridProps } from "./time-grid";
import { Toolbar } from "./toolbar";
import { useCalendarView } from "./use-calendar-view";
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

type Pick = { engagement: EngagementBody } | { offer: OfferEntry };

/** The calendar: engagements in front, bookable passes behind, and the dialogs to book and to move. */
export function CalendarDesk({ nowMs, personId, mayPropose, stations, fragments }: CalendarDeskProps) {
  const { view, change } = useCalendarView(nowMs);
  const { engagements, offers, reading, error, again } = useEntries(view);
  const [picked, setPicked] = useState<Pick | null>(null);
  const done = (): void => {
    setPicked(null);
    void again();
  };
  const entries = { engagements, offers };
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
      {view.show === "list" ? (
        <EntryList {...entries} onPick={(offer) => setPicked({ offer })} />
      ) : (
        <GridPane
          {...entries}
          view={{ ...view, show: view.show }}
          reading={reading}
          personId={personId}
          onPick={setPicked}
          onMoved={(e, fromMs, toMs, revert) => void moveOrRevert(e, { fromMs, toMs }, revert).then(again)}
        />
      )}
      <Dialogs
        picked={picked}
        personId={personId}
        mayPropose={mayPropose}
        onDone={done}
        onClose={setPicked}
      />
    </div>
  );
}

/** The grid in a scroller that the keyboard reaches, with its legend. */
function GridPane({ reading, ...grid }: TimeGridProps & { readonly reading: boolean }) {
  const scroller = useScrollToStart(grid.view, reading);
  return (
    <>
      <section
        ref={scroller}
        aria-label="Time grid"
        // biome-ignore lint/a11y/noNoninteractiveTabindex: a scroller must be reachable by keyboard
        tabIndex={0}
        className="time-grid sheet max-h-[75dvh] overflow-auto"
      >
        <div className={grid.view.show === "week" ? "min-w-[56rem]" : ""}>
          <TimeGrid {...grid} />
        </div>
      </section>
      <Legend />
    </>
  );
}

function Dialogs(props: {
  readonly picked: Pick | null;
  readonly personId: string;
  readonly mayPropose: boolean;
  readonly onDone: () => void;
  readonly onClose: (nothing: null) => void;
}) {
  const { picked, onDone, onClose } = props;
  const close = (): void => onClose(null);
  return (
    <>
      <BookingDialog
        pass={picked && "offer" in picked ? picked.offer.pass : null}
        mayPropose={props.mayPropose}
        onClose={close}
        onBooked={(body) => {
          const link = { href: `/engagements/${body.id}`, label: `Open or scrub E-${body.number}` };
          announce(`E-${body.number} is proposed; the notices are on their way.`, "news", link);
          onDone();
        }}
      />
      <EngagementDialog
        engagement={picked && "engagement" in picked ? picked.engagement : null}
        personId={props.personId}
        onClose={close}
        onDone={(_body, words) => {
          announce(words);
          onDone();
        }}
      />
    </>
  );
}

function countWords(engagements: number, offers: number, wholeFragment: boolean): string {
  const booked = `${engagements} ${engagements === 1 ? "engagement" : "engagements"}`;
  const kind = wholeFragment ? "of the chosen fragment" : "most worthwhile";
  return `${booked}; ${offers} bookable ${offers === 1 ? "pass" : "passes"}, ${kind}`;
}
