import { afterAll, beforeAll, describe, expect, test } from "vitest";
import type { EngagementBody, EngagementSheetBody } from "@/lib/contracts/engagements";
import { askApi, type Bookable, book, bookablePass, type Desk, demoPerson, openDesk } from "./support";

const LONG_MS = 180_000;

describe("the calendar", () => {
  let desk: Desk;
  let pass: Bookable;
  const planner = demoPerson("planner");

  beforeAll(async () => {
    desk = await openDesk();
    pass = await bookablePass(planner);
  }, LONG_MS);
  afterAll(() => desk.close());

  test(
    "a planner books a pass from the list by keyboard",
    async () => {
      const page = await desk.open(planner);
      const day = pass.dwell.from.slice(0, 10);
      await page.goto(`/calendar?show=list&at=${day}T00:00Z&fragment=${pass.fragmentId}`);
      const time = pass.openings.find((o) => o.from <= pass.dwell.from && pass.dwell.to <= o.to)?.from;
      const button = page.getByRole("button", {
        name: new RegExp(
          `^Book ${pass.fragmentName} over ${pass.stationName}, open from ${time?.slice(11, 19)}Z`,
        ),
      });
      await button.focus();
      await page.keyboard.press("Enter");
      await page.getByRole("button", { name: "Propose and send notices" }).click();
      await page.getByRole("link", { name: /^Open or scrub E-\d+$/ }).waitFor();
      const { engagements } = await askApi<{ engagements: EngagementBody[] }>(
        planner,
        `/api/engagements?fragment=${pass.fragmentId}&state=proposed`,
      );
      expect(engagements.map((e) => e.passId)).toContain(pass.id);
      await page.context().close();
    },
    LONG_MS,
  );

  test(
    "a proposal is moved by a second in the dialog, and a move out of its opening is refused in words",
    async () => {
      const other = await bookablePass(planner);
      const booked = await book(planner, other);
      const page = await desk.open(planner);
      await page.goto(`/calendar?show=day&at=${booked.from.slice(0, 10)}T00:00Z&station=${booked.stationId}`);
      await page.getByRole("button", { name: new RegExp(`^E-${booked.number} proposed`) }).press("Enter");
      await page.getByRole("button", { name: "Move", exact: true }).click();
      await page.getByRole("button", { name: "Dwell to: earlier by 1 s" }).click();
      await page.getByRole("button", { name: "Move and send revised notices" }).click();
      await page.getByText(`E-${booked.number} is moved`).waitFor();
      const moved = await askApi<EngagementSheetBody>(planner, `/api/engagements/${booked.id}`);
      expect(Date.parse(moved.to)).toBe(Date.parse(booked.to) - 1000);
      expect(moved.from).toBe(booked.from);

      await page.goto(`/engagements/${booked.id}`);
      await page.getByRole("button", { name: "Move", exact: true }).click();
      const from = page.getByLabel("Dwell from", { exact: true });
      await from.fill(
        other.riseAt.slice(11, 17) + String(Number(other.riseAt.slice(17, 19))).padStart(2, "0"),
      );
      await from.press("Enter");
      await page.getByRole("button", { name: "Move and send revised notices" }).click();
      const alert = page.locator("dialog[open] [role=alert]");
      await alert.waitFor();
      expect(await alert.textContent()).toContain("It was not moved; it stands where it was");
      const still = await askApi<EngagementSheetBody>(planner, `/api/engagements/${booked.id}`);
      expect([still.from, still.to]).toEqual([moved.from, moved.to]);
      await page.context().close();
    },
    LONG_MS,
  );

  test(
    "a drag out of the pass is refused in words, and the entry goes back",
    async () => {
      const booked = await book(planner, await bookablePass(planner));
      const page = await desk.open(planner);
      const hour = booked.from.slice(0, 13);
      await page.goto(`/calendar?show=day&zoom=1&at=${hour}:00Z&station=${booked.stationId}`);
      const entry = page.getByRole("button", { name: new RegExp(`^E-${booked.number} proposed`) });
      // In the middle, so that the drop lies inside the grid too; hovering waits until it stands still.
      await entry.evaluate((el) => el.scrollIntoView({ block: "center" }));
      await entry.hover({ position: { x: 20, y: 6 } });
      const before = await entry.boundingBox();
      if (!before) throw new Error("the engagement is not drawn");
      const [x, y] = [before.x + 20, before.y + 6];
      // A minute is 20 px: a quarter of an hour later or earlier lies outside the pass.
      const by = Number(booked.from.slice(14, 16)) < 30 ? 300 : -300;
      await page.mouse.down();
      await page.mouse.move(x, y + by / 2, { steps: 6 });
      await page.mouse.move(x, y + by, { steps: 6 });
      await page.mouse.up();
      await page.getByText(`E-${booked.number} stays where it was.`).waitFor();
      await expect
        .poll(async () => (await entry.boundingBox())?.y, { timeout: 10_000 })
        .toBeCloseTo(before.y, -1);
      const still = await askApi<EngagementSheetBody>(planner, `/api/engagements/${booked.id}`);
      expect([still.from, still.to, still.version]).toEqual([booked.from, booked.to, booked.version]);
      await page.context().close();
    },
    LONG_MS,
  );

  test(
    "the zoom shows 6 h and 1 h of a day, and a narrow screen opens on the day",
    async () => {
      const page = await desk.open(demoPerson("operator"), { width: 390 });
      await page.goto("/calendar?at=2031-04-06T00:00Z");
      await page.locator(".fc-timegrid").waitFor();
      expect(await page.getByRole("button", { name: "Day", exact: true }).getAttribute("aria-pressed")).toBe(
        "true",
      );
      const labels = page.locator(".fc-timegrid-slot-label-cushion");
      expect(await labels.count()).toBe(24);
      await page.getByRole("button", { name: "6 h", exact: true }).click();
      await page.getByRole("heading", { name: /00:00Z to 06:00Z/ }).waitFor();
      await expect.poll(() => labels.last().textContent(), { timeout: 20_000 }).toBe("05:30");
      await page.getByRole("button", { name: "1 h", exact: true }).click();
      await page.getByRole("button", { name: "Later", exact: true }).click();
      await page.getByRole("heading", { name: /01:00Z to 02:00Z/ }).waitFor();
      await expect.poll(() => labels.first().textContent(), { timeout: 20_000 }).toBe("01:00");
      expect(await page.evaluate("document.documentElement.scrollWidth")).toBeLessThanOrEqual(390);
      await page.context().close();
    },
    LONG_MS,
  );

  test("no page broke the content policy or threw", () => {
    expect(desk.complaints).toEqual([]);
  });
});
