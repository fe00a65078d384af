import { handle } from "@/app/_server/handle";
import { listLedger } from "@/lib/services/list-ledger";

/** `?subjectKind=&subjectId=&actor=&text=&from=&to=&before=&limit=`: newest first. */
export const GET = handle(({ request, actor }) =>
  listLedger(actor, Object.fromEntries(new URL(request.url).searchParams)),
);
