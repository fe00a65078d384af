import { readFileSync } from "node:fs";
import { join } from "node:path";
import { type Browser, type BrowserContext, chromium, type Page } from "playwright-core";
import type { EngagementBody } from "@/lib/contracts/engagements";
import type { PassBody } from "@/lib/contracts/passes";

/** A demo sign-in as the start of the product writes it. */
interface Access {
  readonly name: string;
  readonly email: string;
  readonly password: string;
  readonly role: string;
  readonly token: string;
}

function setting(name: "DWELLBOOK_TEST_URL" | "DWELLBOOK_TEST_MAIL_URL" | "DWELLBOOK_DATA_DIR"): string {
  const value = process.env[name];
  if (!value) throw new Error(`${name} is not set: browser tests run against a started product, by npm test`);
  return value;
}

export const productUrl = (): string => setting("DWELLBOOK_TEST_URL").replace(/\/$/, "");
const mailUrl = (): string => setting("DWELLBOOK_TEST_MAIL_URL").replace(/\/$/, "");

/** Somebody of the demo, by role and rank among that role's people. */
export function demoPerson(role: string, index = 0): Access {
  const path = join(setting("DWELLBOOK_DATA_DIR"), "demo-access.json");
  const all = JSON.parse(readFileSync(path, "utf8")) as Access[];
  const found = all.filter((person) => person.role === role)[index];
  if (!found) throw new Error(`the demo has no ${role} number ${index + 1}`);
  return found;
}

/** A browser, with everything that its pages complained about. */
export interface Desk {
  readonly browser: Browser;
  /** Words of breaches of the content policy and of errors in page scripts. */
  readonly complaints: string[];
  /** A page signed in as somebody; null for nobody. */
  open(person: Access | null, options?: { width?: number; bypassCSP?: boolean }): Promise<Page>;
  close(): Promise<void>;
}

export async function openDesk(): Promise<Desk> {
  const browser = await chromium.launch({ executablePath: "/usr/bin/chromium", args: ["--no-sandbox"] });
  const complaints: string[] = [];
  const signedIn = new Map<string, Awaited<ReturnType<BrowserContext["storageState"]>>>();
  const open: Desk["open"] = async (person, options = {}) => {
    const storageState = person && (signedIn.get(person.email) ?? (await signIn(browser, person)));
    if (person && storageState) signedIn.set(person.email, storageState);
    const context = await browser.newContext({
      baseURL: productUrl(),
      viewport: { width: options.width ?? 1440, height: 900 },
      bypassCSP: options.bypassCSP ?? false,
      ...(storageState ? { storageState } : {}),
    });
    context.setDefaultTimeout(45_000);
    context.setDefaultNavigationTimeout(90_000);
    const page = await context.newPage();
    page.on("console", (message) => {
      if (/content security policy/i.test(message.text())) complaints.push(message.text());
    });
    page.on("pageerror", (error) => complaints.push(String(error)));
    return page;
  };
  return { browser, complaints, open, close: () => browser.close() };
}

/** Signs in by the form, as people do. */
async function signIn(browser: Browser, person: Access) {
  const context = await browser.newContext({ baseURL: productUrl() });
  const page = await context.newPage();
  await page.goto("/sign-in", { timeout: 90_000 });
  await page.getByLabel("E-mail address").fill(person.email);
  await page.getByLabel("Password").fill(person.password);
  await page.getByRole("button", { name: "Sign in" }).click();
  await page.waitForURL((url) => url.pathname !== "/sign-in", { timeout: 90_000 });
  const state = await context.storageState();
  await context.close();
  return state;
}

/** Asks the API with somebody's token; throws for every answer that is no success. */
export async function askApi<T>(person: Access, path: string, init: RequestInit = {}): Promise<T> {
  const response = await fetch(`${productUrl()}${path}`, {
    ...init,
    headers: { authorization: `Bearer ${person.token}`, "content-type": "application/json" },
  });
  const text = await response.text();
  if (!response.ok) throw new Error(`${init.method ?? "GET"} ${path}: ${response.status} ${text}`);
  return JSON.parse(text) as T;
}

export type Bookable = PassBody & { readonly dwell: NonNullable<PassBody["dwell"]> };

const HOUR_MS = 3_600_000;

/** The catalogue number of the object that the story imports. */
export const IMPORTED_NUMBER = 98_765;

/**
 * The best pass that can be booked, far enough ahead for every lead time and change deadline, that waits for
 * nobody but the clearing authority, and with no rule unchecked.
 */
export async function bookablePass(person: Access): Promise<Bookable> {
  const from = new Date(Date.now() + 6 * HOUR_MS).toISOString();
  const to = new Date(Date.now() + 4 * 24 * HOUR_MS).toISOString();
  const { passes } = await askApi<{ passes: PassBody[] }>(person, `/api/passes?from=${from}&to=${to}`);
  const fit = passes
    .filter((p): p is Bookable => p.dwell !== null && p.engagementId === null)
    // What a test imports is swept while other tests go on: its passes may still change.
    .filter((p) => p.catalogNumber !== IMPORTED_NUMBER)
    .filter((p) => p.closures.every((c) => c.verdict === "closed" || c.rule === "authority answers"))
    .filter((p) => !p.closures.some((c) => c.rule === "airspace"))
    .sort((a, b) => b.dwell.semiMajorAxisDropM - a.dwell.semiMajorAxisDropM);
  const [best] = fit;
  if (!best) throw new Error(`none of ${passes.length} passes can be booked`);
  return best;
}

/** Books a pass by the API. */
export async function book(person: Access, pass: Bookable): Promise<EngagementBody> {
  const body = JSON.stringify({ passId: pass.id, from: pass.dwell.from, to: pass.dwell.to });
  return askApi<EngagementBody>(person, "/api/engagements", { method: "POST", body });
}

export interface Mail {
  readonly subject: string;
  readonly text: string;
}

/** Waits for a mail whose subject holds the words, and reads it from the mail fake. */
export async function mailWith(words: string, waitMs = 60_000): Promise<Mail> {
  const endMs = Date.now() + waitMs;
  while (Date.now() < endMs) {
    const list = (await (await fetch(`${mailUrl()}/messages.json`)).json()) as {
      id: string;
      subject: string;
    }[];
    const found = list.find((mail) => mail.subject.includes(words));
    if (found) return (await (await fetch(`${mailUrl()}/messages/${found.id}.json`)).json()) as Mail;
    await new Promise((resolve) => setTimeout(resolve, 500));
  }
  throw new Error(`no mail about “${words}” came within ${waitMs / 1000} s`);
}

/** The path of the answer link in a mail. */
export function answerPathIn(mail: Mail): string {
  const path = /https?:\/\/[^\s/]+(\/answer\/[\w.~%-]+)/.exec(mail.text)?.[1];
  if (!path) throw new Error(`no answer link in “${mail.subject}”`);
  return path;
}

/** Fills the operators' checklist with what is so just now. */
export async function fillChecklist(page: Page): Promise<void> {
  for (const label of ["Air unit called at", "Interlock tested at", "Crewed list checked at"]) {
    await page.getByRole("button", { name: `${label}: now` }).click();
  }
  await page.getByLabel("Clock offset").fill("-2.5");
  await page.getByLabel("Weather").fill("clear, wind 4 m/s");
  await page.getByLabel("The spotter is in place").check();
}
