import type { Series } from "../bands/index.ts";
import type { Warning } from "../messages/index.ts";
import type { Model, Well } from "../models/index.ts";
import { acceptedD0 } from "./accepted.ts";
import { chooseTerms } from "./choice-of-terms.ts";
import { commonErrors } from "./common-errors.ts";
import { derivedNumbers, highestLevel } from "./derived.ts";
import { dissociationRows } from "./dissociation/rows.ts";
import { withEmpirical } from "./empirical/with-empirical.ts";
import { fitWarnings } from "./fit-warnings.ts";
import { bandResults, qualityOf } from "./fitted-bands.ts";
import { followManifold } from "./follow-manifold.ts";
import { refineIntervals } from "./intervals.ts";
import { withMixture } from "./mixture.ts";
import { followLimit } from "./near-limit/follow-limit.ts";
import type { AnalysisOptions } from "./options.ts";
import { predict } from "./predictions.ts";
import { propagate } from "./propagation.ts";
import { findResonances, withCandidate } from "./resonances.ts";
import type { Prediction, SeriesResult } from "./result.ts";
import { type Solution, solve } from "./solution.ts";
import { stabilityRows } from "./stability.ts";
import { thermochemistry } from "./thermochemistry/thermochemistry.ts";
import { y00Of } from "./y00.ts";

/** How many overtones beyond the last band are predicted when nothing else is asked. */
const LEVELS_BEYOND = 3;

/**
 * Fit one series and derive everything that follows. Pure; units as in SeriesResult.
 * Throws InputError with exit 3 when the bands do not determine the constants.
 */
export function analyse(measured: Series, model: Model, given: AnalysisOptions): SeriesResult {
  const { solution, choice, warnings: aboutMixture } = solutionOf(measured, model, given);
  const { series, options, fit, by, linear } = solution;
  const reducedMass = series.bond?.reducedMass ?? null;
  const p = fit.values;
  const { parameters } = model.prepare([], options);
  const free = solution.stated.keys.flatMap((key, k) => (options.fixed[key]?.sigma === null ? [] : [k]));
  const { first, warnings, ...follows } = whatFollows(solution);
  const known = acceptedD0(solution);
  const common = commonErrors(solution);
  // Where the law itself is refused, no single band is to blame.
  const aboutFit = fitWarnings(solution, choice !== null).filter(
    ({ code }) => first.length === 0 || code !== "band-stands-out",
  );
  const standsOut = aboutFit.find(({ code }) => code === "band-stands-out")?.about ?? null;
  const resonances =
    options.modes.length === 0 || model.well === undefined
      ? null
      : findResonances(solution, standsOut, options.modes, options.window);
  const heat = thermochemistry(solution, follows.dissociation, known.accepted);
  return refineIntervals(solution, {
    name: series.name,
    model: model.name,
    terms: model.terms === null ? null : p.length,
    bond: series.bond?.text ?? null,
    reducedMass,
    constants: Object.fromEntries(
      fit.keys.map((key, k) => [
        key,
        free.includes(k)
          ? propagate(p[k]!, unit(p.length, k), parameters[k]!.unit, by)
          : { value: p[k]!, standardUncertainty: null, interval95: null, unit: parameters[k]!.unit },
      ]),
    ),
    held: fit.keys.filter((_, k) => !free.includes(k)),
    ...correlationOf(fit.keys, free, fit.covariance),
    quality: qualityOf(solution),
    bands: bandResults(solution),
    ...follows,
    accepted: known.accepted,
    thermochemistry: heat.thermochemistry,
    comparison: choice?.comparison ?? null,
    commonErrors: common.errors,
    resonances,
    intervals: null,
    fitReport: {
      method: `${linear ? LINEAR_METHOD : NONLINEAR_METHOD}${options.robust === null ? "" : `, robust weights (${options.robust})`}`,
      converged: fit.converged,
      reason: fit.reason,
      iterations: fit.iterations,
    },
    warnings: [
      ...first,
      ...series.warnings,
      ...aboutMixture,
      ...common.warnings,
      ...(choice?.warnings ?? []),
      ...withCandidate(aboutFit, resonances),
      ...warnings,
      ...known.warnings,
      ...heat.warnings,
    ],
  });
}

/** The fit of a series as it was measured: natural mixtures in the errors, and the number of terms chosen where that is asked for. */
export function solutionOf(measured: Series, model: Model, given: AnalysisOptions) {
  const { series, warnings } = withMixture(measured, model, given);
  const reducedMass = series.bond?.reducedMass ?? null;
  const asked = model.limit === undefined ? given : { ...given, reducedMass };
  const choice = wantsChoice(series, model, asked) ? chooseTerms(series, model, asked) : null;
  const options = choice === null ? asked : { ...asked, terms: choice.terms };
  return { solution: solve(series, model, options), choice, warnings };
}

const LINEAR_METHOD = "generalised least squares on the band positions, Householder QR on scaled columns";
const NONLINEAR_METHOD =
  "generalised least squares on the band positions, damped Gauss-Newton steps (Levenberg-Marquardt), Householder QR for the last ones";

/** What a model lets one conclude beyond its constants. `first`: warnings that are headlines. */
type Follows = Pick<
  SeriesResult,
  "dissociation" | "derived" | "predictions" | "stability" | "levels" | "consequences" | "deperturbation" | "warnings"
