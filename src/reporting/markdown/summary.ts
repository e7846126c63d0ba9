import type { SeriesResult } from "../../analysis/index.ts";
import { type Symbols, symbolOf } from "../symbols.ts";
import { bondText } from "../text/bond-text.ts";
import { exact, measured, quantity } from "../text/cells.ts";
import { andList, count } from "../text/lists.ts";
import { unitSymbol } from "../text/units.ts";
import { sentence } from "./table.ts";
import { verbatim } from "./typeset.ts";

/** What was found for a series, in two sentences. */
export function summary(series: SeriesResult, symbols: Symbols): string {
  const { name, bond, quality, constants, dissociation, terms, model, held } = series;
  const of = bond === null || bond === name || bond.startsWith("reduced mass") ? name : `${name} (${bondText(bond)})`;
  const values = Object.entries(constants).map(([key, q]) =>
    held.includes(key)
      ? `${symbolOf(symbols, key)} = ${exact(q.value)} ${unitSymbol(q.unit)}`.trim().concat(" (held)")
      : `${symbolOf(symbols, key)} = ${quantity(q)} ${unitSymbol(q.unit)}`.trim(),
  );
  const how = terms === null ? `the ${model} model` : count(terms, "term");
  const fitted = sentence(`fitted with ${how} give${quality.bands === 1 ? "s" : ""} ${andList(values)}.`);
  const first = `${count(quality.bands, "band")} of ${verbatim(of)} ${fitted}`;
  const d0 = dissociation[0];
  if (d0?.d0 == null)
    return `${first} ${sentence(`No dissociation energy follows from them: ${d0?.note ?? "not determined"}.`)}`;
  const [kj, u] = d0.converted?.["kJ/mol"] ?? [null, null];
  const molar = kj === null ? "" : `, ${measured(kj, u)} kJ mol⁻¹`;
  const way =
    d0.method === "near-limit" ? "The law of the limit puts it at" : "The Morse relation extrapolates them to";
  const second = `${way} D0 = ${quantity(d0.d0)} cm⁻¹${molar}; its uncertainty is that of the fit alone.`;
  return `${first} ${sentence(second)}`;
}
