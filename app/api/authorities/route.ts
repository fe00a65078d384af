import { handle } from "@/app/_server/handle";
import { listAuthorities } from "@/lib/services/list-authorities";

/** Every authority with its contacts, hours and deadlines. */
export const GET = handle(({ actor }) => listAuthorities(actor));