> & {
  readonly first: readonly Warning[];
};

/** The model is asked what it can do: a well, a law of the limit, or constants alone. */
function whatFollows(solution: Solution): Follows {
  const { model, fit } = solution;
  const none = {
    dissociation: [],
    derived: null,
    predictions: [],
    stability: [],
    levels: null,
    consequences: [],
    deperturbation: null,
    warnings: [],
    first: [],
  };
  if (model.manifold !== undefined) return { ...none, ...followManifold(solution, model.manifold(solution.options)) };
  if (model.well !== undefined) return { ...none, ...followWell(solution, model.well(fit.values)) };
  return model.limit === undefined ? none : { ...none, ...followLimit(solution, model.limit) };
}

function followWell(
  solution: Solution,
  well: Well,
): Omit<Follows, "first" | "levels" | "consequences" | "deperturbation"> {
  const { series, model, options, fit, by } = solution;
  const p = fit.values;
  const reducedMass = series.bond?.reducedMass ?? null;
  const top = Math.max(...solution.used.map((band) => model.levels(band.label).upper));
  const y00 = y00Of(well, p, options, reducedMass);
  const empirical = withEmpirical(dissociationRows(solution, well, top, y00?.value ?? 0), solution, well, top);
  const { predictions, warnings } = predictionsOf(solution, well, top);
  return {
    dissociation: empirical.rows,
    derived: derivedNumbers(well, p, by, reducedMass, y00),
    predictions,
    stability: stabilityRows(solution),
    warnings: [...empirical.warnings, ...warnings, ...aboutWell(well, p, series, options, y00 !== null)],
  };
}

/** The bands choose when asked to, and by default where they can: σ known and a degree of freedom left beside the least number. */
function wantsChoice(series: Series, model: Model, { autoTerms, terms, fixed, robust }: AnalysisOptions): boolean {
  if (model.terms === null || autoTerms) return model.terms !== null;
  if (terms !== null || Object.keys(fixed).length > 0 || robust !== null) return false;
  const used = series.bands.filter((band) => band.use);
  return used.every((band) => band.sigma !== null) && used.length > model.terms.least;
}

const unit = (size: number, at: number) => Array.from({ length: size }, (_, k) => (k === at ? 1 : 0));

function correlationOf(
  keys: readonly string[],
  free: readonly number[],
  covariance: readonly (readonly number[])[] | null,
): Pick<SeriesResult, "correlation" | "covariance"> {
  if (covariance === null) return { correlation: null, covariance: null };
  const part = free.map((i) => free.map((j) => covariance[i]![j]!));
  const matrix = part.map((row, i) => row.map((c, j) => (i === j ? 1 : c / Math.sqrt(part[i]![i]! * part[j]![j]!))));
  return { correlation: { order: free.map((k) => keys[k]!), matrix }, covariance: part };
}

function predictionsOf(
  { model, options, used, fit, by, treated }: Solution,
  well: Well,
  top: number,
): { predictions: Prediction[]; warnings: Warning[] } {
  const highest = highestLevel(well, by)?.value ?? null;
  const wanted = options.upTo ?? top + LEVELS_BEYOND;
  const upTo = highest === null ? wanted : Math.min(wanted, highest);
  const topBand = used.findIndex((band) => model.levels(band.label).upper === top);
  const miss = treated().leftOut[topBand] ?? null;
  const predictions = predict(
    model,
    options,
    model.labels(upTo),
    fit.values,
    by,
    miss === null ? null : Math.abs(miss),
    used,
  );
  const warnings: Warning[] = [];
  if (options.upTo !== null && upTo < options.upTo)
    warnings.push({
      code: "above-highest-level",
      message: `predictions end at ${upTo}-0: the fitted series has no bound level above v = ${upTo}; ask for --up-to ${upTo} or less`,
    });
  if (predictions.some((line) => !line.observed && line.vacuumWavelength > 1690))
    warnings.push({
      code: "air-range-extended",
      message:
        "air wavelengths beyond 1690 nm extrapolate Ciddor's dispersion formula (error about 1e-4 cm-1); use the vacuum values where that matters",
    });
  return { predictions, warnings };
}

function aboutWell(
  well: Well,
  p: readonly number[],
  series: Series,
  options: AnalysisOptions,
  y00Known: boolean,
): Warning[] {
  const warnings: Warning[] = [];
  if (!(p[well.leading[1]]! > 0))
    warnings.push({
      code: "wexe-not-positive",
      message:
        "ωexe came out ≤ 0: the spacings do not shrink, so no dissociation energy follows; check the labels (positions or spacings?) and the bands",
      about: "wexe",
    });
  if (series.bond === null)
    warnings.push({
      code: "no-bond",
      message: "no masses are known, so force constant and Morse a are left out; give --bond or --reduced-mass",
    });
  if (!y00Known)
    warnings.push({
      code: "y00-unknown",
      message:
        options.re !== null && options.alphaE === null
          ? "re alone does not determine Y00 (an exact Morse curve has none); De and the zero point leave it out; give --alpha-e too"
          : "De and the zero point leave out Dunham's Y00 (0.2 cm-1 for CO, 9 for H2; D0 does not depend on it); give --be or --re, and --alpha-e",
    });
  return warnings;
}
