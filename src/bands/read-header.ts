import { type Fault, nearest, type Place } from "../messages/index.ts";
import { type ColumnName, columnNames } from "./raw.ts";

/** Words of the trade for a column that has another name here. */
const MEANT: Readonly<Record<string, ColumnName>> = {
  label: "band",
  transition: "band",
  assignment: "band",
  v: "band",
  wavenumber: "position",
  wavelength: "position",
  frequency: "position",
  energy: "position",
  value: "position",
  uncertainty: "sigma",
  error: "sigma",
  bond: "isotopologue",
  comment: "note",
  remark: "note",
};

/** Columns that a report adds to its bands.csv: left aside when that file is read again. */
const RESULT_COLUMNS: ReadonlySet<string> = new Set([
  "calculated",
  "residual",
  "studentized_residual",
  "leverage",
  "left_out_residual",
  "weight",
  "as_read",
  "as_read_sigma",
  "as_read_unit",
  "as_read_medium",
  "measured_position",
  "measured_sigma",
  "companion_position",
  "companion_sigma",
  "companion_ratio",
  "companion_ratio_sigma",
  "companion_coupling",
  "companion_coupling_sigma",
  "companion_shift",
  "companion_shift_sigma",
  "as_read_companion",
  "as_read_ratio",
]);

/** The columns a header names, null for one that is none; what is wrong is added to `faults`. `labelled`: rows need labels. */
export function readHeader(
  cells: readonly string[],
  place: Place,
  faults: Fault[],
  labelled = true,
): (ColumnName | null)[] {
  const fault = (code: string, what: string, mend: string) => faults.push({ code, place, what, mend });
  const columns = cells.map(columnOf);
  const nothing = columns.every((column) => column === null) ? noHeader(cells) : null;
  if (nothing !== null) {
    fault(...nothing);
    return columns;
  }
  cells.forEach((cell, i) => {
    if (columns[i] !== null || cell === "" || RESULT_COLUMNS.has(tidy(cell))) return;
    fault(...unknownColumn(cell));
  });
  columns.forEach((column, i) => {
    if (column !== null && columns.indexOf(column) !== i)
      fault("column-twice", `has the column "${column}" twice`, "name each column once");
  });
  if (!columns.includes("position"))
    fault("no-position", "has no column position", "begin the table with a line such as band,position");
  if (labelled && !columns.includes("band") && !(columns.includes("upper") && columns.includes("lower")))
    fault(
      "no-label",
      "has no column with the labels of the bands",
      "add a column band (1-0, 2-0 …), or upper and lower",
    );
  return columns;
}

const tidy = (cell: string) => cell.toLowerCase().replace(/[\s-]+/g, "_");

function columnOf(cell: string): ColumnName | null {
  const name = tidy(cell);
  return columnNames.find((column) => column === name) ?? null;
}

/** The column probably meant by a name that is none; a unit after it, `position (nm)`, is left aside. */
function guess(cell: string): ColumnName | null {
  const [word = ""] = /^\p{L}[\p{L}\p{N}_]*/u.exec(tidy(cell)) ?? [];
  const name = word.replace(/_+$/, "");
  if (Object.hasOwn(MEANT, name)) return MEANT[name]!;
  return columnNames.find((column) => column === name) ?? (nearest(name, columnNames) as ColumnName | null);
}

function unknownColumn(cell: string): [code: string, what: string, mend: string] {
  const meant = guess(cell);
  const what = `there is no column "${cell}"${meant === null ? "" : ` (did you mean ${meant}?)`}`;
  return meant !== null && /[([/]/.test(cell)
    ? ["unknown-column", what, `write ${meant}, and the unit in a line above the header, such as "# unit: nm"`]
    : ["unknown-column", what, `the columns are ${columnNames.join(", ")}`];
}

/** A first line in which no word is a column: the wrong separator, or no header at all; null when one is probably meant. */
function noHeader(cells: readonly string[]): [code: string, what: string, mend: string] | null {
  const whole = cells.join(",");
  for (const [separator, name, mend] of separators)
    if (cells.length === 1 && whole.split(separator).some((cell) => columnOf(cell.trim()) !== null))
      return ["wrong-separator", `the columns are separated by ${name}`, mend];
  if (cells.some((cell) => guess(cell) !== null)) return null;
  return ["no-header", `"${whole}" is no header`, "begin the table with a line such as band,position"];
}

const separators = [
  [";", "semicolons", "separate them by commas, and write decimals with a point"],
  ["\t", "tabs", "say --format tsv, or separate them by commas"],
  [",", "commas", "say --format csv, or separate them by tabs"],
] as const;
