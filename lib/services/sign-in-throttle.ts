import { createHash } from "node:crypto";
import { RateLimiterPostgres, RateLimiterRes } from "rate-limiter-flexible";
import { pool } from "@/db/client";

/** Attempts are counted before the password is looked at, so that many at once don't slip through. */
const LIMITS = {
  account: { points: 10, duration: 15 * 60, blockDuration: 15 * 60 },
  address: { points: 60, duration: 15 * 60, blockDuration: 15 * 60 },
} as const;

type Limited = keyof typeof LIMITS;

const limiters = new Map<Limited, RateLimiterPostgres>();

function limiter(kind: Limited): RateLimiterPostgres {
  const known = limiters.get(kind);
  if (known) return known;
  const made = new RateLimiterPostgres({
    storeClient: pool(),
    storeType: "pool",
    tableName: "sign_in_throttle",
    tableCreated: true,
    clearExpiredByTimeout: true,
    keyPrefix: kind,
    ...LIMITS[kind],
  });
  limiters.set(kind, made);
  return made;
}

/**
 * Counts an attempt on an account and from an address. Answers the seconds to
 * wait when either has had too many, else 0. The account is counted whether it
 * exists or not. Throws when the counts can't be kept: then nobody signs in.
 */
export async function countAttempt(account: string, address: string): Promise<number> {
  const waits = await Promise.all([take("account", account), take("address", address)]);
  return Math.max(...waits);
}

/** Forgives: the account starts afresh, the address gets its attempt back. */
export async function forgiveAttempts(account: string, address: string): Promise<void> {
  await limiter("account").delete(keyOf(account));
  await limiter("address").reward(keyOf(address), 1);
}

async function take(kind: Limited, what: string): Promise<number> {
  try {
    await limiter(kind).consume(keyOf(what), 1);
    return 0;
  } catch (error) {
    if (error instanceof RateLimiterRes) return Math.max(1, Math.ceil(error.msBeforeNext / 1000));
    throw error;
  }
}

/** Keys are hashes: the table holds no addresses, and no key is too long. */
function keyOf(what: string): string {
  return createHash("sha256").update(what.trim().toLowerCase(), "utf8").digest("base64url");
}
