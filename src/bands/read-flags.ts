import { type Fault, InputError, type Place } from "../messages/index.ts";
import { isWavelength, readMeasurement, readUnit, splitUnit } from "../quantity/index.ts";
import type { RawRow } from "./raw.ts";

/** A decimal comma: digits on both sides and no space after it. */
const DECIMAL_COMMA = /\d,\d/;

/**
 * Rows of `--series`: consecutive overtones from `from`-0 on, split by spaces, commas or semicolons. `unit` as typed: overtones rise in
 * energy, so wavelengths fall. Throws InputError.
 */
export function rowsFromSeries(text: string, from: string | null, unit: string | null, place: Place): RawRow[] {
  const faults: Fault[] = [];
  const first = from === null ? 1 : Number(from);
  if (!(Number.isInteger(first) && first >= 1 && first < 1000))
    faults.push({
      code: "from",
      place: { source: "--from" },
      what: `"${from}" is not a level`,
      mend: "write the upper level of the first position, such as 3",
    });
  // "2885,98 5667,98" would fall apart; "2885.98,5667.98" is a list.
  const comma = text.split(/[\s;]+/).find((word) => DECIMAL_COMMA.test(word) && !word.includes("."));
  if (comma !== undefined && /\d,\d{1,3}(?!\d)/.test(comma))
    faults.push({
      code: "decimal-comma",
      place,
      what: `"${comma}" has a decimal comma`,
      mend: `write ${comma.replace(",", ".")}, or a space after a comma that separates`,
    });
  const words = text
    .replace(/\s*(±|\+\/?-)\s*/g, "$1")
    .split(/[\s,;]+/)
    .filter((word) => word !== "");
  if (words.length === 0)
    faults.push({
      code: "no-bands",
      place,
      what: "holds no positions",
      mend: 'write them as in --series "2885.98 5667.98 8346.78"',
    });
  const values = words.map((word) => {
    const read = readMeasurement(word);
    return read.ok ? read.value : Number.NaN;
  });
  const read = readUnit(unit ?? "cm-1");
  const sign = read !== null && isWavelength(read) ? -1 : 1;
  const fall = values.findIndex((value, i) => i > 0 && sign * value <= sign * values[i - 1]!);
  if (faults.length === 0 && fall > 0) {
    const [before, after] = [words[fall - 1]!, words[fall]!];
    faults.push({
      code: "series-falls",
      place,
      what: `overtones rise in energy, but ${after} follows ${before}`,
      mend: `for spacings or other labels write --bands "1-0 ${words[0]}, 2-1 ${words[1]} …"${sign > 0 ? "; for wavelengths add --unit nm" : ""}`,
    });
  }
  if (faults.length > 0) throw new InputError(faults);
  return words.map((position, i) => ({
    cells: { band: `${first + i}-0`, position },
    place: { ...place, column: `${first + i}-0` },
  }));
}

/**
 * Rows of `--bands`: `1-0 2885.98(2), 3-0 970.056(10) nm air; 2-1 2782.0`, split by commas, semicolons or newlines; the last word
 * is the position (with its unit and medium if it has them), all before it the label. Throws InputError.
 */
export function rowsFromBands(text: string, place: Place): RawRow[] {
  const faults: Fault[] = [];
  if (/(^|[\s;])\d+,\d+(?=\s|;|\(|$)/m.test(text) && !/,\s/.test(text.replace(/\d,\d/g, ""))) {
    const [comma] = /\d+,\d+/.exec(text)!;
    faults.push({
      code: "decimal-comma",
      place,
      what: `"${comma}" has a decimal comma`,
      mend: `write ${comma.replace(",", ".")}`,
    });
    throw new InputError(faults);
  }
  const rows: RawRow[] = [];
  for (const entry of text.split(/[,;\n]+/).map((part) => part.trim())) {
    if (entry === "") continue;
    const [, rest, medium] = /^(.*?)(?:\s+(air|vacuum))?$/i.exec(entry)!;
    const joined = rest!.replace(/\s*(±|\+\/?-)\s*(?=[\d.])/g, "$1");
    const { label, position, unit } = lastWord(joined);
    if (label === "") {
      faults.push({
        code: "no-label",
        place,
        what: `"${entry}" has no label before the position`,
        mend: 'write a label and a position, such as "1-0 2885.98"',
      });
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

/** Split `3-0 970.056(10) nm` into label, position and unit; the unit may be two words (`kJ mol-1`). */
function lastWord(entry: string): { label: string; position: string; unit: string | null } {
  const words = entry.split(/\s+/);
  for (const size of [1, 2, 3]) {
    if (words.length <= size) break;
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
