import { describe, expect, it } from "vitest";
import { type CalendarMessage, composeCalendar, composeFeed } from "@/lib/formats/icalendar";
import { readCalendar, theLine, unescapeText } from "./read-calendar";

const MESSAGE: CalendarMessage = {
  method: "REQUEST",
  uid: "6f1c@desk.example.org",
  sequence: 3,
  stampMs: Date.UTC(2031, 3, 5, 20, 0, 1),
  startMs: Date.UTC(2031, 3, 6, 3, 12, 45),
  endMs: Date.UTC(2031, 3, 6, 3, 15, 45),
  status: "TENTATIVE",
  summary: "Dwell on fragment 90012",
  description: "First line\nSecond, with commas; and semicolons \\ and é 日本 🛰",
  location: "Ridge Station",
  organizer: { name: "Ridge Station desk", email: "desk@example.org" },
  attendee: { name: "North Air Unit", email: "duty@example.net" },
  url: "https://desk.example.org/answer/abc?x=1&y=2",
};

function linesOf(changes: Partial<CalendarMessage> = {}) {
  return readCalendar(composeCalendar({ ...MESSAGE, ...changes }));
}

describe("a calendar request", () => {
  const lines = linesOf();

  it("is one event in one calendar, with the method of RFC 5546", () => {
    expect(lines.slice(0, 4).map((l) => `${l.name}:${l.value}`)).toEqual([
      "BEGIN:VCALENDAR",
      "VERSION:2.0",
      "PRODID:-//Dwellbook//Engagement book//EN",
      "METHOD:REQUEST",
    ]);
    expect(lines.filter((l) => l.name === "BEGIN").map((l) => l.value)).toEqual(["VCALENDAR", "VEVENT"]);
    expect(lines.slice(-2).map((l) => `${l.name}:${l.value}`)).toEqual(["END:VEVENT", "END:VCALENDAR"]);
  });

  it("has UTC times, UID and SEQUENCE", () => {
    const values = ["UID", "SEQUENCE", "DTSTAMP", "DTSTART", "DTEND", "STATUS"].map(
      (n) => theLine(lines, n).value,
    );
    expect(values).toEqual([
      "6f1c@desk.example.org",
      "3",
      "20310405T200001Z",
      "20310406T031245Z",
      "20310406T031545Z",
      "TENTATIVE",
    ]);
  });

  it("asks its attendee for an answer", () => {
    const attendee = theLine(lines, "ATTENDEE");
    expect(attendee.parameters).toEqual({
      ROLE: "REQ-PARTICIPANT",
      PARTSTAT: "NEEDS-ACTION",
      RSVP: "TRUE",
      CN: "North Air Unit",
    });
    expect(attendee.value.toLowerCase()).toBe("mailto:duty@example.net");
    const organizer = theLine(lines, "ORGANIZER");
    expect([organizer.parameters.CN, organizer.value]).toEqual([
      "Ridge Station desk",
      "mailto:desk@example.org",
    ]);
  });

  it("carries its texts through escaping and folding", () => {
    expect(unescapeText(theLine(lines, "DESCRIPTION").value)).toBe(MESSAGE.description);
    expect(unescapeText(theLine(lines, "SUMMARY").value)).toBe(MESSAGE.summary);
    expect(unescapeText(theLine(lines, "LOCATION").value)).toBe(MESSAGE.location);
    expect(theLine(lines, "URL").value).toBe(MESSAGE.url);
  });

  it("covers at least the booked time in whole seconds", () => {
    const found = linesOf({ startMs: MESSAGE.startMs + 400, endMs: MESSAGE.endMs + 400 });
    expect([theLine(found, "DTSTART").value, theLine(found, "DTEND").value]).toEqual([
      "20310406T031245Z",
      "20310406T031546Z",
    ]);
  });
});

