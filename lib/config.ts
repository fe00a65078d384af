import { z } from "zod";

/** The only reader of the environment outside tool configurations and lib/run. */
const schema = z.object({
  NODE_ENV: z.string().default("production"),
  DATABASE_URL: z.string().min(1).default("postgres://dwellbook_app@127.0.0.1:5432/dwellbook"),
  DATABASE_OWNER_URL: z.string().optional(),
  DATABASE_POOL_SIZE: z.coerce.number().int().min(1).max(200).default(20),
  SMTP_URL: z.string().default("smtp://127.0.0.1:2525"),
  MAIL_FROM: z.string().default("Dwellbook <book@dwellbook.invalid>"),
  NEXTAUTH_SECRET: z.string().default(""),
  DWELLBOOK_LINK_SECRET: z.string().default(""),
  DWELLBOOK_BASE_URL: z.string().default("http://127.0.0.1:3000"),
  DWELLBOOK_DATA_DIR: z.string().default(".data"),
  DWELLBOOK_MAIL_PAGE_URL: z.string().optional(),
  DWELLBOOK_WORKER_HEARTBEAT_S: z.coerce.number().min(0.2).max(60).default(5),
  DWELLBOOK_WORKER_RELEASE_S: z.coerce.number().min(1).max(3600).default(30),
  DWELLBOOK_WORKER_POLL_MS: z.coerce.number().int().min(100).max(60_000).default(2000),
  DWELLBOOK_CLOSE_APPROACH_KM: z.coerce.number().min(0.1).max(100).default(5),
});

export type Config = z.infer<typeof schema>;

let cached: Config | undefined;

/**
 * Reads and checks the environment once; an empty value counts as unset. Throws with the names of what is
 * wrong; secrets have no default: {@link secret} refuses an empty one at first use.
 */
export function config(): Config {
  cached ??= schema.parse(
    Object.fromEntries(Object.entries(process.env).filter(([, value]) => value !== "")),
  );
  return cached;
}

/** A secret by name; an unset one is an error, never a silent default. */
export function secret(name: "NEXTAUTH_SECRET" | "DWELLBOOK_LINK_SECRET"): string {
  const value = config()[name];
  if (value.length < 16) throw new Error(`${name} is not set or shorter than 16 characters`);
  return value;
}
