import { readFileSync } from "node:fs";
import { createRequire } from "node:module";
import type { Page } from "playwright-core";
import { afterAll, beforeAll, describe, expect, test } from "vitest";
import type { EngagementBody } from "@/lib/contracts/engagements";
import { askApi, type Desk, demoPerson, openDesk, productUrl } from "./support";

const LONG_MS = 240_000;
const axeSource = readFileSync(createRequire(import.meta.url).resolve("axe-core/axe.min.js"), "utf8");

interface Finding {
  readonly id: string;
  readonly impact: string | null;
  readonly nodes: readonly { readonly html: string }[];
}

/** Findings of the two gravest kinds, with the first place of each. */
async function graveFindings(page: Page): Promise<string[]> {
  await page.addScriptTag({ content: axeSource });
  const findings = (await page.evaluate("axe.run(document).then((r) => r.violations)")) as Finding[];
  return findings
    .filter(({ impact }) => impact === "serious" || impact === "critical")
    .map(({ id, nodes }) => `${id}: ${nodes[0]?.html.slice(0, 200) ?? ""}`);
}

describe("no serious finding", () => {
  let desk: Desk;
  let engagement: EngagementBody;
  const operator = demoPerson("operator");

  beforeAll(async () => {
    desk = await openDesk();
    const { engagements } = await askApi<{ engagements: EngagementBody[] }>(operator, "/api/engagements");
    const [first] = engagements.filter(({ state }) => state === "confirmed" || state === "fired");
    if (!first) throw new Error("the demo has no engagement");
    engagement = first;
  }, LONG_MS);
  afterAll(() => desk.close());

  const pages: readonly { name: string; path: () => string; shows: string }[] = [
    { name: "calendar", path: () => "/calendar", shows: ".fc-timegrid" },
    { name: "empty week", path: () => "/calendar?show=week&at=2031-04-06T00:00Z", shows: ".fc-timegrid" },
    { name: "calendar as a list", path: () => "/calendar?show=list", shows: "table, main p" },
    { name: "passes", path: () => "/passes", shows: "table" },
    { name: "engagements", path: () => "/engagements?when=all", shows: "table" },
    { name: "engagement", path: () => `/engagements/${engagement.id}`, shows: "h1 .mark" },
    { name: "notices", path: () => "/notices", shows: "h1" },
    { name: "watch", path: () => "/watch", shows: "[role=timer]" },
    { name: "ledger", path: () => "/ledger", shows: "table" },
  ];

  for (const theme of ["light", "dark", "red"] as const) {
    test(
      `on the main pages in the ${theme} theme`,
      async () => {
        const page = await desk.open(operator, { bypassCSP: true });
        await page.context().addCookies([{ name: "dwellbook.theme", value: theme, url: productUrl() }]);
        const found: Record<string, string[]> = {};
        for (const { name, path, shows } of pages) {
          await page.goto(path());
          await page.locator(shows).first().waitFor();
          expect(await page.locator("html").getAttribute("data-theme")).toBe(theme);
          await page.waitForTimeout(700);
          const grave = await graveFindings(page);
          if (grave.length > 0) found[name] = grave;
        }
        expect(found).toEqual({});
        await page.context().close();
      },
      LONG_MS,
    );
  }
});
