import { parse, TomlError } from "smol-toml";
import { type Fault, InputError, nearest, type Place } from "../messages/index.ts";
import { type ColumnName, columnNames, type RawInput, type RawRow } from "./raw.ts";
import { rowsFromBands, rowsFromSeries } from "./read-flags.ts";
import { type Setting, settingNames } from "./settings.ts";
import { tomlLines } from "./toml-lines.ts";

type Table = Readonly<Record<string, unknown>>;
type Cells = RawRow["cells"];

/** What a `[[series]]` table may say for all its bands, and the column it stands for. */
const ofSeries: Readonly<Record<string, ColumnName>> = {
  name: "series",
  bond: "isotopologue",
  unit: "unit",
  medium: "medium",
  phase: "phase",
};

/**
 * Read TOML: settings as top-level keys (strings, numbers, or lists of them), bands as `bands = "…"` or as `[[bands]]`
 * tables with the columns of a CSV as keys. Under `[[series]]` tables, with a name (and bond, unit, medium, phase), bands stand
 * as `bands = "…"`, `series = "…"` or `[[series.bands]]`.
 */
export function readToml(text: string, source: string): RawInput {
  const faults: Fault[] = [];
  const settings = new Map<string, Setting>();
  const rows: RawRow[] = [];
  const lines = tomlLines(text);
  const at = (line: number | null, column?: string): Place => ({
    source,
    ...(line === null ? {} : { line }),
    ...(column === undefined ? {} : { column }),
  });
  /** of a table: its line where that is known, otherwise its number */
  const placeOf = (name: string, n: number, count: number): Place => {
    const line = lines.table(name, n, count);
    return line === null ? at(null, `${name} ${n + 1}`) : at(line);
  };

  const written = document(text, source);
  const scattered = Object.hasOwn(written, "laser");
  for (const [key, value] of Object.entries(written)) {
    const name = key.toLowerCase().replaceAll("_", "-");
    const place = at(lines.key(key), key);
    const tables = tablesOf(value);
    if (name === "bands" && tables !== null) {
      for (const [i, table] of tables.entries()) rows.push(rowOf(table, placeOf(key, i, tables.length), {}, faults));
    } else if (name === "series" && tables !== null) {
      const all = tables.flatMap((table) => tablesOf(table.bands) ?? []).length;
      let seen = 0;
      const nextPlace = () => placeOf(`${key}.bands`, seen++, all);
      for (const [i, table] of tables.entries())
        rows.push(...seriesRows(table, i, placeOf(key, i, tables.length), nextPlace, scattered, faults));
    } else if (!settingNames.includes(name)) faults.push(unknown(place, key, settingNames));
    else {
      const written = textOf(value, name === "bands" ? "; " : " ");
      if (written === null) faults.push(notText(place, key));
      else if (settings.has(name)) faults.push(twice(place, key));
      else settings.set(name, { value: written, place });
    }
  }
  if (faults.length === 0 && rows.length === 0 && settings.size === 0) faults.push(noBands({ source }));
  if (faults.length > 0) throw new InputError(faults);
  return { settings, rows };
}

function document(text: string, source: string): Table {
  try {
    return parse(text);
  } catch (error) {
    if (!(error instanceof TomlError)) throw error;
    const [what] = error.message.replace(/^Invalid TOML document:\s*/, "").split("\n");
    throw new InputError([
      {
        code: "toml-form",
        place: { source, line: error.line, column: `column ${error.column}` },
        what: `is not TOML (${what})`,
        mend: 'write name = "text" or name = 1.5, a point in every number',
      },
    ]);
  }
}

function tablesOf(value: unknown): readonly Table[] | null {
  const isTable = (x: unknown): x is Table =>
    typeof x === "object" && x !== null && !Array.isArray(x) && !(x instanceof Date);
  return Array.isArray(value) && value.length > 0 && value.every(isTable) ? value : null;
}

/** The words of a value; lists are joined. Null for a table, a date, or a list that holds one. */
function textOf(value: unknown, separator = " "): string | null {
  if (Array.isArray(value)) {
    const parts = value.map((part) => textOf(part));
    return parts.includes(null) ? null : parts.join(separator);
  }
  if (typeof value === "boolean") return value ? "yes" : "no";
  return typeof value === "string" || typeof value === "number" || typeof value === "bigint" ? String(value) : null;
}

function rowOf(table: Table, place: Place, defaults: Cells, faults: Fault[]): RawRow {
  const cells: Partial<Record<ColumnName, string>> = { ...defaults };
  for (const [key, value] of Object.entries(table)) {
    const name = columnNames.find((column) => column === key.toLowerCase().replaceAll("-", "_"));
    const written = textOf(value)?.trim();
    if (name === undefined) faults.push(unknown(place, key, columnNames));
    else if (written === undefined) faults.push(notText(place, key));
    else if (written !== "") cells[name] = written;
  }
  return { cells, place };
}

/** Rows of a `[[series]]` table; `nextPlace` gives the place of each of its `[[series.bands]]`. */
function seriesRows(
  table: Table,
  n: number,
  place: Place,
  nextPlace: () => Place,
  scattered: boolean,
  faults: Fault[],
): RawRow[] {
  const defaults: Partial<Record<ColumnName, string>> = { series: `series ${n + 1}` };
  for (const [key, value] of Object.entries(table)) {
    if (["bands", "series", "from"].includes(key)) continue;
    const written = textOf(value);
    if (!Object.hasOwn(ofSeries, key)) faults.push(unknown(place, key, [...Object.keys(ofSeries), "bands", "series"]));
    else if (written === null) faults.push(notText(place, key));
    else defaults[ofSeries[key]!] = written;
  }
  const tables = tablesOf(table.bands);
  if (tables !== null) return tables.map((row) => rowOf(row, nextPlace(), defaults, faults));
  const bands = textOf(table.bands, "; ");
  const series = textOf(table.series);
  if ((bands === null) === (series === null)) {
    faults.push(noBands(place));
    return [];
  }
  try {
    const rows =
      bands !== null
        ? rowsFromBands(bands, place)
        : rowsFromSeries(series!, textOf(table.from), defaults.unit ?? null, place, scattered);
    return rows.map((row) => ({ cells: { ...defaults, ...row.cells }, place: row.place }));
  } catch (error) {
    if (!(error instanceof InputError)) throw error;
    faults.push(...error.faults);
    return [];
  }
}

const noBands = (place: Place): Fault => ({
  code: "no-rows",
  place,
  what: "holds no bands",
  mend: 'write series = "2885.98 5667.98", bands = "1-0 2885.98", or tables [[bands]] with band and position',
});

const notText = (place: Place, key: string): Fault => ({
  code: "not-text-or-number",
  place: { ...place, column: key },
  what: `"${key}" is neither text nor a number`,
  mend: `write ${key} = "…"`,
});

const twice = (place: Place, key: string): Fault => ({
  code: "setting-twice",
  place,
  what: `"${key}" stands there twice, in two spellings`,
  mend: "write it once",
});

function unknown(place: Place, key: string, names: readonly string[]): Fault {
  const guess = nearest(key, names);
  return {
    code: "unknown-setting",
    place: { ...place, column: key },
    what: `there is no "${key}"${guess === null ? "" : ` (did you mean ${guess}?)`}`,
    mend: `the names are ${names.join(", ")}`,
  };
}
