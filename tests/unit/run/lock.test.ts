import { spawn } from "node:child_process";
import { mkdtempSync, readdirSync, readFileSync, rmSync, writeFileSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { afterEach, beforeEach, expect, test } from "vitest";
import { takeLock, withLock } from "@/lib/run/lock.mjs";
import { isAlive, processFacts } from "@/lib/run/processes.mjs";

let folder = "";
let path = "";

beforeEach(() => {
  folder = mkdtempSync(join(tmpdir(), "dwellbook-lock-"));
  path = join(folder, "start.lock");
});
afterEach(() => rmSync(folder, { recursive: true, force: true }));

/** A process that has ended: its number and start time are of nobody any more. */
async function endedProcess() {
  const child = spawn("sleep", ["0.05"]);
  const pid = child.pid ?? 0;
  const startTicks = processFacts(pid)?.startTicks;
  await new Promise((done) => child.on("close", done));
  return { pid, startTicks };
}

test("a lock is taken once, tells who has it, and is free after its release", () => {
  const first = takeLock(path, { address: "http://127.0.0.1:3000" });
  expect(first.taken).toBe(true);
  const second = takeLock(path);
  expect(second).toMatchObject({
    taken: false,
    holder: { pid: process.pid, address: "http://127.0.0.1:3000" },
  });
  if (first.taken) first.release();
  expect(takeLock(path).taken).toBe(true);
  expect(readdirSync(folder)).toEqual(["start.lock"]);
});

test("the lock of a dead process is taken over, and what it wrote is handed on", async () => {
  const dead = await endedProcess();
  writeFileSync(path, JSON.stringify({ ...dead, children: [{ name: "web server", pid: 1 }] }));
  const lock = takeLock(path);
  expect(lock).toMatchObject({ taken: true, before: { pid: dead.pid, children: [{ name: "web server" }] } });
  expect(JSON.parse(readFileSync(path, "utf8")).pid).toBe(process.pid);
});

test("a number that another process has by now does not hold the lock", () => {
  writeFileSync(path, JSON.stringify({ pid: process.pid, startTicks: "1" }));
  expect(takeLock(path).taken).toBe(true);
});

test("a broken lock file does not shut everybody out", () => {
  writeFileSync(path, "{ half");
  expect(takeLock(path).taken).toBe(true);
});

test("work under one lock is done one after the other", async () => {
  const order: string[] = [];
  const work = (name: string) =>
    withLock(path, async () => {
      order.push(`${name} begins`);
      await new Promise((done) => setTimeout(done, 30));
      order.push(`${name} ends`);
    });
  await Promise.all([work("a"), work("b")]);
  const [first, second] = order[0] === "a begins" ? ["a", "b"] : ["b", "a"];
  expect(order).toEqual([`${first} begins`, `${first} ends`, `${second} begins`, `${second} ends`]);
});

test("a failure under a lock frees it", async () => {
  await expect(withLock(path, () => Promise.reject(new Error("no")))).rejects.toThrow("no");
  expect(takeLock(path).taken).toBe(true);
});

test("an ended process is not alive; this one is", async () => {
  const { pid, startTicks } = await endedProcess();
  expect(isAlive(pid, startTicks)).toBe(false);
  expect(isAlive(process.pid)).toBe(true);
  expect(isAlive(process.pid, "1")).toBe(false);
});
