import { handle } from "@/app/_server/handle";
import { importTexts, isNothingGood } from "@/lib/services/import-elements";
import { listElementSets } from "@/lib/services/list-element-sets";
import { readImportTexts } from "./texts";

/** `?fragment=`, `?protected=` or `?catalogNumber=`: the history of one object. */
export const GET = handle(({ request, actor }) =>
  listElementSets(actor, Object.fromEntries(new URL(request.url).searchParams)),
);

/** Files or a raw body; `?preview=1` only reports, `?as=protected&class=` for protected objects. */
export const POST = handle(async ({ request, actor, nowMs }) => {
  const { preview, ...options } = Object.fromEntries(new URL(request.url).searchParams);
  const wanted = { ...options, preview: preview === "1" || preview === "true" };
  const report = await importTexts(actor, () => readImportTexts(request), wanted, nowMs);
  return Response.json(report, { status: isNothingGood(report) ? 422 : 200 });
});
