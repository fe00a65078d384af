import { createServer, type Server, type Socket } from "node:net";
import { sql } from "drizzle-orm";
import { afterAll, beforeAll, beforeEach, describe, expect, it } from "vitest";
import { GET } from "@/app/api/health/route";
import { database } from "@/db/client";
import { beat } from "@/lib/services/heartbeat";
import { ownDatabase } from "../support";

ownDatabase();

/** What the mail server at SMTP_URL does with a caller; null: nothing at all. */
let greeting: string | null = "220 test ESMTP\r\n";
const heard: string[] = [];
const sockets = new Set<Socket>();
let server: Server;

function listen(port: number): Promise<number> {
  server = createServer((socket) => {
    sockets.add(socket);
    socket.on("error", () => undefined);
    socket.on("data", (bytes) => heard.push(bytes.toString()));
    if (greeting !== null) socket.write(greeting);
  });
  return new Promise((resolve) => {
    server.listen(port, "127.0.0.1", () => {
      const address = server.address();
      resolve(typeof address === "object" && address ? address.port : 0);
    });
  });
}

function closeServer(): Promise<void> {
  for (const socket of sockets) socket.destroy();
  return new Promise((resolve) => server.close(() => resolve()));
}

let port = 0;
beforeAll(async () => {
  port = await listen(0);
  process.env.SMTP_URL = `smtp://127.0.0.1:${port}`;
});
afterAll(closeServer);

beforeEach(async () => {
  greeting = "220 test ESMTP\r\n";
  await database().execute(sql`delete from worker_pools`);
  await beat({ poolId: "pool-a", host: "a-host", processId: 17 });
});

async function ask(): Promise<{ status: number; body: unknown; tookMs: number }> {
  const startedMs = Date.now();
  const response = await GET(new Request("http://127.0.0.1/api/health"), { params: Promise.resolve({}) });
  return { status: response.status, body: await response.json(), tookMs: Date.now() - startedMs };
}

describe("GET /api/health", () => {
  it("says ok when database, a worker and mail answer, and takes leave of the mail server", async () => {
    const answer = await ask();
    expect(answer.status).toBe(200);
    expect(answer.body).toEqual({
      status: "ok",
      database: "ok",
      workers: { alive: 1, oldestHeartbeatS: expect.any(Number) },
      mail: "ok",
    });
    await expect.poll(() => heard).toContain("QUIT\r\n");
  });

  it("is degraded without a living worker", async () => {
    await database().execute(sql`update worker_pools set heartbeat_at = now() - interval '31 seconds'`);
    const answer = await ask();
    expect(answer.status).toBe(503);
    expect(answer.body).toEqual({
      status: "degraded",
      database: "ok",
      workers: { alive: 0, oldestHeartbeatS: null },
      mail: "ok",
    });
  });

  it("is degraded when the mail server keeps silent, within some 1 s", async () => {
    greeting = null;
    const answer = await ask();
    expect(answer.status).toBe(503);
    expect(answer.body).toMatchObject({ status: "degraded", database: "ok", mail: "unreachable" });
    expect(answer.tookMs).toBeGreaterThan(900);
    expect(answer.tookMs).toBeLessThan(2000);
  });

  it("is degraded when the mail server turns callers away", async () => {
    greeting = "554 no service here\r\n";
    expect(await ask()).toMatchObject({ status: 503, body: { status: "degraded", mail: "unreachable" } });
  });

  it("is degraded when nothing listens for mail, and ok when it comes back", async () => {
    await closeServer();
    expect(await ask()).toMatchObject({ status: 503, body: { status: "degraded", mail: "unreachable" } });
    await listen(port);
    expect(await ask()).toMatchObject({ status: 200, body: { status: "ok", mail: "ok" } });
  });
});
