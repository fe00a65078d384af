import { createServer, type Server, type Socket } from "node:net";
import { afterAll, beforeAll, describe, expect, it } from "vitest";
import { GET } from "@/app/api/health/route";
import { closePool } from "@/db/client";

/** A server that takes connections and never says a word stands where the database should be. */
const sockets = new Set<Socket>();
let silent: Server;

beforeAll(async () => {
  silent = createServer((socket) => {
    sockets.add(socket);
    socket.on("error", () => undefined);
  });
  await new Promise<void>((resolve) => silent.listen(0, "127.0.0.1", resolve));
  const address = silent.address();
  const port = typeof address === "object" && address ? address.port : 0;
  process.env.DATABASE_URL = `postgres://nobody@127.0.0.1:${port}/nothing`;
  process.env.SMTP_URL = "smtp://127.0.0.1:1";
});

function endSilence(): void {
  for (const socket of sockets) socket.destroy();
  sockets.clear();
}
afterAll(async () => {
  endSilence();
  silent.close();
  await closePool();
});

async function ask(): Promise<{ status: number; body: unknown; tookMs: number }> {
  const startedMs = Date.now();
  const response = await GET(new Request("http://127.0.0.1/api/health"), { params: Promise.resolve({}) });
  return { status: response.status, body: await response.json(), tookMs: Date.now() - startedMs };
}

const NOTHING_ANSWERS = {
  status: "degraded",
  database: "unreachable",
  workers: { alive: 0, oldestHeartbeatS: null },
  mail: "unreachable",
};

describe("GET /api/health without a database", () => {
  it("answers 503 within some 1 s though the database keeps silent", async () => {
    const answer = await ask();
    expect(answer.status).toBe(503);
    expect(answer.body).toEqual(NOTHING_ANSWERS);
    expect(answer.tookMs).toBeLessThan(2000);
  });

  it("answers 503 at once when nothing listens there", async () => {
    const closed = new Promise<void>((resolve) => silent.close(() => resolve()));
    endSilence();
    await closed;
    const answer = await ask();
    expect(answer.status).toBe(503);
    expect(answer.body).toEqual(NOTHING_ANSWERS);
    expect(answer.tookMs).toBeLessThan(900);
  });
});
