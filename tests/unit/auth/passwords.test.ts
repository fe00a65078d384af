import { scryptSync } from "node:crypto";
import { describe, expect, it } from "vitest";
import { hashPassword, passwordFits, passwordProblem } from "@/lib/services/passwords";

const owner = { name: "Tove Lindqvist", email: "tove@dwellbook.invalid" };

describe("scrypt as it is used here", () => {
  // RFC 7914, section 12, third vector: N = 16384, r = 8, p = 1.
  it("derives the published key of RFC 7914", async () => {
    const key = scryptSync("pleaseletmein", "SodiumChloride", 64, { N: 16384, r: 8, p: 1 });
    expect(key.toString("hex")).toBe(
      "7023bdcb3afd7348461c06cd81fd38ebfda8fbba904f8e3ea9b543f6545da1f2" +
        "d5432955613f0fcf62d49705242a9af9e61e85dc0d651e40dfcf017b45575887",
    );
    const salt = Buffer.from("SodiumChloride").toString("base64url");
    const stored = `scrypt$16384$8$1$${salt}$${key.toString("base64url")}`;
    // The stored form keeps 32 bytes; scrypt's first 32 of 64 are the same (PBKDF2 blocks).
    const short = `scrypt$16384$8$1$${salt}$${key.subarray(0, 32).toString("base64url")}`;
    expect(await passwordFits("pleaseletmein", short)).toBe(true);
    expect(await passwordFits("pleaseletmeim", short)).toBe(false);
    expect(await passwordFits("pleaseletmein", stored)).toBe(false);
  });
});

describe("hashing", () => {
  it("takes a password back, and no other", async () => {
    const stored = await hashPassword("four words in a row");
    expect(stored).toMatch(/^scrypt\$65536\$8\$2\$[\w-]{22}\$[\w-]{43}$/);
    expect(await passwordFits("four words in a row", stored)).toBe(true);
    expect(await passwordFits("four words in a Row", stored)).toBe(false);
  });

  it("salts: the same password is stored differently each time", async () => {
    const [a, b] = await Promise.all([
      hashPassword("four words in a row"),
      hashPassword("four words in a row"),
    ]);
    expect(a).not.toBe(b);
  });

  it("reads composed and decomposed letters as the same", async () => {
    const stored = await hashPassword("\u00eele marrec station");
    expect(await passwordFits("i\u0302le marrec station", stored)).toBe(true);
  });

  it("fits nothing where there is no account, and takes its time over it", async () => {
    const stored = await hashPassword("four words in a row");
    const known = await quickestOfTwo(() => passwordFits("something else entirely", stored));
    const unknown = await quickestOfTwo(() => passwordFits("something else entirely", null));
    expect(await passwordFits("", null)).toBe(false);
    // The work is the same; the bounds leave room for a busy machine.
    expect(unknown / known).toBeGreaterThan(0.3);
    expect(unknown / known).toBeLessThan(3);
  });

  it("throws on a stored hash of unknown form instead of refusing everybody in silence", async () => {
    await expect(passwordFits("x", "plain text")).rejects.toThrow("no known form");
  });
});

describe("what a password must be", () => {
  it.each([
    ["elevenchars", "at least 12"],
    ["a".repeat(201), "at most 200"],
    ["aaaaaaaaaaaabb", "five different"],
    ["Tove-tove-tove1", "more than a name"],
    ["lindqvist1234", "more than a name"],
    ["tove@dwellbook.invalid", "more than a name"],
  ])("refuses %s", (password, words) => {
    expect(passwordProblem(password, owner)).toContain(words);
  });

  it.each(["correct horse battery", "ein sehr langer satz", "zwölfbuchst.x", "x9#kq2!vlwz7"])(
    "takes %s",
    (password) => {
      expect(passwordProblem(password, owner)).toBeNull();
    },
  );
});

async function quickestOfTwo(work: () => Promise<unknown>): Promise<number> {
  let quickest = Number.POSITIVE_INFINITY;
  for (let run = 0; run < 2; run++) {
    const from = performance.now();
    await work();
    quickest = Math.min(quickest, performance.now() - from);
  }
  return quickest;
}
