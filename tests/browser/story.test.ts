import { afterAll, beforeAll, describe, expect, test } from "vitest";
import type { EngagementSheetBody } from "@/lib/contracts/engagements";
import {
  answerPathIn,
  askApi,
  type Bookable,
  bookablePass,
  type Desk,
  demoPerson,
  fillChecklist,
  IMPORTED_NUMBER,
  mailWith,
  openDesk,
} from "./support";

const LONG_MS = 180_000;

/** The state that stands beside the number in an engagement's head. */
const STATE = "h1 .mark";

describe("from an import to a confirmed engagement", () => {
  let desk: Desk;
  let pass: Bookable;
  let engagementId = "";
  let number = 0;
  const planner = demoPerson("planner");

  beforeAll(async () => {
    desk = await openDesk();
    pass = await bookablePass(planner);
  }, LONG_MS);
  afterAll(() => desk.close());

  test(
    "a planner imports a file and reads which line is bad",
    async () => {
      const page = await desk.open(planner);
      await page.goto("/import");
      await page
        .getByLabel("Or paste them here")
        .fill(`${inventedSet(IMPORTED_NUMBER)}\n${brokenSet(98_766)}\n`);
      await page.getByRole("button", { name: "Preview" }).click();
      const report = page.getByRole("region", { name: "Preview" });
      await report.getByText("1 set would be stored, 1 set refused").waitFor();
      expect(await report.textContent()).toMatch(/line [34], column \d+/);
      await page.getByRole("button", { name: "Store 1 good set" }).click();
      const stored = page.getByRole("region", { name: "Import", exact: true });
      await stored.getByText("1 set stored, 1 set refused").waitFor();
      const { fragments } = await askApi<{ fragments: { catalogNumber: number | null }[] }>(
        planner,
        "/api/fragments",
      );
      expect(fragments.map((f) => f.catalogNumber)).toContain(IMPORTED_NUMBER);
      expect(fragments.map((f) => f.catalogNumber)).not.toContain(98_766);
      await page.context().close();
    },
    LONG_MS,
  );

  test(
    "the planner finds the pass in the list and proposes its dwell",
    async () => {
      const page = await desk.open(planner);
      const from = pass.riseAt.slice(0, 10);
      await page.goto(`/passes?fragment=${pass.fragmentId}&hours=168&from=${from}T00:00:00.000Z`);
      await page.locator(`a[href="/passes/${pass.id}"]`).first().click();
      await page.waitForURL(`**/passes/${pass.id}`);
      await page.getByRole("button", { name: "Propose this dwell" }).click();
      await page.getByRole("button", { name: "Propose and send notices" }).click();
      await page.waitForURL("**/engagements/*");
      engagementId = new URL(page.url()).pathname.split("/").at(-1) ?? "";
      expect(await page.locator(STATE).textContent()).toBe("proposed");
      number = Number(/E-(\d+)/.exec((await page.locator("h1").textContent()) ?? "")?.[1]);
      expect(number).toBeGreaterThan(0);
      expect(await page.getByRole("region", { name: "What it waits for" }).textContent()).toContain(
        "Brightwater Clearing Desk",
      );
      await page.context().close();
    },
    LONG_MS,
  );

  test(
    "the authority answers by the link in its mail, on a telephone and without a sign-in",
    async () => {
      const path = answerPathIn(await mailWith(`E-${number}:`));
      const page = await desk.open(null, { width: 390 });
      await page.goto(path);
      const question = await page.locator("main").textContent();
      expect(question).toContain(pass.stationName);
      expect(question).toContain(pass.dwell.from.slice(11, 19));
      expect(question).toMatch(/azimuth/i);
      const beforehand = await askApi<EngagementSheetBody>(planner, `/api/engagements/${engagementId}`);
      expect(beforehand.notices.map((n) => n.answer)).toEqual([null]);
      await page.getByRole("radio", { name: /^no objection The dwell/ }).check();
      await page.getByRole("button", { name: "Send this answer" }).click();
      await page.getByText("Give your name.").first().waitFor();
      await page.getByLabel("Your name").fill("Duty officer Rane");
      await page.getByRole("button", { name: "Send this answer" }).click();
      await page.getByText("by Duty officer Rane").waitFor();
      const sheet = await askApi<EngagementSheetBody>(planner, `/api/engagements/${engagementId}`);
      expect(sheet.notices[0]?.answer?.outcome).toBe("no objection");
      expect(sheet.notices[0]?.openedAt).not.toBeNull();
      expect(sheet.state).toBe("cleared");
      const width = await page.evaluate("document.documentElement.scrollWidth");
      expect(width).toBeLessThanOrEqual(390);
      await page.context().close();
    },
    LONG_MS,
  );

  test(
    "an operator's empty checklist is refused field by field; two names confirm",
    async () => {
      const page = await desk.open(demoPerson("operator", 0));
      await page.goto(`/engagements/${engagementId}`);
      await page.getByRole("button", { name: "Confirm", exact: true }).click();
      await page.getByRole("button", { name: "Confirm with my name" }).click();
      await page.getByText("When was the air unit called?").waitFor();
      expect(await page.locator("dialog[open]").textContent()).toContain("The spotter must be in place.");
      await fillChecklist(page);
      await page.getByRole("button", { name: "Confirm with my name" }).click();
      await page.getByText("a second person has to confirm").waitFor();
      expect(await page.locator(STATE).textContent()).toBe("cleared");
      await page.getByText("you have given your name already").waitFor();
      expect(await page.getByRole("button", { name: "Confirm", exact: true }).isDisabled()).toBe(true);
      await page.context().close();

      const other = await desk.open(demoPerson("operator", 1));
      await other.goto(`/engagements/${engagementId}`);
      await other.getByRole("button", { name: "Confirm", exact: true }).click();
      await other.getByRole("heading", { name: `Second confirmation of E-${number}` }).waitFor();
      await fillChecklist(other);
      await other.getByRole("button", { name: "Confirm with my name" }).click();
      await other.locator(`${STATE}[data-state="confirmed"]`).waitFor();
      const record = other.getByRole("button", { name: "Record firing" });
      expect(await record.isDisabled()).toBe(true);
      expect(await other.locator("#why-not-fire").textContent()).toContain("The dwell has not begun");
      await other.context().close();
    },
    LONG_MS,
  );

  test(
    "a firing record before the dwell is refused in words, and what was typed stays",
    async () => {
      const page = await desk.open(demoPerson("operator", 0));
      // The page keeps its form shut before the dwell; here it is told otherwise, so that the server has to refuse.
      await page.route(`**/api/engagements/${engagementId}`, async (route) => {
        const response = await route.fetch();
        const sheet = (await response.json()) as EngagementSheetBody;
        const commands = sheet.commands.map((c) => ({ ...c, refusals: [] }));
        await route.fulfill({ response, json: { ...sheet, commands } });
      });
      await page.goto(`/engagements/${engagementId}`);
      // Coming back to a page reads it anew, but not within five seconds of the last time.
      await page.waitForTimeout(5_500);
      await page.evaluate("window.dispatchEvent(new Event('focus'))");
      await page.getByRole("button", { name: "Record firing" }).click();
      await page.getByRole("button", { name: "Keep this record" }).click();
      await page.getByText("Choose what happened.").waitFor();
      await page.getByRole("radio", { name: /^in part/ }).check();
      await page.getByLabel("Shutter opened").fill(`${pass.dwell.from.slice(0, 19)}.250Z`);
      await page.getByLabel("Pulses").fill("100");
      await page.getByRole("button", { name: "Add an interruption" }).click();
      await page.getByLabel("Interruption 1 at").fill(pass.dwell.from.slice(0, 19));
      await page.getByLabel("Cause").fill("aircraft");
      await page.getByLabel("Lost (s)").fill("4");
      await page.getByRole("button", { name: "Keep this record" }).click();
      await page.getByText("The dwell has not begun: there is nothing to record yet.").first().waitFor();
      const words = (await page.locator("dialog[open]").textContent()) ?? "";
      expect(words).toContain("When did the shutter close?");
      expect(await page.getByLabel("Pulses").inputValue()).toBe("100");
      const sheet = await askApi<EngagementSheetBody>(planner, `/api/engagements/${engagementId}`);
      expect([sheet.state, sheet.firing]).toEqual(["confirmed", null]);
      await page.context().close();
    },
    LONG_MS,
  );

  test(
    "the ledger tells who did what, and the calendar shows the engagement",
    async () => {
      const page = await desk.open(planner);
      await page.goto(`/ledger?subjectId=${engagementId}`);
      const rows = await page.locator("tbody tr").allInnerTexts();
      const all = rows.join("\n");
      expect(all).toContain("proposed engagement");
      expect(all).toContain("answered: no objection");
      expect(all).toContain("gave the first confirmation of engagement");
      expect(all).toContain("confirmed engagement");
      expect(all).toContain(demoPerson("operator", 1).name);
      await page.goto(`/calendar?show=day&at=${pass.dwell.from.slice(0, 10)}T00:00Z`);
      const entry = page.getByRole("button", { name: new RegExp(`^E-${number} confirmed `) });
      await entry.waitFor();
      await entry.focus();
      await page.keyboard.press("Enter");
      await page.getByRole("link", { name: `Open E-${number}` }).click();
      await page.waitForURL(`**/engagements/${engagementId}`);
      await page.context().close();
    },
    LONG_MS,
  );

  test("no page broke the content policy or threw", () => {
    expect(desk.complaints).toEqual([]);
  });
});

