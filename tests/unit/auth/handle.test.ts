import { afterEach, beforeEach, describe, expect, it, vi } from "vitest";
import { z } from "zod";
import { handle, handlePublic, readBytes, readJson } from "@/app/_server/handle";
import { conflict, refused } from "@/lib/engagement/refusal";

const none = { params: Promise.resolve({}) };

async function bodyOf(response: Response) {
  return (await response.json()) as { error: { code: string; message: string; details: unknown[] } };
}

describe("an answer", () => {
  it("of a plain object is JSON with 200 and the API's headers", async () => {
    const response = await handlePublic(async () => ({ fine: true }))(new Request("http://x/"), none);
    expect(response.status).toBe(200);
    expect(await response.json()).toEqual({ fine: true });
    expect(response.headers.get("cache-control")).toBe("no-store");
    expect(response.headers.get("x-content-type-options")).toBe("nosniff");
    expect(response.headers.get("content-security-policy")).toContain("default-src 'none'");
  });

  it("that is a response keeps its status and its own headers", async () => {
    const work = async () => new Response("x", { status: 201, headers: { "cache-control": "private" } });
    const response = await handlePublic(work)(new Request("http://x/"), none);
    expect(response.status).toBe(201);
    expect(response.headers.get("cache-control")).toBe("private");
    expect(response.headers.get("x-frame-options")).toBe("DENY");
  });

  it("gets the route's parameters and a time", async () => {
    const context = { params: Promise.resolve({ id: "7" }) };
    const response = await handlePublic(async ({ params, nowMs }) => ({ id: params.id, nowMs }))(
      new Request("http://x/"),
      context,
    );
    const body = (await response.json()) as { id: string; nowMs: number };
    expect(body.id).toBe("7");
    expect(Math.abs(body.nowMs - Date.now())).toBeLessThan(60_000);
  });
});

describe("a failure", () => {
  const logged = vi.spyOn(console, "error");
  beforeEach(() => void logged.mockImplementation(() => undefined));
  afterEach(() => void logged.mockReset());

  it("that is a refusal becomes its status with every reason", async () => {
    const work = async () => {
      throw refused("No.", [{ path: "rule", message: "closed" }]);
    };
    const response = await handlePublic(work)(new Request("http://x/"), none);
    expect(response.status).toBe(422);
    expect(await bodyOf(response)).toEqual({
      error: { code: "refused", message: "No.", details: [{ path: "rule", message: "closed" }] },
    });
    expect(logged).not.toHaveBeenCalled();
  });

  it("of a schema is 400 by field", async () => {
    const work = async () => z.strictObject({ a: z.object({ b: z.number() }) }).parse({ a: { b: "x" } });
    const response = await handlePublic(work)(new Request("http://x/"), none);
    expect(response.status).toBe(400);
    expect((await bodyOf(response)).error.details).toMatchObject([{ path: "a.b" }]);
  });

  it("of any other kind is 500 without its insides, and logged", async () => {
    const work = async () => {
      throw new Error("relation people does not exist at 10.0.0.1");
    };
    const response = await handlePublic(work)(new Request("http://x/"), none);
    const text = JSON.stringify(await bodyOf(response));
    expect(response.status).toBe(500);
    expect(text).not.toContain("people");
    expect(logged).toHaveBeenCalledTimes(1);
    const reference = /logged under (\w{8})/.exec(text)?.[1];
    expect(logged.mock.calls[0]?.[0]).toContain(reference);
  });

  it("passes conflicts on as 409", async () => {
    const work = async () => {
      throw conflict("taken");
    };
    expect((await handlePublic(work)(new Request("http://x/"), none)).status).toBe(409);
  });
});

describe("a caller without sign-in", () => {
  it.each([
    {},
    { cookie: "a=b; dwellbook.session=" },
    { authorization: "Basic eDp5" },
    { authorization: "Bearer" },
  ])("is 401 before anything runs: %j", async (headers) => {
    const work = vi.fn(async () => ({}));
    const response = await handle(work)(new Request("http://x/", { headers: headers as HeadersInit }), none);
    expect(response.status).toBe(401);
    expect(response.headers.get("www-authenticate")).toBe("Bearer");
    expect((await bodyOf(response)).error.code).toBe("unauthenticated");
    expect(work).not.toHaveBeenCalled();
  });
});

describe("reading a body", () => {
  const post = (body: BodyInit) => new Request("http://x/", { method: "POST", body });

  it("gives JSON", async () => {
    expect(await readJson(post('{"a":1}'))).toEqual({ a: 1 });
  });

  it.each(["", "{", "a=b"])("refuses %j with 400", async (body) => {
    await expect(readJson(post(body))).rejects.toMatchObject({ status: 400 });
  });

  it("refuses what is not UTF-8 with 400", async () => {
    await expect(readJson(post(new Uint8Array([0x22, 0xff, 0xfe, 0x22])))).rejects.toMatchObject({
      status: 400,
    });
  });

  it("stops at the limit with 413, also without a length", async () => {
    await expect(readBytes(post("x".repeat(11)), 10)).rejects.toMatchObject({ status: 413 });
    let pulled = 0;
    const endless = new ReadableStream<Uint8Array>({
      pull(controller) {
        pulled += 1;
        controller.enqueue(new Uint8Array(4));
      },
    });
    const init = { method: "POST", body: endless, duplex: "half" } as RequestInit;
    await expect(readBytes(new Request("http://x/", init), 10)).rejects.toMatchObject({ status: 413 });
    expect(pulled).toBeLessThan(10);
    expect((await readBytes(post("x".repeat(10)), 10)).byteLength).toBe(10);
  });
});
