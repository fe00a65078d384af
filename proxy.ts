import { type NextRequest, NextResponse } from "next/server";
import { config as environment } from "@/lib/config";

/**
 * Sets the headers of pages; it decides about no right (pages and handlers do).
 * The nonce goes on the request too: that is where Next finds it.
 */
export function proxy(request: NextRequest): NextResponse {
  const nonce = Buffer.from(crypto.getRandomValues(new Uint8Array(16))).toString("base64");
  const policy = contentPolicy(nonce);
  const forwarded = new Headers(request.headers);
  forwarded.set("content-security-policy", policy);
  forwarded.set("x-nonce", nonce);
  forwarded.set("x-dwellbook-path", request.nextUrl.pathname + request.nextUrl.search);
  const response = NextResponse.next({ request: { headers: forwarded } });
  response.headers.set("content-security-policy", policy);
  for (const [name, value] of Object.entries(pageHeaders())) response.headers.set(name, value);
  return response;
}

function contentPolicy(nonce: string): string {
  // React's development build explains server errors through eval, and its overlay writes styles.
  const development = environment().NODE_ENV === "development";
  return [
    "default-src 'self'",
    `script-src 'self' 'nonce-${nonce}' 'strict-dynamic'${development ? " 'unsafe-eval'" : ""}`,
    development ? "style-src 'self' 'unsafe-inline'" : `style-src 'self' 'nonce-${nonce}'`,
    // The calendar and charts place things by style attributes.
    "style-src-attr 'unsafe-inline'",
    "img-src 'self' data: blob:",
    // The calendar brings its icons as a font inside its style sheet.
    "font-src 'self' data:",
    "connect-src 'self'",
    "object-src 'none'",
    "base-uri 'none'",
    "form-action 'self'",
    "frame-ancestors 'none'",
  ].join("; ");
}

function pageHeaders(): Record<string, string> {
  const headers: Record<string, string> = {
    "x-content-type-options": "nosniff",
    "x-frame-options": "DENY",
    "referrer-policy": "same-origin",
    "cross-origin-opener-policy": "same-origin",
    "permissions-policy": "camera=(), microphone=(), geolocation=(), payment=(), usb=()",
  };
  if (environment().DWELLBOOK_BASE_URL.startsWith("https:")) {
    headers["strict-transport-security"] = "max-age=31536000; includeSubDomains";
  }
  return headers;
}

export const config = { matcher: ["/((?!api/|_next/static|_next/image).*)"] };
