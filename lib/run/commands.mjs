import { spawn } from "node:child_process";
import { createInterface } from "node:readline";
import { endGroup } from "./processes.mjs";

/** The groups of commands that run now, so that a signal during set-up ends them too. */
const running = new Set();
let closed = false;

/**
 * Runs a command to its end, in a process group of its own, and keeps what it says.
 * @param {string} command
 * @param {readonly string[]} args
 * @param {import("node:child_process").SpawnOptions & { input?: string, onLine?: (line: string) => void }} options
 *   onLine hears every line of the normal output while the command runs
 * @returns {Promise<{ code: number, out: string, err: string }>} code is -1 when it could not start or was killed
 */
export function run(command, args, options = {}) {
  const { input, onLine, ...rest } = options;
  if (closed) return new Promise(() => {});
  return new Promise((done) => {
    const child = spawn(command, args, { ...rest, detached: true, stdio: ["pipe", "pipe", "pipe"] });
    if (child.pid) running.add(child.pid);
    const heard = { out: "", err: "" };
    child.stdout.setEncoding("utf8").on("data", (text) => {
      heard.out += text;
    });
    child.stderr.setEncoding("utf8").on("data", (text) => {
      heard.err += text;
    });
    if (onLine) createInterface({ input: child.stdout }).on("line", onLine);
    const finish = (code, err) => {
      running.delete(child.pid);
      done({ code, out: heard.out, err });
    };
    child.on("error", (error) => finish(-1, error.message));
    child.on("close", (code) => finish(code ?? -1, heard.err));
    child.stdin.on("error", () => {});
    child.stdin.end(input ?? "");
  });
}

/**
 * Runs a command to its end with our own terminal as its input and output.
 * @param {string} command
 * @param {readonly string[]} args
 * @param {import("node:child_process").SpawnOptions & { limitMs?: number }} options limitMs ends it when it takes longer
 * @returns {Promise<number>} its exit code, -1 when it could not start or was killed
 */
export function runShown(command, args, options = {}) {
  const { limitMs, ...rest } = options;
  if (closed) return new Promise(() => {});
  return new Promise((done) => {
    const child = spawn(command, args, { ...rest, detached: true, stdio: ["ignore", "inherit", "inherit"] });
    if (child.pid) running.add(child.pid);
    const timer = limitMs && child.pid ? setTimeout(() => endGroup(child.pid, 1_000), limitMs) : undefined;
    const finish = (code) => {
      clearTimeout(timer);
      running.delete(child.pid);
      done(code);
    };
    child.on("error", () => finish(-1));
    child.on("close", (code) => finish(code ?? -1));
  });
}

/**
 * Ends every command that still runs. Whoever asks for another one waits for ever, for this process is about to end.
 * @param {number} graceMs
 */
export async function endCommands(graceMs = 800) {
  closed = true;
  await Promise.all([...running].map((leader) => endGroup(leader, graceMs)));
}

/**
 * The last lines of a text, for a failure that must be shown.
 * @param {string} text
 * @param {number} lines
 */
export function tailOf(text, lines = 15) {
  return text.trimEnd().split("\n").slice(-lines).join("\n");
}
