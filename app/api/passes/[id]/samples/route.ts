import { sampleColumns } from "@/app/_components/pass-sheet/sample-columns";
import { handle } from "@/app/_server/handle";
import { pathId } from "@/app/_server/path-id";
import { writeCsv } from "@/lib/formats/csv";
import { passSheet } from "@/lib/services/pass-sheet";

/** The samples of a pass as CSV, one line every few seconds from rise to set. */
export const GET = handle(async ({ params, actor, nowMs }) => {
  const sheet = await passSheet(actor, pathId(params, "pass"), nowMs);
  const columns = sampleColumns(sheet.aimUnit);
  const rows = sheet.samples.map((sample) => columns.map((c) => c.value(sample)));
  return new Response(writeCsv([columns.map((c) => c.csv), ...rows]), {
    headers: {
      "content-type": "text/csv; charset=utf-8",
      "content-disposition": `attachment; filename="pass-${sheet.id}.csv"`,
    },
  });
});
