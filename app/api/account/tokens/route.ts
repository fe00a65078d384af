import { handle, readJson } from "@/app/_server/handle";
import { createToken, listTokens } from "@/lib/services/tokens";

export const GET = handle(({ actor }) => listTokens(actor));

export const POST = handle(async ({ actor, request }) =>
  Response.json(await createToken(actor, await readJson(request)), { status: 201 }),
);
