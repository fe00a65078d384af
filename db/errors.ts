/** The SQLSTATE and constraint of a PostgreSQL error; drizzle hides them in `cause`. */
export interface DatabaseFault {
  readonly code: string;
  readonly constraint: string | null;
}

/** Finds the PostgreSQL error in an error or its causes; null when there is none. */
export function databaseFault(error: unknown): DatabaseFault | null {
  let current: unknown = error;
  for (let depth = 0; depth < 5 && typeof current === "object" && current !== null; depth++) {
    const { code, constraint } = current as { code?: unknown; constraint?: unknown };
    if (typeof code === "string" && /^[0-9A-Z]{5}$/.test(code)) {
      return { code, constraint: typeof constraint === "string" ? constraint : null };
    }
    current = (current as { cause?: unknown }).cause;
  }
  return null;
}

/** Exclusion constraint violated: somebody else holds the time. */
export function isOverlap(error: unknown): boolean {
  return databaseFault(error)?.code === "23P01";
}

/** Deadlock or serialisation failure: the whole transaction may be tried again. */
export function isRetryable(error: unknown): boolean {
  const code = databaseFault(error)?.code;
  return code === "40P01" || code === "40001";
}
