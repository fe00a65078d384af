import Link from "next/link";
import { DataTable } from "@/app/_components/data-table";
import { UtcTime } from "@/app/_components/utc-time";
import type { LedgerBody } from "@/lib/contracts/engagements";
import { changeLines } from "./value-text";

/** Entries of the ledger: time, person, deed, reason, and old and new values. */
export function LedgerTable({ entries }: { readonly entries: readonly LedgerBody[] }) {
  return (
    <DataTable
      caption="Ledger entries, newest first"
      rows={entries}
      keyOf={(entry) => String(entry.id)}
      columns={[
        { head: "When", figure: true, cell: (entry) => <UtcTime at={entry.at} /> },
        {
          head: "Who",
          cell: (entry) => (
            <>
              {entry.actor} <span className="text-[0.8125rem] text-quiet">{viaWords(entry.via)}</span>
            </>
          ),
        },
        {
          head: "What",
          lead: true,
          cell: (entry) => (
            <>
              {entry.action} <Subject entry={entry} />
            </>
          ),
        },
        { head: "Why", cell: (entry) => entry.reason },
        { head: "Change", cell: (entry) => changeOf(entry) },
      ]}
    />
  );
}

/** Where the subject has a page of its own. */
const PAGES: Readonly<Record<string, string>> = {
  engagement: "/engagements",
  fragment: "/fragments",
  pass: "/passes",
};

function Subject({ entry }: { readonly entry: LedgerBody }) {
  // "Ines Varga signed in Ines Varga" says it twice.
  if (entry.subjectKind === "person" && entry.subjectLabel === entry.actor) return null;
  const page = PAGES[entry.subjectKind];
  if (!page || !entry.subjectId) return <b>{entry.subjectLabel}</b>;
  return (
    <Link prefetch={false} href={`${page}/${entry.subjectId}`} className="link font-bold">
      {entry.subjectLabel}
    </Link>
  );
}

const LINES_SHOWN = 4;

function changeOf(entry: LedgerBody) {
  const lines = changeLines(entry.oldValues, entry.newValues);
  if (lines.length === 0) return null;
  const list = (
    <ul className="text-[0.8125rem]">
      {lines.map((line) => (
        <li key={line.what}>
          <span className="text-quiet">{line.what}:</span>{" "}
          {line.before === null ? null : (
            <>
              <del>{line.before}</del> <span className="sr-only">became</span>
              <span aria-hidden="true">→</span>{" "}
            </>
          )}
          <ins className="no-underline">{line.after ?? "none"}</ins>
        </li>
      ))}
    </ul>
  );
  if (lines.length <= LINES_SHOWN) return list;
  return (
    <details>
      <summary className="text-[0.8125rem]">{lines.length} values</summary>
      {list}
    </details>
  );
}

function viaWords(via: string): string {
  return via === "screen" ? "" : via === "system" ? "by itself" : `by ${via}`;
}
