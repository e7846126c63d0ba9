import { InputError, type Place } from "../messages/index.ts";
import { decimalCommaFault } from "./decimal-comma.ts";
import type { RawRow } from "./raw.ts";

/** Rows of `--peaks`: positions split by spaces, commas, semicolons or newlines. @throws InputError for a decimal comma, or none at all */
export function rowsFromPeaks(text: string, place: Place): RawRow[] {
  const comma = decimalCommaFault(text, place);
  if (comma !== null) throw new InputError([comma]);
  const words = text
    .replace(/\s*(±|\+\/?-)\s*(?=[\d.])/g, "$1")
    .split(/[\s,;]+/)
    .filter((word) => word !== "");
  if (words.length === 0)
    throw new InputError([
      { code: "no-peaks", place, what: "holds no positions", mend: 'write them as in --peaks "2886 5668 8347 9120"' },
    ]);
  return withoutLabels(words.map((position) => ({ cells: { position }, place: { ...place, column: position } })));
}

/** Rows of peaks that are not yet assigned: whatever labels stand there are left aside, and each gets one of its own. */
export function withoutLabels(rows: readonly RawRow[]): RawRow[] {
  return rows.map(({ cells, place }, i) => {
    const { upper: _, lower: __, ...rest } = cells;
    return { cells: { ...rest, band: `peak ${i + 1}` }, place };
  });
}
