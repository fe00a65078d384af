import { describe, expect, it } from "vitest";
import { safeReturnPath, signInPath } from "@/app/_server/return-path";

describe("the way back after signing in", () => {
  it.each(["/passes", "/passes/3?x=1&y=a%20b", "/", "/ledger?text=%2F%2Fevil.example"])(
    "keeps %s",
    (path) => {
      expect(safeReturnPath(path)).toBe(path);
    },
  );

  it.each([
    "//evil.example",
    "/\\evil.example",
    "\\\\evil.example",
    "https://evil.example/",
    "javascript:alert(1)",
    "/\t/evil.example",
    "/\n/evil.example",
    " /passes",
    "passes",
    "",
    null,
    undefined,
    "/sign-in?next=/sign-in",
    "/api/health",
    "/%",
    "/.//evil.example",
    "/..//evil.example",
  ])("does not leave the house by %j", (path) => {
    const back = safeReturnPath(path);
    expect(new URL(back, "http://house.example").origin).toBe("http://house.example");
    expect(back).toMatch(/^\/(?!\/|\\)/);
  });

  it.each([
    "//evil.example",
    "/\\evil.example",
    "/\t/evil.example",
    "https://evil.example/",
    "/sign-in",
    "/api/x",
  ])("goes to the front door instead of %j", (path) => {
    expect(safeReturnPath(path)).toBe("/");
  });

  it("carries the asked page through the sign-in, whole", () => {
    const path = signInPath("/passes?station=a&from=b");
    expect(new URL(path, "http://house.example").searchParams.get("next")).toBe("/passes?station=a&from=b");
    expect(signInPath("/")).toBe("/sign-in");
  });
});
