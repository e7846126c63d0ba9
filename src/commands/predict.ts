import {
  type FitDocument,
  type LevelResult,
  labelsWithin,
  manifoldAt,
  type Prediction,
  type Propagation,
  predict as predictBands,
  type SeriesResult,
  turningPoint,
} from "../analysis/index.ts";
import { type Fault, InputError, type Warning } from "../messages/index.ts";
import type { Manifold, Model } from "../models/index.ts";
import { readMeasurement } from "../quantity/index.ts";
import { readBond } from "../species/index.ts";
import { readAssignments } from "./assignments.ts";
import { readCorrelation } from "./correlation.ts";
import { fitEach } from "./fit.ts";
import { gather } from "./gather.ts";
import { type ReadOptions, readOptions } from "./read-options.ts";
import { type FitRequest, requestSettings } from "./request.ts";
import { tool } from "./tool.ts";

/** What `predict` may be told: bands as for `fit`, or constants, or a stored result of `fit`. */
export interface PredictRequest extends FitRequest {
  /** such as "we=2990.95(1) wexe=52.82(1)"; stated uncertainties count as uncorrelated */
  readonly constants?: string;
  /** correlations of those constants, row by row above the diagonal: r12, or r12 r13 r23 */
  readonly correlation?: string | number;
  /** text of a result.json */
  readonly stored?: { readonly text: string; readonly source: string };
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

/** Constants ready to predict from. */
interface Source {
  readonly name: string;
  readonly values: readonly number[];
  readonly by: Propagation;
  readonly lastBandOut: number | null;
  readonly used: readonly { readonly label: string }[];
  /** u, for models that need it */
  readonly reducedMass: number | null;
  /** the fit says that no levels follow from it */
  readonly refused: boolean;
  readonly warnings: readonly Warning[];
}

/** Levels predicted from bare constants when nothing else is asked. */
const DEFAULT_UP_TO = 6;

/**
 * Positions of all v-0 bands up to a level, and hot bands on request, from bands, from a stored result, or from constants.
 * @throws InputError exit 2 for a wrong request, exit 3 when bands do not determine the constants
 */
export async function predict(request: PredictRequest): Promise<PredictDocument> {
  const { constants, correlation, stored, hot = 0, predictBond, ...rest } = request;
  const given = [constants, stored, request.series ?? request.bands ?? request.input].filter((x) => x !== undefined);
  if (given.length > 1)
    throw new InputError([
      {
        code: "source-twice",
        place: { source: "request" },
        what: "predictions can come from one source only",
        mend: "give bands, a result.json, or --constants",
      },
    ]);
  const { sources, options } =
    stored !== undefined
      ? await fromStored(stored, rest)
      : constants !== undefined
        ? await fromConstants(constants, correlation, rest)
        : await fromBands(rest);
  if (predictBond !== undefined && options.model.manifold === undefined)
    throw new InputError([
      {
        code: "predict-bond",
        place: { source: "--predict-bond" },
        what: `the model ${options.model.name} predicts no other bond`,
        mend: "leave it out, or name a model of coupled bonds: --model coupled",
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

type Prepared = { readonly sources: readonly Source[]; readonly options: ReadOptions };

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

function boundLevel(model: Model, values: readonly number[]): number | null {
  const limit =
    model.well === undefined ? (values[model.limit?.level ?? -1] ?? null) : turningPoint(model.well(values), 0);
  return limit === null ? null : Math.max(0, Math.ceil(limit - 1e-9) - 1);
}

async function fromBands(request: FitRequest): Promise<Prepared> {
  const gathered = await gather(request);
  return { sources: [...fitEach(gathered)].map(sourceOf), options: gathered.options };
}

/** What a result knows, as a source of predictions. */
function sourceOf(result: SeriesResult): Source {
  const keys = Object.keys(result.constants);
  const order = result.correlation?.order ?? [];
  const at = keys.map((key) => order.indexOf(key));
  const covariance =
    result.covariance === null ? null : at.map((i) => at.map((j) => (i < 0 || j < 0 ? 0 : result.covariance![i]![j]!)));
  return {
    name: result.name,
    values: keys.map((key) => result.constants[key]!.value),
    by: { covariance, degreesOfFreedom: result.quality.intervalDegreesOfFreedom, coverage: null },
    lastBandOut: result.predictions[0]?.lastBandOut ?? null,
    used: result.bands.filter((band) => band.used),
    reducedMass: result.reducedMass,
    refused: result.dissociation.some(({ method, d0 }) => method === "near-limit" && d0 === null),
    warnings: result.warnings,
  };
}

async function fromStored(stored: { text: string; source: string }, request: FitRequest): Promise<Prepared> {
  const fault = (what: string, mend: string) =>
    new InputError([{ code: "not-a-result", place: { source: stored.source }, what, mend }]);
  let document: Partial<FitDocument>;
  try {
    document = JSON.parse(stored.text);
  } catch {
    throw fault("is not JSON", "name the result.json of a report, or the output of rungwise fit --json");
  }
  const series = document?.series;
  if (document?.schemaVersion !== 1 || !Array.isArray(series) || series.length === 0 || !series.every(isResult))
    throw fault("holds no result of fit", "name the result.json of a report, or the output of rungwise fit --json");
  const { power } = document.request ?? {};
  const told = power === undefined ? request : { power, ...request };
  const settings = requestSettings({ ...told, model: series[0]!.model });
  const options = checked(await readOptions(settings));
  return { sources: series.map(sourceOf), options };
}

function isResult(x: unknown): x is SeriesResult {
  const result = x as Partial<SeriesResult> | null;
  return (
    typeof result?.model === "string" &&
    typeof result.constants === "object" &&
    Object.values(result.constants).every(({ value }) => Number.isFinite(value)) &&
    Array.isArray(result.bands) &&
    Array.isArray(result.predictions) &&
    Array.isArray(result.dissociation) &&
    typeof result.quality === "object"
  );
}

async function fromConstants(
  text: string,
  correlation: PredictRequest["correlation"],
  request: FitRequest,
): Promise<Prepared> {
  const options = checked(await readOptions(requestSettings(request)));
  // A model whose states mix tells by its options which constants there are.
  const keys = options.model.manifold === undefined ? null : options.model.prepare([], options.analysis).parameters;
  const constants =
    keys === null
      ? options.model.constants
      : options.model.constants.filter(({ key }) => keys.some((parameter) => parameter.key === key));
  if (options.model.well === undefined && options.model.manifold === undefined)
    throw new InputError([
      {
        code: "constants",
        place: { source: "--constants" },
        what: `constants of the model ${options.model.name} alone do not say which levels they hold for`,
        mend: "predict from the bands, or from a result.json",
      },
    ]);
  const faults: Fault[] = [];
  const fault = (what: string, mend: string) =>
    faults.push({ code: "constants", place: { source: "--constants" }, what, mend });
  const values: (number | null)[] = constants.map(() => null);
  const variances = constants.map(() => 0);
  let anyUncertain = false;
  for (const { key, value } of readAssignments(text)) {
    const at = constants.findIndex((constant) => constant.key === key);
    const read = readMeasurement(value ?? "");
    if (at < 0) fault(`there is no constant "${key}"`, `write some of ${constants.map((c) => c.key).join(", ")}`);
    else if (!read.ok) fault(`"${key}" has no number`, `write ${key}=52.8 or ${key}=52.8(1)`);
    else {
      values[at] = read.value;
      variances[at] = (read.sigma ?? 0) ** 2;
      anyUncertain ||= read.sigma !== null;
    }
  }
  const least = options.model.terms?.least ?? constants.length;
  const terms = values.findLastIndex((value) => value !== null) + 1;
  if (faults.length === 0 && values.slice(0, least).includes(null))
    fault(
      `needs at least ${constants
        .slice(0, least)
        .map((c) => c.key)
        .join(" and ")}`,
      'write "we=2990.95 wexe=52.82", for example',
    );
  if (faults.length > 0) throw new InputError(faults);
  const used = values.slice(0, Math.max(terms, least)).map((value) => value ?? 0);
  const r = readCorrelation(correlation, used.length);
  const covariance = anyUncertain
    ? used.map((_, i) =>
        used.map((_, j) => (r?.[i]?.[j] ?? Number(i === j)) * Math.sqrt((variances[i] ?? 0) * (variances[j] ?? 0))),
      )
    : null;
  const warnings: Warning[] =
    anyUncertain && r === null
      ? [
          {
            code: "constants-uncorrelated",
            message:
              "the constants are taken as uncorrelated: fitted ωe and ωexe are strongly correlated, so these uncertainties are rough; predict from bands or a result.json where they exist",
          },
        ]
      : [];
  return {
    sources: [
      {
        name: request.name ?? "constants",
        values: used,
        by: { covariance, degreesOfFreedom: null, coverage: null },
        lastBandOut: null,
        used: [],
        reducedMass: null,
        refused: false,
        warnings,
      },
    ],
    options,
  };
}

function checked({ options, faults }: Awaited<ReturnType<typeof readOptions>>): ReadOptions {
  if (options === null) throw new InputError(faults);
  return options;
}
