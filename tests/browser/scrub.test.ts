import { afterAll, beforeAll, describe, expect, test } from "vitest";
import type { EngagementBody, EngagementSheetBody } from "@/lib/contracts/engagements";
import { askApi, book, bookablePass, type Desk, demoPerson, mailWith, openDesk } from "./support";

const LONG_MS = 180_000;

describe("an engagement that is called off", () => {
  let desk: Desk;
  let engagement: EngagementBody;
  const planner = demoPerson("planner");

  beforeAll(async () => {
    desk = await openDesk();
    engagement = await book(planner, await bookablePass(planner));
  }, LONG_MS);
  afterAll(() => desk.close());

  test(
    "a coordinator's objection shows its reasons on the engagement",
    async () => {
      const page = await desk.open(demoPerson("coordinator"));
      await page.goto("/notices");
      await page.getByRole("button", { name: `Answer E-${engagement.number}` }).click();
      await page.getByRole("radio", { name: /^objection/ }).check();
      await page.getByRole("button", { name: "Send this answer" }).click();
      await page.getByText("an objection needs its reasons").first().waitFor();
      await page.getByLabel("Reasons").fill("A parachute exercise holds the volume.");
      await page.getByRole("button", { name: "Send this answer" }).click();
      await page.getByText(`E-${engagement.number}: objection is recorded.`).waitFor();
      await page.goto(`/engagements/${engagement.id}`);
      const notices = page.getByRole("region", { name: "Notices and answers" });
      await notices.getByText("A parachute exercise holds the volume.").waitFor();
      expect(await page.getByRole("button", { name: "Scrub" }).count()).toBe(0);
      await page.context().close();
    },
    LONG_MS,
  );

  test(
    "an operator scrubs it at the watch; without a reason it is refused",
    async () => {
      const page = await desk.open(demoPerson("operator"), { width: 390 });
      await page.goto("/watch");
      const card = page.getByRole("listitem").filter({ hasText: `E-${engagement.number}` });
      expect(await card.getByRole("timer").textContent()).toMatch(/^T−\d\d+:\d\d:\d\d$/);
      await card.getByRole("button", { name: "Scrub" }).click();
      await page.getByRole("button", { name: "Scrub this engagement" }).click();
      await page.locator("dialog[open] [role=alert]").waitFor();
      const untouched = await askApi<EngagementSheetBody>(planner, `/api/engagements/${engagement.id}`);
      expect(untouched.state).toBe("proposed");
      await page.getByLabel("Reason").fill("The authority objects to this time.");
      await page.getByRole("button", { name: "Scrub this engagement" }).click();
      await page.getByText(`E-${engagement.number} is scrubbed`).waitFor();
      const ended = await askApi<EngagementSheetBody>(planner, `/api/engagements/${engagement.id}`);
      expect(ended.state).toBe("scrubbed");
      expect(ended.endReason).toBe("The authority objects to this time.");
      await page.context().close();
    },
    LONG_MS,
  );

  test(
    "the authority gets a cancellation with the reason",
    async () => {
      const mail = await mailWith(`E-${engagement.number} cancelled`);
      expect(mail.text).toContain("The authority objects to this time.");
      expect(mail.text).not.toContain("/answer/");
    },
    LONG_MS,
  );

  test("no page broke the content policy or threw", () => {
    expect(desk.complaints).toEqual([]);
  });
});
