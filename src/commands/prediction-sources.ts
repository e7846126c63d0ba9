import type { FitDocument, Propagation, SeriesResult } from "../analysis/index.ts";
import { type Light, readLight } from "../bands/index.ts";
import { type Fault, InputError, type Warning } from "../messages/index.ts";
import { readMeasurement } from "../quantity/index.ts";
import { readBond } from "../species/index.ts";
import { readAssignments } from "./assignments.ts";
import { readCorrelation } from "./correlation.ts";
import { fitEach } from "./fit.ts";
import { gather } from "./gather.ts";
import { type ReadOptions, readOptions } from "./read-options.ts";
import { type FitRequest, requestSettings } from "./request.ts";

/** Bands as for `fit`, or constants, or a stored result of `fit`. */
export interface SourceRequest extends FitRequest {
  /** such as "we=2990.95(1) wexe=52.82(1)"; uncorrelated unless `correlation` says otherwise */
  readonly constants?: string;
  /** text of a result.json */
  readonly stored?: { readonly text: string; readonly source: string };
}

/** Constants ready to predict from. */
export interface Source {
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

interface Prepared {
  readonly sources: readonly Source[];
  readonly options: ReadOptions;
  /** that bands are, or were, seen in */
  readonly light: Light;
}

/** Constants from one of the three. @throws InputError as `predict` */
export async function sourcesOf({ constants, correlation, stored, ...rest }: SourceRequest): Promise<Prepared> {
  const given = [constants, stored, rest.series ?? rest.bands ?? rest.input].filter((x) => x !== undefined);
  if (given.length > 1)
    throw new InputError([
      {
        code: "source-twice",
        place: { source: "request" },
        what: "constants can come from one source only",
        mend: "give bands, a result.json, or --constants",
      },
    ]);
  if (correlation !== undefined && constants === undefined)
    throw new InputError([
      {
        code: "correlation-alone",
        place: { source: "--correlation" },
        what: "bands and a result.json carry the correlations of their constants",
        mend: "leave it out, or give --constants",
      },
    ]);
  if (stored !== undefined) return fromStored(stored, rest);
  return constants !== undefined ? fromConstants(constants, correlation, rest) : fromBands(rest);
}

async function fromBands(request: FitRequest): Promise<Prepared> {
  const gathered = await gather(request);
  return {
    sources: [...fitEach(gathered)].map(sourceOf),
    options: gathered.options,
    light: readLight(gathered.settings),
  };
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
  // What the model was told of itself belongs to its constants.
  const told = (names: readonly string[]) =>
    Object.fromEntries(
      names.flatMap((name) => {
        const value = document.request?.[name];
        return value === undefined ? [] : [[name, value] as const];
      }),
    );
  const ofModel = told(["power", "bonds", "cross", "bend"]);
  const options = checked(await readOptions(requestSettings({ ...ofModel, ...request, model: series[0]!.model })));
  const light = readLight(requestSettings({ ...told(["laser", "medium", "air"]), ...request }));
  return { sources: series.map(sourceOf), options, light };
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
  correlation: SourceRequest["correlation"],
  request: FitRequest,
): Promise<Prepared> {
  const options = checked(await readOptions(requestSettings(request)));
  // A model whose states mix tells by its options which constants there are.
  const constants =
    options.model.manifold === undefined
      ? options.model.constants
      : options.model.prepare([], options.analysis).parameters;
  const bond = request.bond === undefined ? null : readBond(request.bond);
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
    else if (values[at] !== null) fault(`"${key}" stands there twice`, "name each constant once");
    else if (!read.ok) fault(`"${key}" has no number`, `write ${key}=52.8 or ${key}=52.8(1)`);
    else {
      values[at] = read.value;
      variances[at] = (read.sigma ?? 0) ** 2;
      anyUncertain ||= read.sigma !== null;
    }
  }
  const least = options.model.terms?.least ?? constants.length;
  const terms = values.findLastIndex((value) => value !== null) + 1;
  const missing = constants.slice(0, least).flatMap(({ key }, k) => (values[k] === null ? [key] : []));
  if (faults.length === 0 && missing.length > 0)
    fault(
      `${missing.join(" and ")} ${missing.length === 1 ? "is" : "are"} missing`,
      options.model.well === undefined
        ? `write "${constants.map(({ key }) => `${key}=…`).join(" ")}"`
        : 'write "we=2990.95 wexe=52.82", for example',
    );
  if (faults.length > 0) throw new InputError(faults);
  const used = values.slice(0, Math.max(terms, least)).map((value) => value ?? 0);
  const r = readCorrelation(correlation, used.length);
  if (r !== null && !anyUncertain)
    throw new InputError([
      {
        code: "correlation-without-uncertainty",
        place: { source: "--correlation" },
        what: "the constants carry no uncertainties",
        mend: "write them as in we=2990.95(1)",
      },
    ]);
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
              "the constants are taken as uncorrelated: fitted ones are strongly correlated, so these uncertainties are rough; predict from bands or a result.json where they exist",
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
        reducedMass: bond === null || "what" in bond ? null : bond.reducedMass,
        refused: false,
        warnings,
      },
    ],
    options,
    light: readLight(requestSettings(request)),
  };
}

function checked({ options, faults }: Awaited<ReturnType<typeof readOptions>>): ReadOptions {
  if (options === null) throw new InputError(faults);
  return options;
}
