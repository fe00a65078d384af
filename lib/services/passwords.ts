import { randomBytes, type ScryptOptions, scrypt, timingSafeEqual } from "node:crypto";

/**
 * scrypt with N = 2^16, r = 8, p = 2: one of the settings that OWASP's password
 * storage cheat sheet names as equals (from memory), with half the memory of
 * 2^17. Stored with each hash, so that it can rise later.
 */
const COST = { N: 65_536, r: 8, p: 2 } as const;
const KEY_BYTES = 32;
const SALT_BYTES = 16;
/** 128·N·r bytes are needed; Node's default limit is below that. */
const MEMORY_BYTES = 256 * 1024 * 1024;
/** Each hash takes a thread of Node's four and 64 MB: more at once would stop files and names. */
const AT_ONCE = 2;

/** Shortest and longest password that is taken; longer ones would only be work. */
export const PASSWORD_MIN = 12;
export const PASSWORD_MAX = 200;

/** Hashes a password for storage: `scrypt$N$r$p$salt$key`. */
export async function hashPassword(password: string): Promise<string> {
  const salt = randomBytes(SALT_BYTES);
  const key = await derive(password, salt, COST);
  return ["scrypt", COST.N, COST.r, COST.p, salt.toString("base64url"), key.toString("base64url")].join("$");
}

/**
 * True when the password fits the stored hash. With null (no such account) it
 * does the same work and answers false, so that time gives no account away.
 */
export async function passwordFits(password: string, stored: string | null): Promise<boolean> {
  const parts = /^scrypt\$(\d+)\$(\d+)\$(\d+)\$([\w-]+)\$([\w-]+)$/.exec(stored ?? DUMMY);
  if (!parts) throw new Error("a stored password hash has no known form");
  const [, N, r, p, salt = "", key = ""] = parts;
  const expected = Buffer.from(key, "base64url");
  const derived = await derive(password, Buffer.from(salt, "base64url"), {
    N: Number(N),
    r: Number(r),
    p: Number(p),
  });
  return expected.length === derived.length && timingSafeEqual(expected, derived) && stored !== null;
}

/** A hash that nothing fits: its key is not the outcome of any known password. */
const DUMMY = `scrypt$${COST.N}$${COST.r}$${COST.p}$${"A".repeat(22)}$${"A".repeat(43)}`;

/** Why a new password won't do, or null. Length counts, not the kinds of characters in it. */
export function passwordProblem(password: string, owner: { name: string; email: string }): string | null {
  const plain = password.normalize("NFKC").toLowerCase();
  if ([...plain].length < PASSWORD_MIN) return `a password has at least ${PASSWORD_MIN} characters`;
  if (password.length > PASSWORD_MAX) return `a password has at most ${PASSWORD_MAX} characters`;
  if (new Set(plain).size < 5) return "a password needs at least five different characters";
  const known = [
    owner.email,
    owner.email.split("@")[0] ?? "",
    ...owner.name.split(/\s+/),
    "dwellbook",
    "password",
  ];
  const inside = known
    .map((word) => word.toLowerCase())
    .find((word) => word.length > 3 && plain.includes(word));
  const rest = inside ? plain.replaceAll(inside, "").length : plain.length;
  return rest < 8
    ? "a password is more than a name, an address or a common word with a few characters added"
    : null;
}

async function derive(
  password: string,
  salt: Buffer,
  cost: { N: number; r: number; p: number },
): Promise<Buffer> {
  const release = await turn();
  try {
    const options: ScryptOptions = { ...cost, maxmem: MEMORY_BYTES };
    return await new Promise((resolve, reject) => {
      scrypt(password.normalize("NFKC"), salt, KEY_BYTES, options, (error, key) =>
        error ? reject(error) : resolve(key),
      );
    });
  } finally {
    release();
  }
}

let running = 0;
const waiting: (() => void)[] = [];

/** Waits until fewer than two hashes run; the answer hands the place on. */
async function turn(): Promise<() => void> {
  if (running >= AT_ONCE) await new Promise<void>((resolve) => waiting.push(resolve));
  else running += 1;
  return () => {
    const next = waiting.shift();
    if (next) next();
    else running -= 1;
  };
}
