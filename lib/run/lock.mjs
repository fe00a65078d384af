import { linkSync, renameSync, rmSync, writeFileSync } from "node:fs";
import { randomWord, readJson, writeJson } from "./folders.mjs";
import { isAlive, pause, processFacts } from "./processes.mjs";
import { Problem } from "./words.mjs";

/** The holder's entry: enough to tell it from a later process with the same number. */
function ownEntry(extra) {
  return { pid: process.pid, startTicks: processFacts(process.pid)?.startTicks, ...extra };
}

/**
 * Whether the process that wrote a lock still lives.
 * @param {any} entry
 */
export function holderLives(entry) {
  return Number.isInteger(entry?.pid) && isAlive(entry.pid, entry.startTicks);
}

/**
 * Takes a lock file in one step, or says who has it. A lock whose holder is dead is taken over.
 * @param {string} path
 * @param {object} extra what else to write into it
 * @returns {{ taken: true, before: any, amend: (extra: object) => void, release: () => void } | { taken: false, holder: any }}
 */
export function takeLock(path, extra = {}) {
  const draft = `${path}.${process.pid}.${randomWord(4)}`;
  writeFileSync(draft, JSON.stringify(ownEntry(extra)), { mode: 0o600 });
  let before = null;
  try {
    for (;;) {
      try {
        linkSync(draft, path);
        break;
      } catch (error) {
        if (error.code !== "EEXIST") throw error;
      }
      const holder = readJson(path);
      if (holderLives(holder)) return { taken: false, holder };
      before = takeAway(path) ?? before;
    }
  } finally {
    rmSync(draft, { force: true });
  }
  return {
    taken: true,
    before,
    amend: (more) => writeJson(path, ownEntry({ ...extra, ...more })),
    release: () => rmSync(path, { force: true }),
  };
}

/** Removes a dead holder's file; puts it back when another start was quicker and it is no longer the dead one. */
function takeAway(path) {
  const aside = `${path}.dead.${process.pid}`;
  try {
    renameSync(path, aside);
  } catch {
    return null;
  }
  const entry = readJson(aside);
  if (holderLives(entry)) {
    try {
      linkSync(aside, path);
    } catch {
      // A third start has it by now; the loop above will see that one.
    }
  }
  rmSync(aside, { force: true });
  return entry;
}

/**
 * Does something while holding a lock, waiting for it in turn.
 * @template T
 * @param {string} path
 * @param {() => Promise<T>} work
 * @param {number} limitMs
 * @returns {Promise<T>}
 */
export async function withLock(path, work, limitMs = 120_000) {
  const endMs = Date.now() + limitMs;
  for (;;) {
    const lock = takeLock(path);
    if (lock.taken) {
      try {
        return await work();
      } finally {
        lock.release();
      }
    }
    if (Date.now() > endMs) {
      throw new Problem(
        `Process ${lock.holder.pid} has been setting this up for too long; end it and try again.`,
      );
    }
    await pause(100);
  }
}
