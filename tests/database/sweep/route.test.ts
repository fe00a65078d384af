import { randomUUID } from "node:crypto";
import { beforeAll, describe, expect, it } from "vitest";
import { POST as cancel } from "@/app/api/sweeps/[id]/cancel/route";
import { GET as read } from "@/app/api/sweeps/[id]/route";
import { GET as list, POST as start } from "@/app/api/sweeps/route";
import type { ErrorBody } from "@/lib/contracts/common";
import type { SweepBody } from "@/lib/contracts/sweeps";
import { call, tokenOf } from "../../routes/calculations/callers";
import { ownDatabase } from "../support";
import { addFragments } from "./ground";

ownDatabase();

let planner = "";
let fragmentIds: string[] = [];
beforeAll(async () => {
  planner = await tokenOf("planner");
  fragmentIds = await addFragments(3, Date.now());
});

type Answered = SweepBody & ErrorBody;

describe("/api/sweeps", () => {
  it("starts, shows and cancels a sweep", async () => {
    const started = await call<Answered>(start, { body: {}, token: planner });
    expect(started).toMatchObject({
      status: 201,
      body: { state: "running", fragments: { total: 3, done: 0 } },
    });
    const params = { id: started.body.id };
    const seen = await call<Answered>(read, { method: "GET", params, token: planner });
    expect(seen.body).toEqual(started.body);
    const all = await call<{ sweeps: SweepBody[] }>(list, { method: "GET", token: planner });
    expect(all.body.sweeps.map(({ id }) => id)).toEqual([started.body.id]);
    const ended = await call<Answered>(cancel, { params, token: planner });
    expect(ended).toMatchObject({ status: 200, body: { state: "cancelled" } });
    expect((await call(cancel, { params, token: planner })).status).toBe(409);
  });

  it("sweeps named fragments only, and names those there are none of", async () => {
    const some = await call<Answered>(start, {
      body: { fragmentIds: fragmentIds.slice(0, 1) },
      token: planner,
    });
    expect(some).toMatchObject({ status: 201, body: { fragments: { total: 1 } } });
    const body = { fragmentIds: [fragmentIds[0], randomUUID()] };
    const unknown = await call<Answered>(start, { body, token: planner });
    expect(unknown.status).toBe(422);
    expect(unknown.body.error.details).toEqual([{ path: "fragmentIds.1", message: "no such fragment" }]);
    expect((await call(start, { body: { fragmentIds: "all" }, token: planner })).status).toBe(400);
  });

  it("answers 404 for what isn't there, 403 and 401 for whom it isn't", async () => {
    const nowhere = { method: "GET" as const, params: { id: randomUUID() } };
    expect((await call(read, { ...nowhere, token: planner })).status).toBe(404);
    expect((await call(read, { ...nowhere, params: { id: "x" }, token: planner })).status).toBe(404);
    expect((await call(start, { body: {}, token: await tokenOf("operator") })).status).toBe(403);
    expect((await call(list, { method: "GET", token: await tokenOf("coordinator") })).status).toBe(403);
    expect((await call(list, { method: "GET" })).status).toBe(401);
  });
});
