import { database, type Transaction } from "./client";
import { isRetryable } from "./errors";

/**
 * Runs `work` in one transaction; a deadlock or serialisation failure is tried
 * again from the start, up to five times with a short random wait.
 */
export async function inTransaction<T>(work: (tx: Transaction) => Promise<T>): Promise<T> {
  for (let attempt = 1; ; attempt++) {
    try {
      return await database().transaction(work);
    } catch (error) {
      if (attempt >= 5 || !isRetryable(error)) throw error;
      await new Promise((resolve) => setTimeout(resolve, 10 * attempt + Math.random() * 40));
    }
  }
}
