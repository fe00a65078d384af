import { spawn } from "node:child_process";
import { readFileSync } from "node:fs";

/** Waits.
 * @param {number} ms
 */
export const pause = (ms) => new Promise((done) => setTimeout(done, ms));

/**
 * What the kernel says about a process: its state letter, parent and start time in clock ticks; null when it is gone.
 * The start time tells a process from a later one that was given the same number.
 * @param {number} pid
 */
export function processFacts(pid) {
  try {
    const text = readFileSync(`/proc/${pid}/stat`, "utf8");
    // The name is in parentheses and may hold anything, so count from the last one.
    const fields = text.slice(text.lastIndexOf(")") + 2).split(" ");
    const name = text.slice(text.indexOf("(") + 1, text.lastIndexOf(")"));
    return {
      name,
      state: fields[0],
      parent: Number(fields[1]),
      group: Number(fields[2]),
      startTicks: fields[19],
    };
  } catch {
    return null;
  }
}

/**
 * Whether a process lives. A zombie does not. With a start time, only the very process that had it counts.
 * @param {number} pid
 * @param {string} [startTicks]
 */
export function isAlive(pid, startTicks) {
  const facts = processFacts(pid);
  if (facts === null || facts.state === "Z" || facts.state === "X") return false;
  return startTicks === undefined || facts.startTicks === startTicks;
}

/**
 * Sends a signal to a process, or with a negative number to its group; false when nobody was there.
 * @param {number} pid
 * @param {NodeJS.Signals} signal
 */
export function signalProcess(pid, signal) {
  try {
    process.kill(pid, signal);
    return true;
  } catch {
    return false;
  }
}

/**
 * Waits until a condition holds.
 * @param {() => boolean | Promise<boolean>} condition
 * @param {number} limitMs
 * @param {number} stepMs
 * @returns {Promise<boolean>} false when the time ran out
 */
export async function waitUntil(condition, limitMs, stepMs = 25) {
  const endMs = Date.now() + limitMs;
  for (;;) {
    if (await condition()) return true;
    if (Date.now() >= endMs) return false;
    await pause(stepMs);
  }
}

/**
 * Runs a command to its end and keeps what it says.
 * @param {string} command
 * @param {readonly string[]} args
 * @param {import("node:child_process").SpawnOptions & { input?: string, watch?: (child: any) => void }} options
 * @returns {Promise<{ code: number, out: string, err: string }>} code is -1 when the command could not be started
 */
export function run(command, args, options = {}) {
  const { input, watch, ...rest } = options;
  return new Promise((done) => {
    const child = spawn(command, args, { ...rest, stdio: ["pipe", "pipe", "pipe"] });
    watch?.(child);
    let out = "";
    let err = "";
    child.stdout.setEncoding("utf8").on("data", (text) => {
      out += text;
    });
    child.stderr.setEncoding("utf8").on("data", (text) => {
      err += text;
    });
    child.on("error", (error) => done({ code: -1, out, err: error.message }));
    child.on("close", (code) => done({ code: code ?? -1, out, err }));
    child.stdin.on("error", () => {});
    child.stdin.end(input ?? "");
  });
}

/** The last lines of a text, for a failure that must be shown.
 * @param {string} text
 * @param {number} lines
 */
export function tailOf(text, lines = 15) {
  return text.trimEnd().split("\n").slice(-lines).join("\n");
}
