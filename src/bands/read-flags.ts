import { type Fault, InputError, type Place } from "../messages/index.ts";
import { isWavelength, readMeasurement, readUnit, splitUnit } from "../quantity/index.ts";
import { decimalCommaFault } from "./decimal-comma.ts";
import { readVibrationalLabel } from "./label.ts";
import type { RawRow } from "./raw.ts";

/**
 * Rows of `--series`: consecutive overtones from `from`-0 on, split by spaces, commas or semicolons. `unit` as typed: overtones rise in
 * energy, so wavelengths fall; those of `scattered` light rise. Throws InputError.
 */
export function rowsFromSeries(
  text: string,
  from: string | null,
  unit: string | null,
  place: Place,
  scattered = false,
): RawRow[] {
  const faults: Fault[] = [];
  const first = from === null || from.trim() === "" ? 1 : Number(from);
  if (!(Number.isInteger(first) && first >= 1 && first < 1000))
    faults.push({
      code: "from",
      place: place.source.startsWith("--") ? { source: "--from" } : { source: place.source, column: "from" },
      what: `"${from}" is not a level`,
      mend: "write the upper level of the first position, such as 3",
    });
  const comma = decimalCommaFault(text, place);
  if (comma !== null) faults.push(comma);
  const words = joinUncertainty(text)
    .split(/[\s,;]+/)
    .filter((word) => word !== "");
  if (words.length === 0)
    faults.push({
      code: "no-bands",
      place,
      what: "holds no positions",
      mend: 'write them as in --series "2885.98 5667.98 8346.78"',
    });
  const stray = words.find((word) => readUnit(word) !== null || /^(air|vacuum)$/i.test(word));
  if (stray !== undefined)
    faults.push({
      code: "unit-in-series",
      place,
      what: `"${stray}" stands among the positions`,
      mend: `write ${readUnit(stray) === null ? "--medium" : "--unit"} ${stray}, which holds for all of them`,
    });
  if (faults.length === 0) faults.push(...fallFaults(words, unit, place, scattered));
  if (faults.length > 0) throw new InputError(faults);
  return words.map((position, i) => ({
    cells: { band: `${first + i}-0`, position },
    place: { ...place, column: `${first + i}-0` },
  }));
}

/** Positions that fall are no overtones: spacings, or wavelengths without their unit. */
function fallFaults(words: readonly string[], unit: string | null, place: Place, scattered: boolean): Fault[] {
  const values = words.map((word) => {
    const read = readMeasurement(word);
    return read.ok ? read.value : Number.NaN;
  });
  const read = readUnit(unit ?? "cm-1");
  const sign = read !== null && isWavelength(read) && !scattered ? -1 : 1;
  const fall = values.findIndex((value, i) => i > 0 && sign * value <= sign * values[i - 1]!);
  if (fall < 0) return [];
  return [
    {
      code: "series-falls",
      place,
      what: `overtones rise in energy, but ${words[fall]!} follows ${words[fall - 1]!}`,
      mend: `for spacings or other labels write --bands "1-0 ${words[0]}, 2-1 ${words[1]} …"${sign > 0 ? "; for wavelengths add --unit nm" : ""}`,
    },
  ];
}

/** `2885.98 ± 0.02` and `2885.98 (2)` as one word. */
function joinUncertainty(text: string): string {
  return text.replace(/\s*(±|\+\/?-)\s*(?=[\d.])/g, "$1").replace(/(?<=\d)\s+(?=\([\d.]+\))/g, "");
}

/**
 * Rows of `--bands`: `1-0 2885.98(2), 3-0 970.056(10) nm air; 2-1 2782.0`, split by commas, semicolons or newlines; the last word
 * is the position (with its unit and medium if it has them), all before it the label. Throws InputError.
 */
export function rowsFromBands(text: string, place: Place): RawRow[] {
  const comma = decimalCommaFault(text, place);
  if (comma !== null) throw new InputError([comma]);
  const faults: Fault[] = [];
  const rows: RawRow[] = [];
  for (const entry of text.split(/[,;\n]+/).map((part) => part.trim())) {
    if (entry === "") continue;
    const [, rest, medium] = /^(.*?)(?:\s+(air|vacuum))?$/i.exec(entry)!;
    const { label, position, unit } = lastWord(joinUncertainty(rest!));
    if (label === "") {
      faults.push(halfEntry(entry, place));
      continue;
    }
    rows.push({
      cells: {
        band: label,
        position,
        ...(unit === null ? {} : { unit }),
        ...(medium === undefined ? {} : { medium: medium.toLowerCase() }),
      },
      place: { ...place, column: label },
    });
  }
  if (rows.length === 0 && faults.length === 0)
    faults.push({
      code: "no-bands",
      place,
      what: "holds no bands",
      mend: 'write them as in --bands "1-0 2885.98, 3-0 8346.78"',
    });
  if (faults.length > 0) throw new InputError(faults);
  return rows;
}

/** An entry that is a label alone or a position alone. */
function halfEntry(entry: string, place: Place): Fault {
  const mend = 'write a label and a position, such as "1-0 2885.98"';
  return readVibrationalLabel(entry) === null
    ? { code: "no-label", place, what: `"${entry}" has no label before the position`, mend }
    : { code: "no-position", place, what: `"${entry}" has no position`, mend };
}

/** Split `3-0 970.056(10) nm` into label, position and unit; the unit may be two words (`kJ mol-1`). */
function lastWord(entry: string): { label: string; position: string; unit: string | null } {
  const words = entry.split(/\s+/);
  for (const size of [1, 2, 3]) {
    if (words.length < size) break;
    const tail = words.slice(-size).join(" ");
    const { number, unit } = splitUnit(tail);
    if (readMeasurement(number).ok) return { label: words.slice(0, -size).join(" "), position: number, unit };
  }
  // No number at the end: the reader of positions says what is wrong. A word after a number is then an unknown unit.
  const before = words.at(-2);
  if (words.length > 2 && before !== undefined && readMeasurement(before).ok)
    return { label: words.slice(0, -2).join(" "), position: before, unit: words.at(-1)! };
  return { label: words.slice(0, -1).join(" "), position: words.at(-1)!, unit: null };
}
