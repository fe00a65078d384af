import { describe, expect, test } from "vitest";
import { heightText } from "@/app/_components/pass-list/change-cell";
import { untilText } from "@/app/_components/start/until-text";
import { waitingLines } from "@/app/_components/start/waiting";
import type { EngagementBody } from "@/lib/contracts/engagements";

function engagement(state: EngagementBody["state"], overdue = false): EngagementBody {
  const at = "2031-04-06T03:00:00.000Z";
  return {
    id: "e",
    number: 1,
    state,
    version: 1,
    passId: "p",
    stationId: "s",
    stationName: "Salt Pan North",
    fragmentId: "f",
    fragmentName: "QL-1",
    from: at,
    to: at,
    holdFrom: at,
    holdUntil: at,
    planner: "Ines",
    plannerId: "i",
    endReason: null,
    overdue,
    perigeeDropM: 1,
    semiMajorAxisDropM: 1,
    createdAt: at,
  };
}

describe("how far off something is", () => {
  test("is said in minutes, hours or days", () => {
    const MIN = 60_000;
    expect(untilText(42 * MIN)).toBe("in 42 min");
    expect(untilText(185 * MIN)).toBe("in 3 h 05 min");
    expect(untilText(52 * 60 * MIN)).toBe("in 2 d 4 h");
    expect(untilText(20_000)).toBe("now");
    expect(untilText(-12 * MIN)).toBe("12 min ago");
  });
});

describe("what waits", () => {
  test("is nothing when nothing does", () => {
    expect(waitingLines([engagement("confirmed")], 0)).toEqual([]);
  });

  test("is told in sentences that lead there, the most pressing first", () => {
    const book = [
      engagement("proposed"),
      engagement("proposed"),
      engagement("cleared"),
      engagement("confirmed", true),
    ];
    expect(waitingLines(book, 2)).toEqual([
      { text: "1 firing record is missing.", href: "/engagements?state=confirmed&when=past" },
      {
        text: "1 engagement is cleared and waits for two people to confirm.",
        href: "/engagements?state=cleared",
      },
      { text: "2 engagements are proposed and wait for answers.", href: "/engagements?state=proposed" },
      { text: "2 fragments were fired upon and wait for a newer element set.", href: "/fragments" },
    ]);
  });
});

describe("a change of height", () => {
  test("always has its sign and its unit", () => {
    expect(heightText(-412)).toBe("−412 m");
    expect(heightText(908)).toBe("+908 m");
    expect(heightText(-13_400)).toBe("−13.4 km");
    expect(heightText(123_400)).toBe("+123 km");
    expect(heightText(0)).toBe("0 m");
    expect(heightText(-999.7)).toBe("−1.0 km");
  });
});
