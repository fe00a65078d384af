import type { ReactNode } from "react";

export interface Column<Row> {
  /** The column's head; on a narrow screen it stands before the value. "" for actions. */
  readonly head: string;
  /** null where there is nothing: a dash in the column, left out on a narrow screen. */
  readonly cell: (row: Row) => ReactNode;
  /** Numbers and times: monospaced. */
  readonly figure?: boolean;
  /** The cell that names the row; large and alone on a narrow screen. One column at most. */
  readonly lead?: boolean;
}

interface DataTableProps<Row> {
  /** What the table lists, for screen readers; shown when `captionShown`. */
  readonly caption: string;
  readonly captionShown?: boolean;
  readonly columns: readonly Column<Row>[];
  readonly rows: readonly Row[];
  readonly keyOf: (row: Row) => string;
  /** The row that is chosen just now gets a tint and aria-current. */
  readonly isChosen?: (row: Row) => boolean;
}

/** A table in columns; below 768 px each row is a block with its heads before the values. */
export function DataTable<Row>({
  caption,
  captionShown,
  columns,
  rows,
  keyOf,
  isChosen,
}: DataTableProps<Row>) {
  return (
    <table className="rows">
      <caption className={captionShown ? "pb-2 text-left font-semibold" : "sr-only"}>{caption}</caption>
      <thead>
        <tr>
          {columns.map((c) => (
            <th key={c.head} scope="col" data-figure={c.figure ? "" : undefined}>
              {c.head === "" ? <span className="sr-only">Actions</span> : c.head}
            </th>
          ))}
        </tr>
      </thead>
      <tbody>
        {rows.map((row) => (
          <tr
            key={keyOf(row)}
            data-chosen={isChosen?.(row) ? "true" : undefined}
            aria-current={isChosen?.(row) ? "true" : undefined}
          >
            {columns.map((c) => (
              <Cell key={c.head} column={c} value={c.cell(row)} />
            ))}
          </tr>
        ))}
      </tbody>
    </table>
  );
}

function Cell({
  column,
  value,
}: {
  readonly column: Omit<Column<never>, "cell">;
  readonly value: ReactNode;
}) {
  const empty = value === null || value === undefined;
  return (
    <td
      data-head={column.head}
      data-figure={column.figure ? "" : undefined}
      data-lead={column.lead ? "" : undefined}
      data-empty={empty ? "" : undefined}
    >
      {/* One box, so that the value is one cell of the narrow grid. */}
      <div>{empty ? "–" : value}</div>
    </td>
  );
}
