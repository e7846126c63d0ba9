import type { SeriesResult } from "../../analysis/index.ts";
import { type Symbols, symbolOf } from "../symbols.ts";
import {
  bandsTable,
  commonErrorsTable,
  companionsTable,
  consequencesTable,
  constantsTable,
  correlation,
  deperturbationTable,
  derivedTable,
  dissociationTable,
  exclusions,
  LASER_LINE,
  levelsTable,
  predictionsTable,
  qualityEntries,
  resonancesTable,
  SAFETY_LINE,
  stabilityTable,
  termsTable,
  thermochemistryTable,
} from "../tables/index.ts";
import { bondText } from "../text/bond-text.ts";
import { exact, quantity } from "../text/cells.ts";
import { count } from "../text/lists.ts";
import { printUnits, unitSymbol } from "../text/units.ts";
import { wrap } from "../text/wrap.ts";
import type { Paint } from "./paint.ts";
import { section } from "./section.ts";

/** Everything about one series, in blocks separated by blank lines. */
export function renderSeries(series: SeriesResult, symbols: Symbols, paint: Paint): string {
  const dissociation = dissociationTable(series);
  const terms = termsTable(series);
  const derived = derivedTable(series);
  const common = commonErrorsTable(series);
  const resonances = resonancesTable(series);
  const companions = companionsTable(series);
  const levels = levelsTable(series.levels);
  const follows = consequencesTable(series);
  const deperturbed = deperturbationTable(series);
  const heat = thermochemistryTable(series);
  const { fitReport, predictions } = series;
  return [
    headline(series, paint),
    section("Constants", [constantsTable(series, symbols), correlation(series, symbols)], paint),
    terms === null ? null : section("Number of terms", [terms], paint),
    section("Bands", [bandsTable(series), ...exclusions(series)], paint),
    companions === null ? null : section("Bands with a companion", [companions], paint),
    resonances === null ? null : section("Near-degeneracies", [resonances], paint),
    common === null ? null : section("Errors in common", [common], paint),
    levels === null ? null : section("Levels", [levels], paint),
    deperturbed === null ? null : section("Overtones without the mixing", [deperturbed], paint),
    follows === null ? null : section("What follows", [follows], paint),
    section("Dissociation", [{ ...dissociation, notes: dissociation.notes.map(printUnits) }, SAFETY_LINE], paint),
    heat === null ? null : section("Enthalpy of dissociation", [heat], paint),
    derived === null ? null : section("Derived", [derived], paint),
    predictions.length === 0 ? null : section("Predictions", [predictionsTable(predictions), LASER_LINE], paint),
    stabilityBlock(series, symbols, paint),
    fitReport.converged ? null : section("Fit", [`Not converged: ${fitReport.reason}`], paint),
  ]
    .filter((block) => block !== null)
    .join("\n\n");
}

function stabilityBlock(series: SeriesResult, symbols: Symbols, paint: Paint): string | null {
  const table = stabilityTable(series, symbols);
  return table === null ? null : section("Stability", [table], paint);
}

function headline(series: SeriesResult, paint: Paint): string {
  const { name, bond, reducedMass, model, terms } = series;
  const mass = reducedMass === null ? null : `μ = ${exact(Number(reducedMass.toPrecision(8)))} u`;
  const about = [
    bond === null || bond.startsWith("reduced mass") ? null : bondText(bond),
    mass,
    terms === null ? model : `${model}, ${count(terms, "term")}`,
  ].filter((part) => part !== null);
  const { entries, notes } = qualityEntries(series);
  const line = entries.map(
    ({ name: what, value }) => `${what.replaceAll(" ", "\u00a0")}\u00a0${value.replaceAll(" ", "\u00a0")}`,
  );
  return [
    paint.strong(name),
    wrap(about.join(", "), "  "),
    wrap(line.join(", "), "  "),
    ...notes.map((note) => wrap(note, "  ", "    ")),
  ].join("\n");
}

/** Constants and the headline D0, nothing else. */
export function renderSeriesBriefly(series: SeriesResult, symbols: Symbols, paint: Paint): string {
  const d0 = series.dissociation[0];
  const lines = [
    ...Object.entries(series.constants).map(
      ([key, q]) => [symbolOf(symbols, key), `${quantity(q)} ${unitSymbol(q.unit)}`.trim()] as const,
    ),
    ...(d0 === undefined
      ? []
      : [["D0", d0.d0 === null ? `— (${d0.note ?? "not determined"})` : `${quantity(d0.d0)} cm⁻¹`] as const]),
  ];
  return [paint.strong(series.name), ...lines.map(([name, value]) => wrap(value, `  ${name} = `, "    "))].join("\n");
}
