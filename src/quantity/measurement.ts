/** A number as a person writes it, with the standard uncertainty if one stands beside it. */
export type Measurement =
  | {
      readonly ok: true;
      readonly value: number;
      /** as written, positive; null where none is given */
      readonly sigma: number | null;
      /** decimals of the value as written, `2885.98` 2, `1.5e-3` 4 */
      readonly decimals: number;
    }
  | { readonly ok: false; readonly what: string; readonly mend: string };

const shape =
  /^(?<mantissa>[+-]?(?:\d+\.?(?<decimals>\d*)|\.(?<bare>\d+)))(?:\s*\((?<digits>[^()]*)\)|(?<exponent1>e[+-]?\d+)?\s*(?:±|\+\/?-)\s*(?<plusMinus>.*?))?(?<exponent2>e[+-]?\d+)?$/iu;
const unsigned = /^(?:\d+\.?\d*|\.\d+)$/u;
const plainNumber = /^[+-]?(?:\d+\.?\d*|\.\d+)(?:e[+-]?\d+)?$/iu;

/**
 * Read a measured value: `2885.98`, `1e4`, `−0.5`, or with its uncertainty `2885.98(2)` (±0.02), `12.3(12)` (±1.2),
 * `2885.98(1.2)` (±1.2), `1.234(5)e4`, `2885.98±0.02`, `2885.98 +/- 0.02`. Decimal commas, separators of thousands,
 * numbers that are not finite and uncertainties that are not positive are refused with the mend.
 */
export function readMeasurement(text: string): Measurement {
  const tidy = text.trim().replace(/[−‐‑–]/gu, "-");
  if (tidy === "") return refuse("the value is missing", "write a value such as 2885.9 or 2885.98(2)");
  const found = shape.exec(tidy)?.groups;
  if (found === undefined) return refuseText(text.trim(), tidy);

  const { mantissa = "", digits, plusMinus, exponent1 = "", exponent2 = "" } = found;
  const bracketed = digits?.trim();
  // in `1.5e3±2e1` each number has its own exponent; in `1.5(2)e3` one exponent serves both
  const valueExponent = plusMinus === undefined ? exponent2 : exponent1;
  const value = Number(mantissa + valueExponent);
  if (!Number.isFinite(value)) return refuse(`"${text.trim()}" is not a finite number`, "write a value such as 2885.9");
  const written = (found.decimals ?? found.bare ?? "").length;
  const decimals = Math.max(0, written - Number(valueExponent.slice(1)));

  let sigma: number | null = null;
  if (bracketed !== undefined) {
    if (!/^-/u.test(bracketed) && !unsigned.test(bracketed)) return refuseText(text.trim(), tidy);
    const inLastDigits = !bracketed.includes(".");
    sigma = Number(`${bracketed}e${(inLastDigits ? -written : 0) + Number(exponent2.slice(1))}`);
  } else if (plusMinus !== undefined) {
    if (!plainNumber.test(plusMinus + exponent2)) return refuseText(text.trim(), tidy);
    sigma = Number(plusMinus + exponent2);
  }
  if (sigma !== null && !(sigma > 0 && Number.isFinite(sigma))) {
    const fault = sigma === 0 ? "zero" : sigma < 0 ? "negative" : "not a finite number";
    return refuse(
      `the uncertainty of "${text.trim()}" is ${fault}`,
      `write a positive one such as ${mantissa}(2), or none`,
    );
  }
  return { ok: true, value, sigma, decimals };
}

function refuse(what: string, mend: string): Measurement {
  return { ok: false, what, mend };
}

/** Say what is wrong with a text that has not the shape of a measured value. */
function refuseText(text: string, tidy: string): Measurement {
  const tail = String.raw`(?=$|\s*[(±+e])`;
  const rest = (head: RegExp, by: (head: string) => string) => tidy.replace(head, by);
  if (new RegExp(String.raw`^[+-]?\d+,\d+${tail}`, "iu").test(tidy)) {
    const mended = tidy.replaceAll(",", ".");
    const thousands = /^[+-]?[1-9]\d{0,2},\d{3}$/u.test(tidy)
      ? ` (or ${tidy.replace(",", "")}, if thousands were meant)`
      : "";
    return refuse(`"${text}" has a decimal comma`, `write ${mended}${thousands}`);
  }
  const grouped = new RegExp(String.raw`^[+-]?\d{1,3}(?:([\s',_])\d{3})(?:\1\d{3})*(?:[.,]\d+)?${tail}`, "iu");
  if (grouped.test(tidy)) {
    const joined = rest(grouped, (head) => head.replace(/,(?=\d+$)/u, (c) => (/\s/u.test(head) ? "." : c)));
    return refuse(`"${text}" has separators of thousands`, `write ${joined.replace(/[\s',_](?=\d{3})/gu, "")}`);
  }
  if (/\d\.\d{3} \d/u.test(tidy))
    return refuse(`"${text}" has spaces between digits`, `write ${tidy.replace(/\s/gu, "")}`);
  if (/^[+-]?(?:nan|inf(?:inity)?)$/iu.test(tidy))
    return refuse(`"${text}" is not a finite number`, "write a value such as 2885.9");
  return refuse(`"${text}" is not a number`, "write a value such as 2885.9 or 2885.98(2)");
}