/** An invented object in a low orbit with an epoch of now, as two lines with right checksums. */
function inventedSet(catalogNumber: number): string {
  const now = new Date();
  const yearStartMs = Date.UTC(now.getUTCFullYear(), 0, 1);
  const day = ((now.getTime() - yearStartMs) / 86_400_000 + 1).toFixed(8).padStart(12, "0");
  const year = String(now.getUTCFullYear() % 100).padStart(2, "0");
  const line1 = `1 ${catalogNumber}U 31001A   ${year}${day}  .00000100  00000-0  50000-4 0  999`;
  const line2 = `2 ${catalogNumber}  53.2000 120.0000 0012000  80.0000 280.0000 14.85000000  100`;
  return `${withChecksum(line1)}\n${withChecksum(line2)}`;
}

/** The same with a wrong checksum on its second line. */
function brokenSet(catalogNumber: number): string {
  const [line1 = "", line2 = ""] = inventedSet(catalogNumber).split("\n");
  const wrong = (Number(line2.at(-1)) + 1) % 10;
  return `${line1}\n${line2.slice(0, -1)}${wrong}`;
}

/** Sum of the digits, minus signs as one, modulo ten: the format's own rule. */
function withChecksum(line: string): string {
  const body = line.padEnd(68);
  const sum = [...body].reduce((all, c) => all + (c === "-" ? 1 : /\d/.test(c) ? Number(c) : 0), 0);
  return body + String(sum % 10);
}
