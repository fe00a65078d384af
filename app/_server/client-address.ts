/**
 * Where a request comes from, for counting attempts: the last entry of
 * X-Forwarded-For, which the nearest proxy (or Next itself) writes. Earlier
 * entries are whatever the caller says. Where nobody wrote one, all callers
 * share one count: the throttle on accounts still holds.
 */
export function clientAddress(headers: Headers | Readonly<Record<string, unknown>> | undefined): string {
  const value = headers instanceof Headers ? headers.get("x-forwarded-for") : headers?.["x-forwarded-for"];
  const last = typeof value === "string" ? value.split(",").at(-1)?.trim() : undefined;
  return last ? last.slice(0, 64) : "unknown";
}
