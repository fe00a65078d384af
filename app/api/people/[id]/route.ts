import { handle, readJson } from "@/app/_server/handle";
import { pathId } from "@/app/_server/path-id";
import { changePerson } from "@/lib/services/change-person";
import { requirePeopleRight } from "@/lib/services/people";

export const PATCH = handle(async ({ actor, params, request }) => {
  requirePeopleRight(actor);
  return changePerson(actor, pathId(params, "person"), await readJson(request));
});
