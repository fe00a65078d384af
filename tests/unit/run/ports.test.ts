import { createServer } from "node:net";
import { expect, test } from "vitest";
import { chooseWebPort, freePort, readPort, tryPort } from "@/lib/run/ports.mjs";

/** Listens on a free loopback port while `work` runs. */
async function withTakenPort<T>(work: (port: number) => Promise<T>): Promise<T> {
  const server = createServer();
  await new Promise<void>((done) => server.listen(0, "127.0.0.1", done));
  const address = server.address();
  if (address === null || typeof address === "string") throw new Error("no port");
  try {
    return await work(address.port);
  } finally {
    await new Promise((done) => server.close(done));
  }
}

/** An attempt by which the given ports are taken and all others free. */
const taken =
  (...ports: number[]) =>
  async (port: number) =>
    ports.includes(port) ? { code: "EADDRINUSE" } : { port };

test("a taken port is told from a free one", async () => {
  await withTakenPort(async (port) => {
    expect(await tryPort(port)).toEqual({ code: "EADDRINUSE" });
    expect(await freePort(port)).not.toBe(port);
  });
});

test("a preferred port that is free is taken", async () => {
  const port = await freePort();
  expect(await freePort(port)).toBe(port);
});

test("PORT is a whole number in range, or not set", () => {
  expect(readPort(undefined)).toBeNull();
  expect(readPort(" ")).toBeNull();
  expect(readPort("8080")).toBe(8080);
  for (const wrong of ["0", "65536", "-1", "80.5", "1e3", "http"])
    expect(() => readPort(wrong)).toThrow(wrong);
});

test("without PORT the next free one after 3000 is chosen, and that is told", async () => {
  expect(await chooseWebPort(null, taken())).toEqual({ port: 3000, insteadOf: null });
  expect(await chooseWebPort(null, taken(3000, 3001))).toEqual({ port: 3002, insteadOf: 3000 });
});

test("an asked port that is taken is refused, not replaced", async () => {
  expect(await chooseWebPort(8080, taken())).toEqual({ port: 8080, insteadOf: null });
  await expect(chooseWebPort(8080, taken(8080))).rejects.toThrow("Port 8080 is taken");
  await expect(chooseWebPort(80, async () => ({ code: "EACCES" }))).rejects.toThrow("needs rights");
});
