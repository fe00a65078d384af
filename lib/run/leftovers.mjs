import { isAlive, processFacts, signalProcess, waitUntil } from "./processes.mjs";
import { say } from "./words.mjs";

/**
 * Ends what a killed supervisor left running: only the very processes it wrote down, told by their start times.
 * @param {{ children?: { name: string, pid: number, startTicks?: string }[] } | null} entry the dead one's lock
 */
export async function endLeftovers(entry) {
  const children = Array.isArray(entry?.children) ? entry.children : [];
  const living = children.filter(
    ({ pid, startTicks }) => startTicks !== undefined && isAlive(pid, startTicks),
  );
  if (living.length === 0) return;
  say("Ending what an earlier start left running …");
  for (const { pid } of living) signalProcess(-pid, "SIGTERM");
  const gone = () => living.every(({ pid, startTicks }) => !isAlive(pid, startTicks));
  if (await waitUntil(gone, 1_500)) return;
  for (const { pid } of living) signalProcess(-pid, "SIGKILL");
  await waitUntil(gone, 1_000);
}

/**
 * The processes whose end is ours too when npm started us: npm passes SIGINT and SIGTERM on, but dies of SIGHUP and
 * SIGKILL alone. Empty when npm did not start us: then our parent may go its way.
 * @param {NodeJS.ProcessEnv} env
 * @returns {number[]}
 */
export function keepers(env = process.env) {
  if (env.npm_lifecycle_event === undefined) return [];
  const parent = process.ppid;
  const facts = processFacts(parent);
  // npm runs scripts by way of a shell, which may or may not have become this very process.
  return facts !== null && /^(sh|dash|bash|ash)$/.test(facts.name) ? [parent, facts.parent] : [parent];
}

/**
 * Calls back once when one of these processes has ended.
 * @param {readonly number[]} pids
 * @param {() => void} callback
 */
export function whenGone(pids, callback) {
  if (pids.length === 0) return;
  const marks = pids.map((pid) => ({ pid, startTicks: processFacts(pid)?.startTicks }));
  const timer = setInterval(() => {
    if (marks.every(({ pid, startTicks }) => isAlive(pid, startTicks))) return;
    clearInterval(timer);
    callback();
  }, 250);
  timer.unref();
}
