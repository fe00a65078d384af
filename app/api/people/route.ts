import { handle } from "@/app/_server/handle";
import { listPeople } from "@/lib/services/people";

export const GET = handle(({ actor }) => listPeople(actor));
