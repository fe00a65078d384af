import { spawn } from "node:child_process";
import { closeSync, openSync, readFileSync, renameSync, statSync } from "node:fs";
import { join } from "node:path";
import { tailOf } from "./commands.mjs";
import { treeDir } from "./folders.mjs";
import { endGroup, processFacts, signalProcess } from "./processes.mjs";
import { say } from "./words.mjs";

const steadyMs = 60_000;
const largestLogBytes = 5_000_000;

/**
 * How long to wait before a process is started again: doubles with every death in a row, up to half a minute.
 * @param {number} deaths deaths in a row, from 1
 */
export function restartDelayMs(deaths) {
  return Math.min(30_000, 500 * 2 ** (deaths - 1));
}

function openLog(path) {
  try {
    if (statSync(path).size > largestLogBytes) renameSync(path, `${path}.old`);
  } catch {
    // No log yet.
  }
  return openSync(path, "a", 0o600);
}

/**
 * Keeps processes running: each in a group of its own, with its words in a log, started again when it dies.
 * @param {{ logDir: string, onChange?: (children: { name: string, pid: number, startTicks: string | undefined }[]) => void }} options
 *   onChange hears of every new process, so that a killed supervisor's children can be found
 */
export function createSupervisor({ logDir, onChange = () => {} }) {
  /** @type {Map<string, any>} */
  const parts = new Map();
  let stopping = false;

  function launch(part) {
    if (stopping) return;
    const log = openLog(part.logPath);
    const child = spawn(part.command, part.args, {
      cwd: treeDir,
      env: part.env,
      detached: true,
      stdio: ["ignore", log, log],
    });
    closeSync(log);
    part.pid = child.pid;
    part.startedAtMs = Date.now();
    part.startTicks = child.pid ? processFacts(child.pid)?.startTicks : undefined;
    let told = false;
    const ended = (how) => {
      if (told) return;
      told = true;
      // What a dead process leaves behind in its group goes too.
      if (child.pid) signalProcess(-child.pid, "SIGKILL");
      part.pid = undefined;
      if (!stopping) startAgain(part, how);
    };
    child.on("error", (error) => ended(error.message));
    child.on("exit", (code, signal) => ended(signal ?? `exit ${code}`));
    onChange(
      [...parts.values()]
        .filter((one) => one.pid)
        .map(({ name, pid, startTicks }) => ({ name, pid, startTicks })),
    );
  }

  function startAgain(part, how) {
    part.deaths = Date.now() - part.startedAtMs > steadyMs ? 1 : part.deaths + 1;
    const delayMs = restartDelayMs(part.deaths);
    say(
      `The ${part.name} ended (${how}); starting it again in ${delayMs / 1000} s. Its log: ${part.logPath}`,
    );
    part.timer = setTimeout(() => launch(part), delayMs);
  }

  return {
    /**
     * Starts a process and keeps it running.
     * @param {{ name: string, command: string, args: readonly string[], env: NodeJS.ProcessEnv }} wish
     */
    keep(wish) {
      const part = { ...wish, logPath: join(logDir, `${wish.name.replaceAll(" ", "-")}.log`), deaths: 0 };
      parts.set(wish.name, part);
      launch(part);
    },
    /** The last words of a process. */
    lastWords(name) {
      const part = parts.get(name);
      return part ? tailOf(readFileSync(part.logPath, "utf8")) : "";
    },
    /** From now on nothing is started again. */
    hold() {
      stopping = true;
      for (const part of parts.values()) clearTimeout(part.timer);
    },
    /**
     * Ends the processes whose names begin so, all at once.
     * @param {string} prefix
     * @param {number} graceMs
     */
    async end(prefix, graceMs) {
      const chosen = [...parts.values()].filter((part) => part.pid && part.name.startsWith(prefix));
      await Promise.all(chosen.map((part) => endGroup(part.pid, graceMs)));
    },
  };
}
