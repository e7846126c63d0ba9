import type { FitDocument, SeriesResult } from "../../analysis/index.ts";
import type { Notation } from "../../models/index.ts";
import type { Symbols } from "../symbols.ts";
import type { TableData } from "../table-data.ts";
import {
  bandsTable,
  commonErrorsTable,
  companionsTable,
  consequencesTable,
  constantsComparison,
  constantsTable,
  correlation,
  deperturbationTable,
  derivedTable,
  differencesTable,
  dissociationComparison,
  dissociationTable,
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
import { andList } from "../text/lists.ts";
import { bandsAsRead, excludedBands } from "./bands-section.ts";
import { startCitations } from "./citations.ts";
import { figuresSection, type ReportFigure } from "./figures-section.ts";
import { methods } from "./methods.ts";
import { reproduction } from "./reproduction.ts";
import { summary } from "./summary.ts";
import { sentence, table, words } from "./table.ts";
import { verbatim } from "./typeset.ts";

export interface ReportOptions {
  /** what makes this report again, as typed in a shell */
  readonly commandLine: string;
  readonly figures: readonly ReportFigure[];
  readonly notation: Notation;
  /** what the constants are called, by key; see `constantSymbols` */
  readonly symbols: Symbols;
  /** keys of the works that describe the model; @default those of a single oscillator */
  readonly modelReferences?: readonly string[];
  /** how the model defines its constants; @default the works say it */
  readonly modelDefinition?: string;
}

/**
 * The document of `fit` as report.md, written for the supplement of a paper: nothing but the document and the options goes
 * in, so the same input gives the same bytes. Ends with a newline.
 */
export function renderReport(document: FitDocument, options: ReportOptions): string {
  const { series } = document;
  const { symbols, notation, figures, commandLine, modelReferences = ["dunham1932", "herzberg1950"] } = options;
  const { modelDefinition = null } = options;
  // Levels that mix are listed instead: they have no well, no series of overtones to follow.
  const simple = series.some(({ levels }) => levels === null);
  const citations = startCitations();
  const each = (write: (one: SeriesResult) => string) => perSeries(series, write);
  const side = (write: (all: readonly SeriesResult[]) => TableData) =>
    series.length > 1 ? [table(write(series))] : [];
  const differences = differencesTable(document.comparisons, symbols);
  const parts: readonly (readonly [string, readonly string[]])[] = [
    ["Summary", series.map((one) => summary(one, symbols))],
    ["Bands as read and as used", each(bandsAsRead)],
    ["Excluded bands", each(excludedBands)],
    ["Constants", [...side((all) => constantsComparison(all, symbols)), ...each((one) => constantsPart(one, symbols))]],
    ["Differences", differences === null ? [] : [table(differences)]],
    ["Observed − calculated", each((one) => table(bandsTable(one)))],
    ["Bands with a companion", tablesOf(series, companionsTable)],
    ["Near-degeneracies", tablesOf(series, resonancesTable)],
    ["Errors in common", tablesOf(series, commonErrorsTable)],
    ["Levels", tablesOf(series, ({ levels }) => levelsTable(levels))],
    ["Overtones without the mixing", tablesOf(series, deperturbationTable)],
    ["What follows from the constants", tablesOf(series, consequencesTable)],
    [
      "Dissociation energy",
      [...side(dissociationComparison), ...each((one) => table(dissociationTable(one))), SAFETY_LINE],
    ],
    ["Enthalpy of dissociation", tablesOf(series, thermochemistryTable)],
    ["Derived numbers", simple ? each(derivedPart) : []],
    ["Predictions", simple ? [...each(predictionsPart), LASER_LINE] : []],
    ["Stability", simple ? each((one) => stabilityPart(one, symbols)) : []],
    ["Figures", figures.length === 0 ? [] : [figuresSection(figures)]],
    ["Methods", [methods({ document, notation, symbols, citations, modelReferences, modelDefinition })]],
    ["Warnings", warnings(document)],
    ["Reproduction", [reproduction(document, commandLine)]],
    ["References", [citations.list()]],
  ];
  const title = `# Vibrational analysis of ${andList(series.map(({ name }) => verbatim(name)))}`;
  const body = parts.filter(([, text]) => text.length > 0).map(([head, text]) => [`## ${head}`, ...text].join("\n\n"));
  return `${[title, ...body].join("\n\n")}\n`;
}

/** One text a series, under its name when there are several. */
function perSeries(series: readonly SeriesResult[], write: (one: SeriesResult) => string): string[] {
  return series.flatMap((one) => (series.length > 1 ? [`### ${verbatim(one.name)}`, write(one)] : [write(one)]));
}

/** A table of those series that have one; empty when none has. */
function tablesOf(series: readonly SeriesResult[], make: (one: SeriesResult) => TableData | null): string[] {
  const having = series.filter((one) => make(one) !== null);
  return having.flatMap((one) => [...(series.length > 1 ? [`### ${verbatim(one.name)}`] : []), table(make(one)!)]);
}

function constantsPart(one: SeriesResult, symbols: Symbols): string {
  const between = correlation(one, symbols);
  const { entries, notes } = qualityEntries(one);
  const terms = termsTable(one);
  return [
    table(constantsTable(one, symbols)),
    ...(between === null ? [] : [typeof between === "string" ? `${sentence(between)}.` : table(between)]),
    table({
      columns: entries.map(({ name }) => ({ quantity: name, align: "point" }) as const),
      rows: [{ cells: entries.map(({ value }) => value) }],
      notes,
    }),
    ...(terms === null ? [] : [table(terms)]),
  ].join("\n\n");
}

function derivedPart(one: SeriesResult): string {
  const derived = derivedTable(one);
  return derived === null ? "None: the constants of this model describe no well around a minimum." : table(derived);
}

function predictionsPart({ predictions }: SeriesResult): string {
  return predictions.length === 0
    ? "No bands are predicted: the series has no bound level to predict."
    : table(predictionsTable(predictions));
}

function stabilityPart(one: SeriesResult, symbols: Symbols): string {
  const stability = stabilityTable(one, symbols);
  return stability === null
    ? "Fewer bands do not determine the constants, so there is nothing to compare."
    : table(stability);
}

/** Those on the request, then those of each series under its name. */
function warnings({ warnings: general, series }: FitDocument): string[] {
  const lines = [
    ...general.map(({ message }) => `- ${words(message)}`),
    ...series.flatMap((one) =>
      one.warnings.map(({ message }) => `- ${series.length > 1 ? `${verbatim(one.name)}: ` : ""}${words(message)}`),
    ),
  ];
  return [lines.length === 0 ? "None." : lines.join("\n")];
}
