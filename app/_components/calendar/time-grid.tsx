"use client";

import type { DateSpanApi, EventApi, EventInput } from "@fullcalendar/core";
import interactionPlugin from "@fullcalendar/interaction";
import FullCalendar from "@fullcalendar/react";
import timeGridPlugin from "@fullcalendar/timegrid";
import { useEffect, useMemo, useRef } from "react";
import { utcTimeOfDay } from "@/app/_format/utc";
import type { EngagementBody } from "@/lib/contracts/engagements";
import { type CalendarView, spanOfView, type Zoom } from "./calendar-view";
import { engagementName, mayDrag, type OfferEntry, offerEntryName, offerTitle } from "./entries";

export interface TimeGridProps {
  readonly view: CalendarView & { readonly show: "week" | "day" };
  readonly engagements: readonly EngagementBody[];
  readonly offers: readonly OfferEntry[];
  readonly personId: string;
  readonly onPick: (entry: { engagement: EngagementBody } | { offer: OfferEntry }) => void;
  /** A drag or resize ended; `revert` puts it back where it was. */
  readonly onMoved: (engagement: EngagementBody, fromMs: number, toMs: number, revert: () => void) => void;
}

const SLOTS: Record<Zoom, { slot: string; snap: string; label: string }> = {
  24: { slot: "00:30:00", snap: "00:01:00", label: "01:00:00" },
  6: { slot: "00:05:00", snap: "00:00:10", label: "00:30:00" },
  1: { slot: "00:01:00", snap: "00:00:01", label: "00:05:00" },
};

const CLOCK = { hour: "2-digit", minute: "2-digit", hourCycle: "h23" } as const;

/** The grid of hours. Loaded in the browser only: its server rendering doesn't match the browser's. */
export default function TimeGrid(props: TimeGridProps) {
  const { view, engagements, offers, personId, onPick, onMoved } = props;
  const calendar = useRef<FullCalendar>(null);
  const events = useMemo(
    () => [...offers.map(offerEvent), ...engagements.map((e) => engagementEvent(e, personId))],
    [offers, engagements, personId],
  );
  const { fromMs, toMs } = spanOfView(view);
  const dayView = view.show === "day";
  const startHour = dayView ? new Date(fromMs).getUTCHours() : 0;
  useEffect(() => {
    // Its methods flush synchronously, which React forbids inside an effect.
    queueMicrotask(() =>
      calendar.current?.getApi().changeView(dayView ? "timeGridDay" : "timeGridSpan", new Date(fromMs)),
    );
  }, [dayView, fromMs]);
  const zoom = dayView ? view.zoom : 24;
  return (
    <FullCalendar
      ref={calendar}
      plugins={[timeGridPlugin, interactionPlugin]}
      initialView={dayView ? "timeGridDay" : "timeGridSpan"}
      initialDate={new Date(fromMs)}
      views={{ timeGridSpan: { type: "timeGrid", duration: { days: 7 } } }}
      headerToolbar={false}
      timeZone="UTC"
      locale="en-GB"
      allDaySlot={false}
      height="auto"
      slotMinTime={`${startHour}:00:00`}
      slotMaxTime={`${dayView ? startHour + (toMs - fromMs) / 3_600_000 : 24}:00:00`}
      slotDuration={SLOTS[zoom].slot}
      snapDuration={SLOTS[zoom].snap}
      slotLabelInterval={SLOTS[zoom].label}
      slotLabelFormat={CLOCK}
      eventTimeFormat={CLOCK}
      dayHeaderFormat={{ weekday: "short", day: "2-digit", month: "short" }}
      eventMinHeight={20}
      eventShortHeight={20}
      eventInteractive
      eventOverlap
      nowIndicator
      now={() => new Date().toISOString()}
      eventOrder="rank"
      events={events}
      eventContent={({ event }) => <EntryContent event={event} />}
      eventDidMount={({ el, event }) => nameEntry(el, String(event.extendedProps.name))}
      eventClick={({ event }) => onPick(pickOf(event))}
      eventAllow={allowMove}
      eventDrop={({ event, revert }) => moved(event, revert)}
      eventResize={({ event, revert }) => moved(event, revert)}
    />
  );

  function moved(event: EventApi, revert: () => void): void {
    const pick = pickOf(event);
    if (!("engagement" in pick) || !event.start || !event.end) {
      revert();
      return;
    }
    // A drop lies on the grid's steps; a dwell lies on whole seconds.
    const second = (at: Date): number => Math.round(at.getTime() / 1000) * 1000;
    onMoved(pick.engagement, second(event.start), second(event.end), revert);
  }
}

/** A dwell stays on its day's grid; everything else is for the server to judge. */
function allowMove(span: DateSpanApi): boolean {
  return span.end.getTime() > span.start.getTime();
}

/** The calendar makes its entries focusable, but gives them neither a role nor a name. */
function nameEntry(el: HTMLElement, name: string): void {
  el.setAttribute("role", "button");
  el.setAttribute("aria-label", name);
}

function pickOf(event: EventApi): { engagement: EngagementBody } | { offer: OfferEntry } {
  const { engagement, offer } = event.extendedProps as { engagement?: EngagementBody; offer?: OfferEntry };
  if (engagement) return { engagement };
  if (offer) return { offer };
  throw new Error("an entry of the calendar without a record");
}

function engagementEvent(engagement: EngagementBody, personId: string): EventInput {
  const movable = mayDrag(engagement, personId);
  return {
    // With its version: a changed entry is drawn anew, and named anew.
    id: `${engagement.id} ${engagement.version}`,
    title: `E-${engagement.number}`,
    start: engagement.from,
    end: engagement.to,
    editable: movable,
    durationEditable: movable,
    classNames: ["entry", `entry-${engagement.state}`],
    extendedProps: { engagement, name: engagementName(engagement), rank: 0 },
  };
}

function offerEvent(offer: OfferEntry): EventInput {
  return {
    id: offer.pass.id,
    title: offerTitle(offer),
    start: offer.opening.from,
    end: offer.opening.to,
    editable: false,
    classNames: ["entry", "entry-offer"],
    extendedProps: { offer, name: offerEntryName(offer), rank: 1 },
  };
}

function EntryContent({ event }: { readonly event: EventApi }) {
  const { engagement, offer } = event.extendedProps as { engagement?: EngagementBody; offer?: OfferEntry };
  if (!engagement) {
    return (
      <span className="entry-words">
        {event.title} {offer?.pass.stationName}
      </span>
    );
  }
  return (
    <span className="entry-words">
      <b>{event.title}</b> {`${engagement.state} ${utcTimeOfDay(engagement.from)} ${engagement.fragmentName}`}
    </span>
  );
}
