import { handle, readJson } from "@/app/_server/handle";
import { pathId } from "@/app/_server/path-id";
import { endSessions } from "@/lib/services/change-person";
import { requirePeopleRight } from "@/lib/services/people";

export const POST = handle(async ({ actor, params, request }) => {
  requirePeopleRight(actor);
  await endSessions(actor, pathId(params, "person"), await readJson(request));
  return { ended: true };
});
