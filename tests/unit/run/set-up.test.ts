import { mkdirSync, mkdtempSync, rmSync, writeFileSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { expect, test } from "vitest";
import { accessTable } from "@/lib/run/access.mjs";
import { sourceMark } from "@/lib/run/build.mjs";
import { childEnvironment, workerCount } from "@/lib/run/environment.mjs";
import { readHealth } from "@/lib/run/health.mjs";
import { installMatches } from "@/lib/run/node-modules.mjs";
import { orderMajors } from "@/lib/run/postgres-programs.mjs";
import { parsePostmasterFile } from "@/lib/run/postgres-server.mjs";
import { restartDelayMs } from "@/lib/run/supervisor.mjs";

test("15 comes before other versions, old ones never, and an existing cluster gets its own", () => {
  expect(orderMajors([13, 17, 15, 16], null)).toEqual([15, 17, 16]);
  expect(orderMajors([13, 14], null)).toEqual([]);
  expect(orderMajors([15, 16], 16)).toEqual([16]);
});

// The lines of postmaster.pid: PostgreSQL 15, src/include/utils/pidfile.h.
test("postmaster.pid is read line by line", () => {
  const text = "4711\n/srv/cluster\n1796134762\n39559\n\n127.0.0.1\n  5350243         4\nready   \n";
  expect(parsePostmasterFile(text)).toEqual({
    pid: 4711,
    dataDirectory: "/srv/cluster",
    port: 39559,
    memory: "4",
    status: "ready",
  });
  expect(parsePostmasterFile("")).toBeNull();
  expect(parsePostmasterFile("-12\n")).toBeNull();
});

test("only status 200 is well; anything else says what is missing", () => {
  expect(readHealth(200, "{}").ok).toBe(true);
  expect(readHealth(503, '{"mail":\n "unreachable"}')).toEqual({
    ok: false,
    words: 'it answers 503: {"mail": "unreachable"}',
  });
  expect(readHealth(404, "")).toEqual({ ok: false, words: "it answers 404" });
});

test("the demo sign-ins are shown without their tokens", () => {
  const entry = {
    name: "Ada",
    email: "ada@x.invalid",
    password: "word",
    role: "planner",
    token: "hidden-token",
  };
  const table = accessTable([entry]);
  for (const shown of ["Ada", "ada@x.invalid", "word", "planner"]) expect(table).toContain(shown);
  expect(table).not.toContain("hidden-token");
  expect(accessTable(null)).toBe("");
});

test("workers: one for each core unless a sensible number is set", () => {
  expect(workerCount(undefined, 4)).toBe(4);
  expect(workerCount("7", 4)).toBe(7);
  for (const wrong of ["0", "65", "two", "1.5"]) expect(() => workerCount(wrong, 4)).toThrow(wrong);
});

test("a process that keeps dying is started ever more slowly", () => {
  expect([1, 2, 3, 20].map(restartDelayMs)).toEqual([500, 1_000, 2_000, 30_000]);
});

const parts = {
  dataDir: "/srv/data",
  port: 3007,
  databaseUrl: "postgresql://app@h/d",
  ownerUrl: "postgresql://owner@h/d",
  secrets: { session: "s".repeat(32), link: "l".repeat(32) },
};

test("the parts are told where everything is, and what is set outside stands", () => {
  const surroundings = { DWELLBOOK_BASE_URL: "https://book.example", NEXT_DIST_DIR: ".other" };
  const env = childEnvironment({ ...parts, surroundings, mail: { smtp: 25, mailPage: 80 } });
  expect(env).toMatchObject({
    PORT: "3007",
    TZ: "UTC",
    SMTP_URL: "smtp://127.0.0.1:25",
    DWELLBOOK_MAIL_PAGE_URL: "http://127.0.0.1:80",
    DWELLBOOK_BASE_URL: "https://book.example",
    NEXTAUTH_URL: "https://book.example",
    NEXTAUTH_SECRET: parts.secrets.session,
    DWELLBOOK_LINK_SECRET: parts.secrets.link,
  });
  expect(env).not.toHaveProperty("NEXT_DIST_DIR");
});

test("an outside mail server replaces the fake", () => {
  const env = childEnvironment({ ...parts, surroundings: { SMTP_URL: "smtp://mail.example" }, mail: null });
  expect(env.SMTP_URL).toBe("smtp://mail.example");
  expect(env).not.toHaveProperty("DWELLBOOK_MAIL_PAGE_URL");
  expect(env.DWELLBOOK_BASE_URL).toBe("http://127.0.0.1:3007");
});

const lockOf = (packages: object) => ({ packages: { "": {}, ...packages } });

test("installed packages match the lock file only in every version", () => {
  const wanted = lockOf({
    "node_modules/a": { version: "1.0.0" },
    "node_modules/b": { version: "2.0.0", optional: true },
  });
  const a = { "node_modules/a": { version: "1.0.0" } };
  expect(installMatches(wanted, { packages: a })).toBe(true);
  expect(installMatches(wanted, { packages: { "node_modules/a": { version: "1.0.1" } } })).toBe(false);
  expect(installMatches(wanted, { packages: {} })).toBe(false);
  expect(installMatches(wanted, { packages: { ...a, "node_modules/c": { version: "1.0.0" } } })).toBe(false);
  expect(installMatches(wanted, null)).toBe(false);
});

test("a build is old when a source or a setting changes, not when the start command does", () => {
  const root = mkdtempSync(join(tmpdir(), "dwellbook-build-"));
  try {
    mkdirSync(join(root, "app"));
    mkdirSync(join(root, "lib", "run"), { recursive: true });
    writeFileSync(join(root, "app", "page.tsx"), "one");
    const first = sourceMark(root);
    writeFileSync(join(root, "lib", "run", "start.mjs"), "new");
    expect(sourceMark(root)).toEqual(first);
    writeFileSync(join(root, "tsconfig.json"), "{}");
    expect(sourceMark(root).compiler).not.toBe(first.compiler);
    writeFileSync(join(root, "app", "page.tsx"), "two");
    expect(sourceMark(root).sources).not.toBe(first.sources);
  } finally {
    rmSync(root, { recursive: true, force: true });
  }
});
