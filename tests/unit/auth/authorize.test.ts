import { afterAll, describe, expect, it, vi } from "vitest";

// Nothing listens on port 1: every query fails, with an error that names the query and its address.
process.env.DATABASE_URL = "postgres://nobody@127.0.0.1:1/nowhere";
const { authorize } = await import("@/app/_server/authorize");
const { closePool } = await import("@/db/client");

afterAll(closePool);

describe("a sign-in while the database is away", () => {
  it("throws one fixed word, since it ends up in an address, and logs the rest", async () => {
    const logged = vi.spyOn(console, "error").mockImplementation(() => undefined);
    const attempt = authorize(
      { email: "tove@desk.invalid", password: "x" },
      { "x-forwarded-for": "198.51.100.1" },
    );
    const error: unknown = await attempt.catch((thrown: unknown) => thrown);
    expect(error).toBeInstanceOf(Error);
    expect((error as Error).message).toBe("unavailable");
    expect((error as Error).cause).toBeUndefined();
    expect(logged).toHaveBeenCalledTimes(1);
    logged.mockRestore();
  });

  it("refuses what can't be read without asking the database at all", async () => {
    expect(await authorize({ email: "no address", password: "x" }, {})).toBeNull();
    expect(await authorize(undefined, undefined)).toBeNull();
  });
});
