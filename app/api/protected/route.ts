import { handle } from "@/app/_server/handle";
import { listProtected } from "@/lib/services/list-protected";

/** The protected objects by class, with what is kept free around them. */
export const GET = handle(({ actor, nowMs }) => listProtected(actor, nowMs));
