import type { ImportReportBody } from "@/lib/contracts/element-sets";

/**
 * The refused sets with their reasons, to be mended and tried again. Of a
 * two-line set both lines and its name line are kept, whichever of them was
 * refused; of other formats the line that was named.
 */
export function rejectedLines(report: Pick<ImportReportBody, "rejected">, text: string): string {
  const lines = text.split(/\r\n|\n|\r/);
  return report.rejected
    .map(
      (r) => `# line ${r.line}, column ${r.column}: ${r.message}\n${setAround(lines, r.line - 1).join("\n")}`,
    )
    .join("\n");
}

const isLine = (line: string | undefined, number: "1" | "2"): boolean =>
  line?.startsWith(`${number} `) ?? false;

function setAround(lines: readonly string[], index: number): string[] {
  const first = isLine(lines[index], "2") && isLine(lines[index - 1], "1") ? index - 1 : index;
  if (!isLine(lines[first], "1")) return [lines[index] ?? ""];
  const name = lines[first - 1];
  const named = name !== undefined && name.trim() !== "" && !isLine(name, "1") && !isLine(name, "2");
  const last = isLine(lines[first + 1], "2") ? first + 1 : first;
  return lines.slice(named ? first - 1 : first, last + 1);
}
