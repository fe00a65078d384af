import { Section } from "@/app/_components/section";
import type { ImportReportBody } from "@/lib/contracts/element-sets";

/** What was, or would be, taken and what not, by line. */
export function ImportReport({ report, text }: { readonly report: ImportReportBody; readonly text: string }) {
  const verb = report.preview ? "would be stored" : "stored";
  return (
    <Section
      title={report.preview ? "Preview" : "Import"}
      intro={report.preview ? "Nothing is stored yet." : undefined}
    >
      <p role="status" className="text-base">
        <strong>{count(report.accepted, "set")}</strong> {verb}, {count(report.rejected.length, "set")}{" "}
        refused, {count(report.duplicates.length, "duplicate")}, {report.older.length} older than what is
        known.
        {report.created.length > 0 ? ` New to the book: ${namesOf(report)}.` : ""}
      </p>
      <Lines
        title="Refused"
        rows={report.rejected.map((r) => ({ ...r, where: `line ${r.line}, column ${r.column}` }))}
        text={text}
      />
      <Lines
        title="Already stored"
        rows={report.duplicates.map((r) => ({ ...r, where: `line ${r.line}` }))}
        text={null}
      />
      <Lines
        title={
          report.preview
            ? "Older than the newest set of their object"
            : "Stored, but older than the newest set of their object"
        }
        rows={report.older.map((r) => ({ ...r, where: `line ${r.line}` }))}
        text={null}
      />
    </Section>
  );
}

function count(n: number, word: string): string {
  return `${n} ${word}${n === 1 ? "" : "s"}`;
}

function namesOf(report: ImportReportBody): string {
  const names = report.created.map((c) => c.name);
  return names.length <= 6
    ? names.join(", ")
    : `${names.slice(0, 6).join(", ")} and ${names.length - 6} more`;
}

interface LineRow {
  readonly line: number;
  readonly message: string;
  readonly where: string;
}

function Lines(props: {
  readonly title: string;
  readonly rows: readonly LineRow[];
  readonly text: string | null;
}) {
  if (props.rows.length === 0) return null;
  const lines = props.text?.split(/\r\n|\n|\r/) ?? null;
  return (
    <div className="mt-5">
      <h3 className="font-semibold">{props.title}</h3>
      <ul className="mt-1 max-h-96 overflow-y-auto border-y border-line">
        {props.rows.map((r) => (
          <li key={`${r.where} ${r.message}`} className="border-b border-line py-2 last:border-0">
            <span className="figures mr-3 text-[0.8125rem] text-quiet">{r.where}</span>
            {r.message}
            {lines?.[r.line - 1] ? (
              <code className="figures mt-0.5 block overflow-x-auto text-[0.75rem] whitespace-pre text-quiet">
                {lines[r.line - 1]?.slice(0, 200)}
              </code>
            ) : null}
          </li>
        ))}
      </ul>
    </div>
  );
}
