import {
  boundLevel,
  type LevelResult,
  labelsWithin,
  manifoldAt,
  type Prediction,
  predict as predictBands,
} from "../analysis/index.ts";
import { InputError, type Warning } from "../messages/index.ts";
import type { Manifold } from "../models/index.ts";
import { readBond } from "../species/index.ts";
import { type Source, type SourceRequest, sourcesOf } from "./prediction-sources.ts";
import type { ReadOptions } from "./read-options.ts";
import { tool } from "./tool.ts";

/** What `predict` may be told: bands as for `fit`, or constants, or a stored result of `fit`. */
export interface PredictRequest extends Omit<SourceRequest, "window" | "modes"> {
  /** also bands that start from levels up to this; @default 0 */
  readonly hot?: number;
  /** coupled bonds: the same bonds with another isotope, such as "O D", by mass scaling */
  readonly predictBond?: string;
}

/** The predictions of one series. */
export interface SeriesPredictions {
  readonly name: string;
  readonly predictions: readonly Prediction[];
  /** of models whose states mix; null for others */
  readonly levels: readonly LevelResult[] | null;
  readonly warnings: readonly Warning[];
}

/** The document of `predict`; `predictions` and `levels` are those of the first series. */
export interface PredictDocument {
  readonly schemaVersion: 1;
  readonly tool: { readonly name: string; readonly version: string };
  readonly predictions: readonly Prediction[];
  readonly levels: readonly LevelResult[] | null;
  readonly series: readonly SeriesPredictions[];
  readonly warnings: readonly Warning[];
}

/** Levels predicted from bare constants when nothing else is asked. */
const DEFAULT_UP_TO = 6;

/**
 * Positions of all v-0 bands up to a level, and hot bands on request, from bands, from a stored result, or from constants.
 * @throws InputError exit 2 for a wrong request, exit 3 when bands do not determine the constants
 */
export async function predict(request: PredictRequest): Promise<PredictDocument> {
  const { hot = 0, predictBond, ...rest } = request;
  const { sources, options } = await sourcesOf(rest);
  if (predictBond !== undefined && options.model.manifold === undefined)
    throw new InputError([
      {
        code: "predict-bond",
        place: { source: "--predict-bond" },
        what: `the model ${options.model.name} predicts no other bond`,
        mend: "leave it out, or name a model of coupled bonds: --model coupled",
      },
    ]);
  if (hot > 0 && options.model.manifold !== undefined)
    throw new InputError([
      {
        code: "hot",
        place: { source: "--hot" },
        what: `the model ${options.model.name} lists levels, not bands`,
        mend: "leave it out: a hot band lies at the difference of two levels",
      },
    ]);
  const series = sources.map((source) =>
    options.model.manifold === undefined
      ? predictionsFrom(source, options, hot)
      : levelsFrom(source, options, predictBond ?? null),
  );
  const [first] = series;
  return {
    schemaVersion: 1,
    tool,
    predictions: first?.predictions ?? [],
    levels: first?.levels ?? null,
    series,
    warnings: [],
  };
}

function predictionsFrom(source: Source, { model, analysis }: ReadOptions, hot: number): SeriesPredictions {
  const { values, by } = source;
  if (source.refused) return { name: source.name, predictions: [], levels: null, warnings: source.warnings };
  const terms = values.length;
  const limit = boundLevel(model, values);
  const top = Math.max(0, ...source.used.map(({ label }) => model.levels(label).upper));
  const wanted = analysis.upTo ?? (top > 0 ? top + 3 : DEFAULT_UP_TO);
  const upTo = limit === null ? wanted : Math.min(wanted, limit);
  const labels = model.labels(upTo);
  for (let lower = 1; lower <= hot; lower++)
    for (let upper = lower + 1; upper <= upTo; upper++) labels.push(`${upper}-${lower}`);
  const warnings = [...source.warnings];
  if (analysis.upTo !== null && upTo < analysis.upTo)
    warnings.push({
      code: "above-highest-level",
      message: `predictions end at v = ${upTo}: these constants have no bound level above it; ask for --up-to ${upTo} or less`,
    });
  const options = { ...analysis, terms, fixed: {}, reducedMass: source.reducedMass };
  const inside = model.limit === undefined ? labels : labelsWithin(labels, source.used, model, options, values);
  const by95 = { ...by, coverage: analysis.coverage };
  return {
    name: source.name,
    predictions: predictBands(model, options, inside, values, by95, source.lastBandOut, source.used),
    levels: null,
    warnings,
  };
}

/** Levels of a model whose states mix, on request of the same bonds with another isotope. */
function levelsFrom(source: Source, { model, analysis }: ReadOptions, bond: string | null): SeriesPredictions {
  const manifold = model.manifold!(analysis);
  const top = Math.max(0, ...source.used.map(({ label }) => model.levels(label).upper));
  const upTo = analysis.upTo ?? (top > 0 ? top + 1 : 3);
  const { values, warnings } = bond === null ? source : otherBond(source, manifold, bond);
  return {
    name: source.name,
    predictions: [],
    levels: manifoldAt(manifold, values, bond === null ? source.by : { ...source.by, covariance: null }, upTo).levels,
    warnings,
  };
}

function otherBond(
  { values, reducedMass, warnings }: Source,
  manifold: Manifold,
  text: string,
): Pick<Source, "values" | "warnings"> {
  const fault = (what: string, mend: string) =>
    new InputError([{ code: "predict-bond", place: { source: "--predict-bond" }, what, mend }]);
  const bond = readBond(text);
  if ("what" in bond) throw fault(bond.what, bond.mend);
  if (manifold.scaled === undefined) throw fault("this model is not scaled to other masses", "leave it out");
  if (reducedMass === null)
    throw fault("the masses of the bonds at hand are not known", 'give them too, such as --bond "16O 1H"');
  return {
    values: manifold.scaled(values, Math.sqrt(reducedMass / bond.reducedMass)),
    warnings: [
      ...warnings,
      {
        code: "mass-scaled",
        message: `levels of ${bond.text} by mass scaling of ω̃ (ρ) and ω̃x (ρ²) with the reduced mass of the pair, λ kept: a polyatomic molecule follows that to some tenths of a percent at best, and the coupling of heavier atoms differs; check against one observed band`,
      },
    ],
  };
}
