import { CsvError, parse } from "csv-parse/sync";
import { editDistance, type Fault, formatPlace, InputError, nearest } from "../messages/index.ts";
import type { RawInput, RawRow } from "./raw.ts";
import { readHeader } from "./read-header.ts";
import { type Setting, settingNames } from "./settings.ts";

/**
 * Read CSV or TSV. `#` at the start of a line or after a space begins a comment (in a label, `210E#2`, it does not);
 * `# name: value` above the header is a setting when the name is one. Lines keep their numbers.
 */
export function readCsv(text: string, source: string, delimiter: string, labelled = true): RawInput {
  const faults: Fault[] = [];
  const lines = text.split(/\r\n|\n|\r/);
  const headerAt = lines.findIndex((line) => line.trim() !== "" && !/^\s*#/.test(line));
  const settings = readPreamble(headerAt < 0 ? lines : lines.slice(0, headerAt), source, faults);
  const table = headerAt < 0 ? [] : parseLines(lines.slice(headerAt).map(withoutComment), source, delimiter, headerAt);
  const [header, ...records] = table;
  if (header === undefined) {
    // A file of settings alone may hold its bands in one of them.
    if (faults.length === 0 && (settings.has("bands") || settings.has("series"))) return { settings, rows: [] };
    faults.push({
      code: "no-header",
      place: { source },
      what: "has no header",
      mend: "begin the table with a line such as band,position",
    });
    throw new InputError(faults);
  }
  const columns = readHeader(header.cells, { source, line: header.line }, faults, labelled);
  if (columns.every((column) => column === null)) throw new InputError(faults);
  if (records.length === 0)
    faults.push({
      code: "no-rows",
      place: { source, line: header.line },
      what: "has a header but no bands",
      mend: "write one band a line below it, such as 1-0,2885.98",
    });
  const rows = records.map(({ cells, line }): RawRow => {
    if (cells.slice(columns.length).some((cell) => cell !== ""))
      faults.push(tooManyCells(cells, columns, { source, line }));
    const named = columns.flatMap((column, i) =>
      column !== null && (cells[i] ?? "") !== "" ? [[column, cells[i]!] as const] : [],
    );
    return { cells: Object.fromEntries(named), place: { source, line } };
  });
  if (faults.length > 0) throw new InputError(faults);
  return { settings, rows };
}

/** A row longer than its header: a decimal comma in the position, or an unquoted cell. */
function tooManyCells(
  cells: readonly string[],
  columns: ReturnType<typeof readHeader>,
  place: { source: string; line: number },
): Fault {
  const at = columns.indexOf("position");
  const [whole = "", decimals = ""] = cells.slice(at, at + 2);
  if (at >= 0 && /^\d+$/.test(whole) && /^\d+(\(|\s*±|\s*\+\/?-|$)/.test(decimals))
    return {
      code: "too-many-cells",
      place: { ...place, column: "position" },
      what: `"${whole},${decimals}" makes the row longer than its header`,
      mend: `decimals take a point: write ${whole}.${decimals}`,
    };
  return {
    code: "too-many-cells",
    place,
    what: `has ${cells.length} cells under ${columns.length} columns`,
    mend: 'put quotes around a cell that holds the separator, such as "a, b"',
  };
}

interface Line {
  readonly cells: readonly string[];
  readonly line: number;
}

function parseLines(lines: readonly string[], source: string, delimiter: string, offset: number): Line[] {
  try {
    const records = parse(lines.join("\n"), {
      delimiter,
      info: true,
      relax_column_count: true,
      relax_quotes: true,
      skip_empty_lines: true,
      skip_records_with_empty_values: true,
      trim: true,
    }) as unknown as { record: string[]; info: { lines: number } }[];
    // the parser counts the last line of a record
    return records.map(({ record, info }) => ({ cells: record, line: info.lines + offset - breaksIn(record) }));
  } catch (error) {
    if (!(error instanceof CsvError)) throw error;
    const line = typeof error.lines === "number" ? { line: error.lines + offset } : {};
    throw new InputError([
      {
        code: "csv-form",
        place: { source, ...line },
        what: "the quotes of a cell do not close",
        mend: 'write "…" around the whole cell',
      },
    ]);
  }
}

const breaksIn = (cells: readonly string[]) => cells.reduce((sum, cell) => sum + cell.split("\n").length - 1, 0);

/** Cut a comment that begins after white space, outside quotes. */
function withoutComment(line: string): string {
  if (!line.includes("#")) return line;
  let quoted = false;
  for (let i = 0; i < line.length; i++) {
    if (line[i] === '"') quoted = !quoted;
    else if (line[i] === "#" && !quoted && (i === 0 || /[\s,]/.test(line[i - 1]!))) return line.slice(0, i);
  }
  return line;
}

function readPreamble(lines: readonly string[], source: string, faults: Fault[]): Map<string, Setting> {
  const settings = new Map<string, Setting>();
  lines.forEach((text, i) => {
    const [, name, value] = /^\s*#+\s*([A-Za-z][A-Za-z_-]*)\s*:\s*(.*?)(?:\s+#.*)?\s*$/.exec(text) ?? [];
    if (name === undefined || value === undefined) return;
    const place = { source, line: i + 1 };
    const key = name.toLowerCase().replaceAll("_", "-");
    const earlier = settings.get(key);
    if (earlier !== undefined)
      faults.push({
        code: "setting-twice",
        place,
        what: `"${name}" stands here and at ${formatPlace(earlier.place)}`,
        mend: "write it once",
      });
    else if (settingNames.includes(key)) {
      if (value !== "") settings.set(key, { value, place });
    } else {
      const guess = nearest(key, settingNames);
      // Other words before a colon are comments; one slip away from a setting is a slip.
      if (guess !== null && guess.length > 3 && editDistance(key, guess) === 1)
        faults.push({
          code: "unknown-setting",
          place,
          what: `there is no setting "${name}"`,
          mend: `write ${guess}, or take the colon away if it is a comment`,
        });
    }
  });
  return settings;
}
