import { database } from "@/db/client";
import { countAlive } from "@/db/queries/workers";
import { config } from "@/lib/config";
import type { HealthBody } from "@/lib/contracts/health";
import { greetsMail } from "./mail-greeting";

/** How long each part may take to answer. */
const LIMIT_MS = 1000;

/**
 * Whether the database, at least one worker and the mail server answer; each is asked at the same time
 * and given a second, so that the answer itself never hangs.
 */
export async function readHealth(): Promise<HealthBody> {
  const [workers, greeted] = await Promise.all([askWorkers(), greetsMail(config().SMTP_URL, LIMIT_MS)]);
  const healthy = workers !== null && workers.alive > 0 && greeted;
  return {
    status: healthy ? "ok" : "degraded",
    database: workers === null ? "unreachable" : "ok",
    workers: workers ?? { alive: 0, oldestHeartbeatS: null },
    mail: greeted ? "ok" : "unreachable",
  };
}

/** The living workers by the database; null when it does not answer in time. */
async function askWorkers(): Promise<HealthBody["workers"] | null> {
  let timer: NodeJS.Timeout | undefined;
  const limit = new Promise<null>((resolve) => {
    timer = setTimeout(() => resolve(null), LIMIT_MS);
  });
  const asked = countAlive(database(), config().DWELLBOOK_WORKER_RELEASE_S).catch(() => null);
  const workers = await Promise.race([asked, limit]);
  clearTimeout(timer);
  if (workers === null || workers.oldestHeartbeatS === null) return workers;
  return { ...workers, oldestHeartbeatS: Number(workers.oldestHeartbeatS.toFixed(1)) };
}
