import { clientAddress } from "@/app/_server/client-address";
import { handle, readJson } from "@/app/_server/handle";
import { changePassword } from "@/lib/services/change-password";

export const POST = handle(async ({ actor, request }) => {
  await changePassword(actor, await readJson(request), clientAddress(request.headers));
  return { changed: true };
});
