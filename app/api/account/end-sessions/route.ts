import { handle } from "@/app/_server/handle";
import { endOwnSessions } from "@/lib/services/end-own-sessions";

export const POST = handle(async ({ actor }) => {
  await endOwnSessions(actor);
  return { ended: true };
});
