import { describe, expect, test } from "vitest";
import { mayDrag, offerName, offersOf, PASSES_SHOWN } from "@/app/_components/calendar/entries";
import { sortNotices } from "@/app/_components/notice/sort-notices";
import { countdownText } from "@/app/watch/countdown";
import type { EngagementBody, NoticeBody } from "@/lib/contracts/engagements";
import type { PassBody } from "@/lib/contracts/passes";

const at = (second: number) => new Date(Date.UTC(2031, 3, 6, 3, 0, second)).toISOString();

function passOf(number: number, part: Partial<PassBody> = {}): PassBody {
  const dwell = {
    from: at(number * 10 + 2),
    to: at(number * 10 + 6),
    perigeeDropM: 1,
    semiMajorAxisDropM: number,
    perigeeDropBandM: [0, 2],
    semiMajorAxisDropBandM: [0, 2],
  } as const;
  const openings = [
    { from: at(number * 10 - 4), to: at(number * 10), pending: [] },
    { from: at(number * 10 + 1), to: at(number * 10 + 8), pending: [] },
  ];
  const base = { id: `p${number}`, fragmentName: `QL-${number}`, stationName: "Corvane Ridge" };
  return { ...base, engagementId: null, dwell, openings, ...part } as PassBody;
}

describe("bookable passes in the calendar", () => {
  const passes = Array.from({ length: 40 }, (_, i) => passOf(i));

  test("are the most worthwhile ones, in the order of time", () => {
    const shown = offersOf(passes, false).map(({ pass }) => pass.id);
    expect(shown).toEqual(passes.slice(40 - PASSES_SHOWN).map(({ id }) => id));
  });

  test("are all of a chosen fragment", () => {
    expect(offersOf(passes, true)).toHaveLength(40);
  });

  test("leave out what is booked or has no dwell, and lie over the opening of their dwell", () => {
    const [offer, ...none] = offersOf(
      [passOf(3), passOf(1, { dwell: null }), passOf(2, { engagementId: "e" })],
      false,
    );
    expect(none).toEqual([]);
    expect(offer?.opening.from).toBe(at(31));
    expect(offer && offerName(offer)).toBe(
      "Book QL-3 over Corvane Ridge, open from 03:00:31Z to 03:00:38Z, orbit \u22123 m",
    );
  });

  test("only the planner's own proposal can be dragged", () => {
    const of = (state: string, plannerId: string) => mayDrag({ state, plannerId } as EngagementBody, "ines");
    expect([of("proposed", "ines"), of("proposed", "other"), of("cleared", "ines")]).toEqual([
      true,
      false,
      false,
    ]);
  });
});

describe("notices at the desk", () => {
  const noticeOf = (id: string, part: Partial<NoticeBody>): NoticeBody =>
    ({
      id,
      kind: "request",
      superseded: false,
      engagementState: "proposed",
      answer: null,
      answerBy: null,
      dwellFrom: at(50),
      createdAt: at(0),
      ...part,
    }) as NoticeBody;
  const answer = { outcome: "no objection" } as NonNullable<NoticeBody["answer"]>;

  test("what waits comes by its deadline; what asks nothing any more does not wait", () => {
    const sorted = sortNotices([
      noticeOf("late", { answerBy: at(40) }),
      noticeOf("soon", { answerBy: at(20) }),
      noticeOf("answered", { answer }),
      noticeOf("replaced", { superseded: true }),
      noticeOf("ended", { engagementState: "scrubbed" }),
      noticeOf("cancelled", { kind: "cancellation", engagementState: "scrubbed", createdAt: at(9) }),
    ]);
    expect(sorted.waiting.map(({ id }) => id)).toEqual(["soon", "late"]);
    expect(sorted.answered.map(({ id }) => id)).toEqual(["answered"]);
    expect(sorted.others.map(({ id }) => id)).toEqual(["cancelled", "replaced", "ended"]);
  });
});

test("the count-down counts hours beyond a day, and up after the start", () => {
  expect(countdownText((34 * 3600 + 33 * 60 + 38) * 1000 + 900)).toBe("T\u221234:33:38");
  expect(countdownText(-12_000)).toBe("T+00:00:12");
});
