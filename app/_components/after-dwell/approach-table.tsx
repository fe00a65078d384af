import { type Column, DataTable } from "@/app/_components/data-table";
import { UtcTime } from "@/app/_components/utc-time";
import { numberText } from "@/app/_format/figures";
import type { AfterApproachBody } from "@/lib/contracts/after-dwell";
import { probabilityText } from "./probability-text";

interface ApproachTableProps {
  readonly caption: string;
  readonly rows: readonly AfterApproachBody[];
  /** Said in place of an empty table. */
  readonly none: string;
}

/** Close approaches of one of the two ways, by time. */
export function ApproachTable({ caption, rows, none }: ApproachTableProps) {
  return (
    <div>
      <h3 className="mb-1 font-semibold">{caption}</h3>
      {rows.length === 0 ? (
        <p>{none}</p>
      ) : (
        <DataTable caption={caption} columns={COLUMNS} rows={rows} keyOf={(row) => `${row.name} ${row.at}`} />
      )}
    </div>
  );
}

const COLUMNS: readonly Column<AfterApproachBody>[] = [
  { head: "Object", lead: true, cell: (row) => <span className="whitespace-nowrap">{row.name}</span> },
  { head: "Class", cell: (row) => row.class },
  { head: "Nearest at", figure: true, cell: (row) => <UtcTime at={row.at} /> },
  { head: "Miss distance", figure: true, cell: (row) => `${numberText(row.missKm, 2)} km` },
  { head: "Relative speed", figure: true, cell: (row) => `${numberText(row.relativeSpeedKmPerS, 2)} km/s` },
  {
    head: "Probability",
    figure: true,
    cell: (row) =>
      row.atEdge ? "no value: nearest at the edge of the days" : probabilityText(row.probability),
  },
];
