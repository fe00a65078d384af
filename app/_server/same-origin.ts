import { config } from "@/lib/config";

const READING = new Set(["GET", "HEAD", "OPTIONS"]);

/**
 * True when a request that carries a cookie may change something: it reads
 * only, or the browser says that it comes from our own pages. A request
 * without Origin and Sec-Fetch-Site is refused: scripts have tokens.
 */
export function mayWriteWithCookie(request: Request): boolean {
  if (READING.has(request.method)) return true;
  const site = request.headers.get("sec-fetch-site");
  if (site !== null && site !== "same-origin") return false;
  const origin = request.headers.get("origin");
  if (origin === null) return site === "same-origin";
  return isOwnOrigin(origin, request.headers.get("host"));
}

function isOwnOrigin(origin: string, host: string | null): boolean {
  if (!URL.canParse(origin)) return false;
  const from = new URL(origin);
  return from.host === host || from.origin === new URL(config().DWELLBOOK_BASE_URL).origin;
}