describe("other methods", () => {
  it("cancel with the status CANCELLED and without asking for an answer", () => {
    const lines = linesOf({ method: "CANCEL", status: "CANCELLED", sequence: 4 });
    expect(theLine(lines, "METHOD").value).toBe("CANCEL");
    expect(theLine(lines, "STATUS").value).toBe("CANCELLED");
    expect(theLine(lines, "ATTENDEE").parameters).toEqual({ ROLE: "REQ-PARTICIPANT", CN: "North Air Unit" });
  });

  it("publish without an attendee", () => {
    const lines = linesOf({ method: "PUBLISH", status: "CONFIRMED" });
    expect(theLine(lines, "METHOD").value).toBe("PUBLISH");
    expect(lines.some((l) => l.name === "ATTENDEE")).toBe(false);
  });
});

describe("text that tries to break out", () => {
  const evil =
    'x\r\nATTENDEE:mailto:eve@example.org\nBEGIN:VALARM\rSTATUS:CONFIRMED\u2028UID:0\u0085END:VEVENT\0\u0007"';

  it.each(["summary", "description", "location"] as const)("in the %s stays there", (key) => {
    const lines = linesOf({ [key]: evil });
    expect(lines.map((l) => l.name)).toEqual(linesOf().map((l) => l.name));
    const expected = 'x|ATTENDEE:mailto:eve@example.org|BEGIN:VALARM|STATUS:CONFIRMED|UID:0|END:VEVENT"';
    const value = unescapeText(theLine(lines, key.toUpperCase()).value);
    expect(value).toBe(expected.replaceAll("|", key === "summary" ? " " : "\n"));
  });

  it("in a name stays there, without double quotes and backslashes", () => {
    const lines = linesOf({ attendee: { name: `A^n\\${evil}`, email: "duty@example.net" } });
    expect(lines.map((l) => l.name)).toEqual(linesOf().map((l) => l.name));
    expect(theLine(lines, "ATTENDEE").parameters.CN).toBe(
      "A^^n/x ATTENDEE:mailto:eve@example.org BEGIN:VALARM STATUS:CONFIRMED UID:0 END:VEVENT'",
    );
  });

  it("in a link is encoded", () => {
    const lines = linesOf({ url: "https://desk.example.org/a,b;c\\d\r\ne" });
    expect(theLine(lines, "URL").value).toBe("https://desk.example.org/a%2Cb%3Bc/de");
  });

  it.each<[string, Partial<CalendarMessage>]>([
    ["a UID with a line break", { uid: "a\r\nb" }],
    ["an empty UID", { uid: "" }],
    ["an address with a line break", { attendee: { name: "A", email: "a@b\r\nX:y" } }],
    ["an address with a comma", { organizer: { name: "A", email: "a,b@example.org" } }],
    ["a link of another kind", { url: "javascript:alert(1)" }],
    ["a link that is none", { url: "answer/abc" }],
    ["a request without attendee", { attendee: null }],
    ["a cancellation with another status", { method: "CANCEL" }],
    ["no duration", { endMs: MESSAGE.startMs }],
    ["no time", { startMs: Number.NaN }],
    ["a negative sequence", { sequence: -1 }],
    ["a broken sequence", { sequence: 1.5 }],
    ["a stamp that is no time", { stampMs: Number.NaN }],
  ])("%s is refused", (_what, changes) => {
    expect(() => composeCalendar({ ...MESSAGE, ...changes })).toThrow(RangeError);
  });
});

describe("a feed", () => {
  const { method: _method, attendee: _attendee, ...event } = MESSAGE;

  it("publishes many events, with a name", () => {
    const lines = readCalendar(
      composeFeed("Ridge, the station\r\nX:1", [event, { ...event, uid: "second@x.example" }]),
    );
    expect(theLine(lines, "METHOD").value).toBe("PUBLISH");
    expect(theLine(lines, "X-WR-CALNAME").value).toBe("Ridge  the station X:1");
    expect(lines.filter((l) => l.name === "UID").map((l) => l.value)).toEqual([
      event.uid,
      "second@x.example",
    ]);
    expect(lines.filter((l) => l.name === "BEGIN" && l.value === "VEVENT")).toHaveLength(2);
    expect(theLine(lines, "REFRESH-INTERVAL").value).toBe("PT15M");
  });

  it("may be empty", () => {
    const lines = readCalendar(composeFeed("Nothing booked", []));
    expect(lines.map((l) => l.name)).not.toContain("UID");
    expect(lines.at(-1)).toMatchObject({ name: "END", value: "VCALENDAR" });
  });
});
