import { describe, expect, it } from "vitest";
import { composeNotice } from "@/lib/notices/compose";
import type { NoticeFacts } from "@/lib/notices/notice-facts";
import { REQUEST } from "./facts";

const ORGANIZER = { name: "Dwellbook", email: "book@dwellbook.invalid" };
const NOW = Date.UTC(2031, 3, 5, 12);
const compose = (amend: Partial<NoticeFacts> = {}) => composeNotice({ ...REQUEST, ...amend }, ORGANIZER, NOW);

/** Undoes the folding of RFC 5545, section 3.1, and the escapes of section 3.3.11. */
function entryLines(body: string): string[] {
  return body.replaceAll("\r\n ", "").split("\r\n");
}

describe("a request", () => {
  const { subject, textBody, htmlBody, calendarMethod, calendarBody } = compose();

  it("says in its subject what, where, when and until when", () => {
    expect(subject).toBe(
      "E-1042: laser dwell at Alder Point, 2031-04-06 03:12:45Z (answer by 2031-04-06 02:52:45Z)",
    );
  });

  it("gives every figure with its unit, in text and in HTML alike", () => {
    const figures = [
      "2031-04-06 03:12:45Z to 03:14:45Z (120 s)",
      // Zurich keeps summer time on that day: UTC + 2 h.
      "2031-04-06 05:12:45 to 05:14:45, Europe/Zurich",
      "46.5000° N, 8.2000° W, 1,400 m",
      "catalogue number 88001",
      "azimuth 201.3°, elevation 35.2°, slant range 1,203 km",
      "azimuth 290.1°, elevation 61.8°, slant range 906 km",
      "1064 nm",
      "20,000 J a pulse of 5 ns",
      "10 Hz (200 kW on average)",
      "aperture 8 m",
      "2031-04-06 02:52:45Z (2031-04-06 04:52:45, Europe/Zurich)",
      "https://book.example.invalid/answer/abc.def",
      "not a NOTAM",
      "nor is it a clearance",
      "Brume Air Unit is concerned because it is asked about every engagement at Alder Point.",
    ];
    for (const figure of figures) {
      expect(textBody).toContain(figure);
      expect(htmlBody).toContain(figure);
    }
  });

  it("carries a calendar request with the engagement's UID, its sequence and times in UTC", () => {
    expect(calendarMethod).toBe("REQUEST");
    const lines = entryLines(calendarBody);
    expect(lines).toContain("METHOD:REQUEST");
    expect(lines).toContain(`UID:${REQUEST.engagementId}@dwellbook.invalid`);
    expect(lines).toContain("SEQUENCE:0");
    expect(lines).toContain("DTSTART:20310406T031245Z");
    expect(lines).toContain("DTEND:20310406T031445Z");
    expect(lines).toContain("STATUS:TENTATIVE");
  });
});

describe("later notices", () => {
  it("revised: name the former times and void former answers", () => {
    const formerFromMs = Date.UTC(2031, 3, 5, 23, 59, 30);
    const { subject, textBody, calendarMethod, calendarBody } = compose({
      kind: "revised request",
      sequence: 1,
      change: "the times of the dwell",
      formerFromMs,
      formerToMs: formerFromMs + 60_000,
    });
    expect(subject).toMatch(/^E-1042 revised: /);
    expect(textBody).toContain("2031-04-05 23:59:30Z to 2031-04-06 00:00:30Z (60 s), no longer planned");
    expect(textBody).toContain("What has changed: the times of the dwell.");
    expect(textBody).toContain("Any answer to it is void");
    expect(calendarMethod).toBe("REQUEST");
    expect(entryLines(calendarBody)).toContain("SEQUENCE:1");
  });

  it("cancelled: give the reason, ask nothing, and cancel the entry under the same UID", () => {
    const amend = {
      kind: "cancellation",
      sequence: 2,
      reason: "cloud over the site",
      answerByMs: null,
      link: null,
    } as const;
    const { textBody, htmlBody, calendarMethod, calendarBody } = compose(amend);
    expect(textBody).toContain("Reason: cloud over the site");
    expect(textBody).not.toContain("Answer by");
    expect(htmlBody).not.toContain("<a ");
    expect(calendarMethod).toBe("CANCEL");
    const lines = entryLines(calendarBody);
    for (const line of [
      "METHOD:CANCEL",
      "STATUS:CANCELLED",
      "SEQUENCE:2",
      `UID:${REQUEST.engagementId}@dwellbook.invalid`,
    ]) {
      expect(lines).toContain(line);
    }
  });

  it("complete: say what was fired, or that nothing was", () => {
    const fired = {
      outcome: "in part",
      openedMs: REQUEST.dwellFromMs,
      closedMs: REQUEST.dwellFromMs + 30_000,
      pulses: 1200,
    } as const;
    const base = { kind: "completion", sequence: 1, answerByMs: null, link: null } as const;
    const done = compose({ ...base, fired });
    expect(done.textBody).toContain(
      "The shutter was open from 2031-04-06 03:12:45Z to 03:13:15Z (30 s); 1,200 pulses were fired. " +
        "Only part of the dwell was used.",
    );
    expect(done.calendarMethod).toBe("PUBLISH");
    const none = compose({
      ...base,
      fired: { outcome: "not fired", openedMs: null, closedMs: null, pulses: 0 },
    });
    expect(none.textBody).toContain("Nothing was fired");
  });
});

describe("names from outside", () => {
  it("cannot break out of the HTML", () => {
    const { htmlBody } = compose({ station: { ...REQUEST.station, name: `<img src=x onerror="a('b')">&` } });
    expect(htmlBody).not.toContain("<img");
    expect(htmlBody).toContain("&lt;img src=x onerror=&quot;a(&#39;b&#39;)&quot;&gt;&amp;");
  });

  it("cannot add lines to the subject, to the calendar or to the list of figures", () => {
    const name = "Alder\r\nBcc: all@example.invalid\nATTENDEE:mailto:x@example.invalid";
    const { subject, textBody, calendarBody } = compose({ station: { ...REQUEST.station, name } });
    expect(subject).not.toMatch(/[\r\n]/);
    expect(entryLines(calendarBody).filter((line) => line.startsWith("ATTENDEE:"))).toEqual([]);
    expect(textBody.split("\n").some((line) => line.startsWith("ATTENDEE"))).toBe(false);
  });

  it("a zone that nobody knows leaves UTC alone", () => {
    const { textBody } = compose({ authority: { ...REQUEST.authority, timeZone: "Nowhere/Land" } });
    expect(textBody).toContain("03:12:45Z");
    expect(textBody).not.toContain("Nowhere/Land");
  });

  it("an orbit that gives no direction is said, not hidden", () => {
    expect(compose({ beam: null }).textBody).toContain("no direction could be worked out");
  });
});
