import { parse, TomlError } from "smol-toml";
import { type Fault, InputError, nearest } from "../messages/index.ts";
import { type ColumnName, columnNames, type RawInput, type RawRow } from "./raw.ts";
import { type Setting, settingNames } from "./settings.ts";

/**
 * Read TOML: settings as top-level keys (strings, numbers, or lists of them), bands as `bands = "…"` or as `[[bands]]`
 * tables with the columns of a CSV as keys; the same under `[[series]]` tables with a name (and a bond).
 */
export function readToml(text: string, source: string): RawInput {
  const faults: Fault[] = [];
  const settings = new Map<string, Setting>();
  const rows: RawRow[] = [];
  for (const [key, value] of Object.entries(document(text, source))) {
    const name = key.toLowerCase().replaceAll("_", "-");
    const tables = tablesOf(value);
    if ((name === "bands" || name === "band") && tables !== null)
      rows.push(...tables.map((table, i) => rowOf(table, { source, column: `bands ${i + 1}` }, {}, faults)));
    else if (name === "series" && tables !== null)
      rows.push(...tables.flatMap((table, i) => seriesRows(table, source, i, faults)));
    else if (!settingNames.includes(name)) faults.push(unknown(source, key, settingNames));
    else settings.set(name, { value: textOf(value), place: { source, column: key } });
  }
  if (faults.length === 0 && rows.length === 0 && !settings.has("bands") && !settings.has("series"))
    faults.push({
      code: "no-rows",
      place: { source },
      what: "holds no bands",
      mend: 'write series = "2885.98 5667.98", bands = "1-0 2885.98", or [[bands]] tables with band and position',
    });
  if (faults.length > 0) throw new InputError(faults);
  return { settings, rows };
}

type Table = Readonly<Record<string, unknown>>;

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
        mend: "mend that line",
      },
    ]);
  }
}

function tablesOf(value: unknown): readonly Table[] | null {
  const isTable = (x: unknown): x is Table =>
    typeof x === "object" && x !== null && !Array.isArray(x) && !(x instanceof Date);
  return Array.isArray(value) && value.length > 0 && value.every(isTable) ? value : null;
}

/** Numbers keep all their digits; lists become words. */
function textOf(value: unknown): string {
  if (Array.isArray(value)) return value.map(textOf).join(" ");
  return typeof value === "boolean" ? (value ? "yes" : "no") : String(value);
}

function rowOf(table: Table, place: RawRow["place"], defaults: RawRow["cells"], faults: Fault[]): RawRow {
  const cells: Partial<Record<ColumnName, string>> = { ...defaults };
  for (const [key, value] of Object.entries(table)) {
    const name = columnNames.find((column) => column === key.toLowerCase().replaceAll("-", "_"));
    if (name === undefined) faults.push(unknown(`${place.source} ${place.column ?? ""}`.trim(), key, columnNames));
    else cells[name] = textOf(value);
  }
  return { cells, place };
}

/** A `[[series]]` table: its bands as tables, with its name and bond in every row. */
function seriesRows(table: Table, source: string, at: number, faults: Fault[]): RawRow[] {
  const place = { source, column: `series ${at + 1}` };
  const { name, bond, bands, ...rest } = table;
  const stray = Object.keys(rest)[0];
  if (stray !== undefined) faults.push(unknown(`${source} series ${at + 1}`, stray, ["name", "bond", "bands"]));
  const tables = tablesOf(bands);
  if (tables === null) {
    faults.push({
      code: "no-rows",
      place,
      what: "holds no bands",
      mend: "write [[series.bands]] tables with band and position",
    });
    return [];
  }
  const defaults = {
    series: name === undefined ? `series ${at + 1}` : textOf(name),
    ...(bond === undefined ? {} : { isotopologue: textOf(bond) }),
  };
  return tables.map((row, i) => rowOf(row, { source, column: `series ${at + 1}, bands ${i + 1}` }, defaults, faults));
}

function unknown(source: string, key: string, names: readonly string[]): Fault {
  const guess = nearest(key, names);
  return {
    code: "unknown-setting",
    place: { source },
    what: `there is no "${key}"${guess === null ? "" : ` (did you mean ${guess}?)`}`,
    mend: `the names are ${names.join(", ")}`,
  };
}
