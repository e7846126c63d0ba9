import { printUnits } from "../text/units.ts";

const NO_BREAK = "\u00a0";
const THIN = "\u202f";

/** Groups of three from the decimal point on either side, in numbers of five digits and more: `46510` → `46 510`. */
export function groupDigits(text: string): string {
  return text.replace(/(?<![\w.])\d+(?:\.\d+)?/gu, (number) => {
    const [whole = "", part] = number.split(".");
    const left = whole.length > 4 ? whole.replace(/\B(?=(?:\d{3})+$)/gu, THIN) : whole;
    if (part === undefined) return left;
    return `${left}.${part.length > 4 ? part.replace(/\d{3}(?=\d)/gu, (three) => three + THIN) : part}`;
  });
}

const unitAfterNumber = /(?<=[\d)]) (?=(?:%|cm⁻¹|kJ|kcal|eV|nm|µm|Å|u\b|N m))/gu;
const unitProduct = /(?<=\b(?:kJ|kcal|N)) (?=m)/gu;

/** No-break spaces between numbers and units, within units and around powers of ten; `cm-1` as printed. */
export function holdUnits(text: string): string {
  return printUnits(text)
    .replace(unitAfterNumber, NO_BREAK)
    .replace(unitProduct, NO_BREAK)
    .replace(/ × 10/gu, `${NO_BREAK}×${NO_BREAK}10`);
}

/** Text from outside (names, notes, warnings) so that Markdown shows it as it is, on one line. */
export function verbatim(text: string): string {
  return text
    .replace(/\s+/gu, " ")
    .trim()
    .replace(/[\\`*_[\]<>|~$]/gu, String.raw`\$&`)
    .replace(/&(?=#?\w+;)/gu, String.raw`\&`)
    .replace(/^([#+-]|\d+[.)])(?= )/u, (start) => `${start.slice(0, -1)}\\${start.slice(-1)}`);
}

/** Code, in a fence longer than any inside it. */
export function fenced(text: string, language = ""): string {
  const longest = Math.max(2, ...[...text.matchAll(/`+/gu)].map(([run]) => run.length));
  const fence = "`".repeat(longest + 1);
  return `${fence}${language}\n${text}\n${fence}`;
}
