import { spawn } from "node:child_process";
import { closeSync, openSync, readFileSync, realpathSync, rmSync } from "node:fs";
import { join } from "node:path";
import { tailOf } from "./commands.mjs";
import { freePort } from "./ports.mjs";
import { asAccount } from "./postgres-account.mjs";
import { isAlive, pause, processFacts, signalProcess, waitUntil } from "./processes.mjs";
import { Problem } from "./words.mjs";

/** The servers this process started or adopted, and whether it may still start one. */
const servers = new Set();
let closed = false;

/**
 * Reads postmaster.pid as PostgreSQL documents it: number, data directory, start, port, socket folder, address,
 * shared memory key, status; a line each.
 * @param {string} text
 */
export function parsePostmasterFile(text) {
  const lines = text.split("\n").map((line) => line.trim());
  const pid = Number(lines[0]);
  if (!Number.isInteger(pid) || pid <= 0) return null;
  const memory = (lines[6] ?? "").split(/\s+/)[1] ?? "";
  return { pid, dataDirectory: lines[1] ?? "", port: Number(lines[3] ?? 0), memory, status: lines[7] ?? "" };
}

function readPostmaster(cluster) {
  try {
    return parsePostmasterFile(readFileSync(join(cluster, "postmaster.pid"), "utf8"));
  } catch {
    return null;
  }
}

function samePlace(one, other) {
  try {
    return realpathSync(one) === realpathSync(other);
  } catch {
    return false;
  }
}

/** Whether some process still uses a shared memory segment: backends may outlive a killed server for a moment. */
function memoryInUse(id) {
  try {
    const rows = readFileSync("/proc/sysvipc/shm", "utf8").split("\n").slice(1);
    return rows
      .map((row) => row.trim().split(/\s+/))
      .some((cells) => cells[1] === id && Number(cells[6]) > 0);
  } catch {
    return true;
  }
}

/**
 * A server that already runs on this cluster, or null. PostgreSQL itself knows what to do with the file of a dead
 * server. Two cases it can't tell are cleared here: a file copied together with the folder of another living server,
 * and one whose number a stranger now has.
 * @param {string} cluster
 * @returns {Promise<{ pid: number, port: number } | null>}
 */
export async function findRunning(cluster) {
  const written = readPostmaster(cluster);
  if (written === null || !isAlive(written.pid)) return null;
  const { pid } = written;
  const copied = !samePlace(written.dataDirectory, cluster);
  const stranger = processFacts(pid)?.name !== "postgres" && !memoryInUse(written.memory);
  if (copied || stranger) {
    rmSync(join(cluster, "postmaster.pid"), { force: true });
    return null;
  }
  await waitUntil(() => !isAlive(pid) || readPostmaster(cluster)?.status === "ready", 60_000);
  const now = readPostmaster(cluster);
  if (now?.status === "ready" && isAlive(pid)) return { pid, port: now.port };
  if (!isAlive(pid)) return null;
  throw new Problem(`PostgreSQL (process ${pid}) neither gets ready nor ends; its log is beside ${cluster}.`);
}

function settings(name, port) {
  const pairs = {
    cluster_name: name,
    listen_addresses: "127.0.0.1",
    port,
    unix_socket_directories: "",
    timezone: "UTC",
    log_timezone: "UTC",
    fsync: "on",
    synchronous_commit: "on",
    max_connections: 200,
  };
  return Object.entries(pairs).flatMap(([key, value]) => ["-c", `${key}=${value}`]);
}

async function launchOnce({ programs, account, home, cluster, name, port }) {
  if (closed) throw new Problem("PostgreSQL is not started any more.");
  const logPath = join(home, "server.log");
  const log = openSync(logPath, "a", 0o600);
  // In a session of its own, so that a terminal's Ctrl-C reaches the supervisor only.
  const child = spawn(join(programs, "postgres"), ["-D", cluster, ...settings(name, port)], {
    ...asAccount(account, home),
    detached: true,
    stdio: ["ignore", log, log],
  });
  closeSync(log);
  let ended = false;
  child.on("exit", () => {
    ended = true;
    servers.delete(child.pid);
  });
  child.on("error", () => {
    ended = true;
  });
  child.unref();
  if (child.pid) servers.add(child.pid);
  const ready = () => {
    const written = readPostmaster(cluster);
    return written?.pid === child.pid && written?.status === "ready";
  };
  await waitUntil(() => ended || ready(), 60_000);
  if (!ended && ready()) return { pid: child.pid, port };
  if (!ended && child.pid) signalProcess(child.pid, "SIGQUIT");
  return { failure: tailOf(readFileSync(logPath, "utf8"), 6) };
}

/**
 * The server on a cluster: the one that runs, else a new one on its old port or another free one.
 * @param {{ programs: string, account: { uid: number, gid: number } | null, home: string, cluster: string, name: string, port: number | undefined }} where
 * @returns {Promise<{ pid: number, port: number, adopted: boolean }>}
 */
export async function ensureServer(where) {
  const running = await findRunning(where.cluster);
  if (running) {
    servers.add(running.pid);
    return { ...running, adopted: true };
  }
  let failure = "";
  // After a server was killed, its backends may take a moment to notice and go; and a port that was free a moment ago
  // may be taken by now.
  for (const wish of [where.port, where.port, where.port, undefined]) {
    if (failure !== "") await pause(700);
    const answer = await launchOnce({ ...where, port: await freePort(wish) });
    if ("pid" in answer) return { ...answer, adopted: false };
    failure = answer.failure;
  }
  throw new Problem(`PostgreSQL does not start:\n${failure}`);
}

/**
 * Ends a server: fast shutdown (SIGINT; SIGTERM would wait for its clients), and the immediate one if that takes too
 * long. Nothing committed is lost by either.
 * @param {number} pid
 * @param {number} limitMs for the fast shutdown
 */
export async function stopServer(pid, limitMs = 2_000) {
  if (!signalProcess(pid, "SIGINT")) return;
  if (await waitUntil(() => !isAlive(pid), limitMs)) return;
  signalProcess(pid, "SIGQUIT");
  if (await waitUntil(() => !isAlive(pid), 600)) return;
  signalProcess(pid, "SIGKILL");
}

/**
 * Ends every server that this process started or adopted, for good.
 * @param {number} limitMs for the fast shutdown
 */
export async function endServers(limitMs) {
  closed = true;
  await Promise.all([...servers].map((pid) => stopServer(pid, limitMs)));
}
