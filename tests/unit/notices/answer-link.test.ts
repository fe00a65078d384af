import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { readLink, signLink } from "@/lib/notices/answer-link";

const SECRET = "a secret for tests, long enough";
const CLAIM = {
  noticeId: "3f2b8c1e-9a47-4d56-8e0f-0123456789ab",
  expiresMs: Date.UTC(2031, 3, 6, 3, 14, 45),
};

describe("an answer link", () => {
  it("says what was signed, to the second", () => {
    const claim = { ...CLAIM, expiresMs: CLAIM.expiresMs + 999 };
    expect(readLink(SECRET, signLink(SECRET, claim))).toEqual(CLAIM);
  });

  it("survives a round trip for any identifier and time", () => {
    fc.assert(
      fc.property(fc.uuid(), fc.integer({ min: 0, max: 4_000_000_000 }), (noticeId, seconds) => {
        const claim = { noticeId, expiresMs: seconds * 1000 };
        expect(readLink(SECRET, signLink(SECRET, claim))).toEqual(claim);
      }),
    );
  });

  it("fits into a path without escaping", () => {
    expect(signLink(SECRET, CLAIM)).toMatch(/^[A-Za-z0-9_-]+\.[A-Za-z0-9_-]+$/);
  });

  it("is nothing under another secret", () => {
    expect(readLink("another secret, as long as it", signLink(SECRET, CLAIM))).toBeNull();
  });

  it("is nothing once any character is changed", () => {
    const token = signLink(SECRET, CLAIM);
    fc.assert(
      fc.property(fc.nat(token.length - 1), fc.constantFrom(..."ABCDabcd0123-_. ="), (at, character) => {
        const changed = token.slice(0, at) + character + token.slice(at + 1);
        fc.pre(changed !== token);
        expect(readLink(SECRET, changed)).toBeNull();
      }),
      { numRuns: 1000 },
    );
  });

  it("is nothing when it is cut, lengthened or nonsense", () => {
    const token = signLink(SECRET, CLAIM);
    for (const other of [
      "",
      ".",
      "a.b",
      token.slice(0, -1),
      `${token}A`,
      `${token}.x`,
      token.split(".")[0] ?? "",
    ]) {
      expect(readLink(SECRET, other)).toBeNull();
    }
    fc.assert(fc.property(fc.string(), (text) => readLink(SECRET, text) === null));
  });

  it("is not made for what is no identifier", () => {
    expect(() => signLink(SECRET, { ...CLAIM, noticeId: "../x" })).toThrow("identifier");
  });
});
