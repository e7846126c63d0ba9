/** Units as printed, by the way they stand in data. */
const printed: Readonly<Record<string, string>> = {
  "1": "",
  "cm-1": "cm⁻¹",
  um: "µm",
  "N/m": "N m⁻¹",
  "1/Å": "Å⁻¹",
  "kJ/mol": "kJ mol⁻¹",
  "kcal/mol": "kcal mol⁻¹",
};

/** A unit as printed: `cm-1` → `cm⁻¹`, `kJ/mol` → `kJ mol⁻¹`, `cm-1 Å^6` → `cm⁻¹ Å⁶`; unknown ones as they are. */
export function unitSymbol(unit: string): string {
  if (Object.hasOwn(printed, unit)) return printed[unit]!;
  return unit
    .replace(/\bcm-1\b/gu, "cm⁻¹")
    .replace(/\^(\d+)$/u, (_, power: string) => [...power].map((digit) => "⁰¹²³⁴⁵⁶⁷⁸⁹"[Number(digit)]).join(""));
}

/** The unit as the divisor of a quotient: several factors stand in parentheses, `(kJ mol⁻¹)`. */
export function divisor(unit: string): string {
  const symbol = unitSymbol(unit);
  return symbol.includes(" ") ? `(${symbol})` : symbol;
}

/** Quantity over unit, the way heads of tables name numbers: `D0 / (kJ mol⁻¹)`. */
export const quotient = (quantity: string, unit: string): string => `${quantity} / ${divisor(unit)}`;

/** Sentences written with `cm-1` after a number, as printed. Words a user may type, such as `--unit cm-1`, stay. */
export function printUnits(sentence: string): string {
  return sentence.replace(/(?<=\d\)?[ \u00a0])cm-1\b/gu, "cm⁻¹");
}
