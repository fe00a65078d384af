import { handle } from "@/app/_server/handle";
import { pathId } from "@/app/_server/path-id";
import { revokeToken } from "@/lib/services/tokens";

export const DELETE = handle(async ({ actor, params }) => {
  await revokeToken(actor, pathId(params, "token"));
  return { revoked: true };
});
