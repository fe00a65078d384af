/** A base that no path can leave by accident: what resolves elsewhere is foreign. */
const BASE = "http://own.invalid";

/** The path to go back to, or "/" when it is missing, foreign or the sign-in page itself. */
export function safeReturnPath(wanted: string | null | undefined): string {
  if (!wanted?.startsWith("/") || !URL.canParse(wanted, BASE)) return "/";
  const url = new URL(wanted, BASE);
  // "/.//evil.example" resolves to a path that a browser would take for another host.
  if (url.origin !== BASE || /^\/(?:[/\\]|sign-in|api\/)/.test(url.pathname)) return "/";
  return url.pathname + url.search;
}

/** Where a page sends people who are not signed in. */
export function signInPath(from: string | null | undefined): string {
  const back = safeReturnPath(from);
  return back === "/" ? "/sign-in" : `/sign-in?next=${encodeURIComponent(back)}`;
}
