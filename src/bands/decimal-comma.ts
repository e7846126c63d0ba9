import type { Fault, Place } from "../messages/index.ts";

/**
 * Two groups of digits held together by a comma, neither with a point of its own, and the second the end of a value: `2885,98`,
 * `2885,98(2)`, `2885,98 ± 0.02`. Not in `2885.98,5667.98`, nor where a label follows, `2886,2-0 5668`.
 */
const DECIMAL_COMMA = /(?<![\d.,])\d+(?:,\d+)+(?=\s|[,;(±]|\+\/?-|$)(?!\.)/;

/** The fault of a text in which a comma would tear numbers apart; null when there is none. */
export function decimalCommaFault(text: string, place: Place): Fault | null {
  const [found] = DECIMAL_COMMA.exec(text) ?? [];
  if (found === undefined) return null;
  const single = found.split(",").length === 2;
  const list = found.replaceAll(",", ", ");
  return {
    code: "decimal-comma",
    place,
    what: `"${found}" has a decimal comma`,
    mend: single
      ? `write ${found.replace(",", ".")} (or ${list}, if the comma separates)`
      : `write a point in each number (or ${list}, if the commas separate)`,
  };
}
