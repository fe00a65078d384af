import type { z } from "zod";
import { type Reason, Refusal, refused, unreadable } from "@/lib/engagement/refusal";

/**
 * Reads what a caller sent. A field of the wrong type or format, or one that is
 * not known, makes the body unreadable (400); a body that can be read but lacks
 * something, or leaves it empty or out of range, is refused (422). Every fault is named.
 */
export function readInput<T extends z.ZodType>(schema: T, input: unknown): z.infer<T> {
  const parsed = schema.safeParse(input);
  if (parsed.success) return parsed.data;
  const faults = parsed.error.issues.map((issue) => ({ issue, value: valueAt(input, issue.path) }));
  const reasons: Reason[] = faults.map(({ issue, value }) => ({
    path: issue.path.join("."),
    message: wordsOf(issue, value),
  }));
  if (faults.every(({ issue, value }) => isLacking(issue, value))) {
    throw refused("Something is missing, or out of its range.", reasons);
  }
  throw unreadable("The input does not have the expected form.", reasons);
}

type Issue = z.core.$ZodIssue;

/** The schema's own words; the library's stock sentences name types and say nothing to a person. */
function wordsOf(issue: Issue, value: unknown): string {
  const isStock = issue.message.startsWith("Invalid input");
  const isMissing = value === undefined || value === null;
  if (isMissing) return isStock ? `${issue.path.join(".")} is missing` : `missing: ${issue.message}`;
  if (isStock && issue.code === "invalid_type") return `expected ${issue.expected}`;
  return issue.message;
}

/** True when the field can be read and is only missing, empty or out of range. */
function isLacking(issue: Issue, value: unknown): boolean {
  if (issue.path.length > 0 && (value === undefined || value === null)) return true;
  if (issue.code === "too_small" || issue.code === "too_big" || issue.code === "custom") return true;
  // A literal like `true` that was answered with a readable `false`.
  return (
    issue.code === "invalid_value" && issue.values.length === 1 && typeof value === typeof issue.values[0]
  );
}

function valueAt(input: unknown, path: readonly PropertyKey[]): unknown {
  return path.reduce<unknown>(
    (value, key) =>
      typeof value === "object" && value !== null ? (value as Record<PropertyKey, unknown>)[key] : undefined,
    input,
  );
}

/** The same for what stands in an address after the question mark: any fault there is 400. */
export function readQuery<T extends z.ZodType>(schema: T, query: unknown): z.infer<T> {
  try {
    return readInput(schema, query);
  } catch (error) {
    if (error instanceof Refusal)
      throw unreadable("The query does not have the expected form.", error.reasons);
    throw error;
  }
}

/**
 * Reads a body that may not have been fetched yet: handlers hand over the function
 * that reads it, so that who asks is judged before what is asked.
 */
export async function readBody<T extends z.ZodType>(schema: T, body: unknown): Promise<z.infer<T>> {
  return readInput(schema, typeof body === "function" ? await body() : body);
}
