/** One column of a table: its head is quantity over unit. */
export interface Column {
  readonly quantity: string;
  /** as in data, `cm-1`; absent for words and pure numbers */
  readonly unit?: string;
  /** `point`: numbers one under the other by their decimal points; `interval`: both ends of `from to to` so */
  readonly align: "left" | "right" | "point" | "interval";
  /** shown in the report only, where there is room */
  readonly reportOnly?: boolean;
}

interface Row {
  readonly cells: readonly string[];
  /** shown, but no part of the fit */
  readonly muted?: boolean;
}

/** A table before it is set: the terminal, Markdown and tests see the same. */
export interface TableData {
  readonly columns: readonly Column[];
  readonly rows: readonly Row[];
  /** below the table, one sentence each; says why anything is `—` */
  readonly notes: readonly string[];
}

/** The same table without the columns that only a report has room for. */
export function narrow({ columns, rows, notes }: TableData): TableData {
  const keep = columns.flatMap(({ reportOnly }, i) => (reportOnly === true ? [] : [i]));
  return {
    columns: keep.map((i) => columns[i]!),
    rows: rows.map((row) => ({ ...row, cells: keep.map((i) => row.cells[i]!) })),
    notes,
  };
}
