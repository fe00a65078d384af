import { describe, expect, it } from "vitest";
import { clientAddress } from "@/app/_server/client-address";
import { mayWriteWithCookie } from "@/app/_server/same-origin";

function post(headers: Record<string, string>, method = "POST"): Request {
  return new Request("http://127.0.0.1:3000/api/engagements", {
    method,
    headers: { host: "127.0.0.1:3000", ...headers },
  });
}

describe("writes that ride on a cookie", () => {
  it.each([
    { "sec-fetch-site": "same-origin", origin: "http://127.0.0.1:3000" },
    { "sec-fetch-site": "same-origin" },
    { origin: "http://127.0.0.1:3000" },
  ])("are allowed from our own pages: %j", (headers) => {
    expect(mayWriteWithCookie(post(headers))).toBe(true);
  });

  it.each([
    {},
    { origin: "null" },
    { origin: "http://evil.example" },
    { origin: "http://127.0.0.1:3001" },
    { origin: "http://127.0.0.1:3000.evil.example" },
    { "sec-fetch-site": "cross-site" },
    { "sec-fetch-site": "same-site", origin: "http://127.0.0.1:3000" },
    { "sec-fetch-site": "none" },
    { "sec-fetch-site": "same-origin", origin: "http://evil.example" },
  ])("are refused from elsewhere, or from nowhere: %j", (headers: Record<string, string>) => {
    expect(mayWriteWithCookie(post(headers))).toBe(false);
  });

  it("reading is not writing", () => {
    expect(mayWriteWithCookie(post({ origin: "http://evil.example" }, "GET"))).toBe(true);
    for (const method of ["PUT", "PATCH", "DELETE"]) {
      expect(mayWriteWithCookie(post({ origin: "http://evil.example" }, method))).toBe(false);
    }
  });
});

describe("where an attempt comes from", () => {
  it("is what the nearest proxy wrote, not what the caller says", () => {
    expect(clientAddress(new Headers({ "x-forwarded-for": "203.0.113.9, 198.51.100.7" }))).toBe(
      "198.51.100.7",
    );
    expect(clientAddress({ "x-forwarded-for": "::1" })).toBe("::1");
  });

  it("is one and the same for everybody when nobody wrote it", () => {
    expect(clientAddress({})).toBe("unknown");
    expect(clientAddress(undefined)).toBe("unknown");
    expect(clientAddress({ "x-forwarded-for": "" })).toBe("unknown");
  });
});
