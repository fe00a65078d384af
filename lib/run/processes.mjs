import { readFileSync } from "node:fs";

/** Waits.
 * @param {number} ms
 * @returns {Promise<void>}
 */
export const pause = (ms) => new Promise((done) => setTimeout(done, ms));

/**
 * What the kernel says about a process; null when it is gone. The start time (in clock ticks since boot) tells a
 * process from a later one that was given the same number.
 * @param {number} pid
 */
export function processFacts(pid) {
  try {
    const text = readFileSync(`/proc/${pid}/stat`, "utf8");
    // The name is in parentheses and may hold anything, so count from the last one.
    const fields = text.slice(text.lastIndexOf(")") + 2).split(" ");
    const name = text.slice(text.indexOf("(") + 1, text.lastIndexOf(")"));
    return { name, state: fields[0], parent: Number(fields[1]), startTicks: fields[19] };
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
 * @param {NodeJS.Signals | 0} signal
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
 * Ends a process group: asks with SIGTERM, and with SIGKILL when the grace is over.
 * @param {number} leader the number of the group's first process
 * @param {number} graceMs
 */
export async function endGroup(leader, graceMs) {
  if (!signalProcess(-leader, "SIGTERM")) return;
  if (await waitUntil(() => !signalProcess(-leader, 0), graceMs)) return;
  signalProcess(-leader, "SIGKILL");
  await waitUntil(() => !signalProcess(-leader, 0), 300);
}
