import { describe, expect, test } from "vitest";
import {
  calendarViewText,
  readCalendarView,
  spanOfView,
  spanWords,
  stepView,
} from "@/app/_components/calendar/calendar-view";

const NOW_MS = Date.UTC(2031, 3, 6, 14, 47, 12);
const read = (text: string) => readCalendarView(new URLSearchParams(text), NOW_MS);
const iso = (ms: number) => new Date(ms).toISOString().slice(0, 16);

describe("what the calendar shows", () => {
  test("without an address: today's week on a wide screen", () => {
    const view = read("");
    expect(view).toMatchObject({ show: null, zoom: 24, station: "", fragment: "" });
    const { fromMs, toMs } = spanOfView({ ...view, show: "week" });
    expect([iso(fromMs), iso(toMs)]).toEqual(["2031-04-06T00:00", "2031-04-13T00:00"]);
  });

  test("a zoomed window never runs over midnight, and steps over it", () => {
    const view = read("show=day&zoom=6&at=2031-04-06T23:10Z");
    expect(spanWords(view)).toBe("Sunday 2031-04-06, 18:00Z to 24:00Z");
    expect(spanWords(stepView(view, 1))).toBe("Monday 2031-04-07, 00:00Z to 06:00Z");
    expect(spanWords(stepView(view, -1))).toBe("Sunday 2031-04-06, 12:00Z to 18:00Z");
    const hour = read("show=day&zoom=1&at=2031-04-06T23:10Z");
    expect(iso(spanOfView(stepView(hour, 1)).fromMs)).toBe("2031-04-07T00:00");
  });

  test("weeks step by seven days", () => {
    const view = { ...read("show=week&at=2031-12-29T00:00Z") };
    expect(spanWords(stepView(view, 1))).toBe("2032-01-05 to 2032-01-11");
  });

  test("an address is read again as it was written; what can't be read falls back", () => {
    const view = read("show=day&zoom=1&at=2031-04-06T05:00Z&station=0b6f6c1e-8a6c-4f8e-9a55-0d7f3a1c2b4d");
    expect(readCalendarView(new URLSearchParams(calendarViewText(view)), 0)).toEqual(view);
    expect(read("show=month&zoom=3&at=never&station=x")).toEqual(read(""));
  });
});
