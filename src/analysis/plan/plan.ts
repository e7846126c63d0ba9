import type { Series, Shared } from "../../bands/index.ts";
import { dot, timesInverse } from "../../fitting/index.ts";
import { InputError } from "../../messages/index.ts";
import type { Model } from "../../models/index.ts";
import {
  airRange,
  fromWavenumber,
  isWavelength,
  type Quantity,
  type UnitName,
  wavenumberPerUnit,
} from "../../quantity/index.ts";
import { solutionOf } from "../analyse.ts";
import { morseDe } from "../dissociation/morse.ts";
import type { AnalysisOptions } from "../options.ts";
import { addScaled, propagate, varianceOf } from "../propagation.ts";
import { type Solution, trySolve } from "../solution.ts";
import { turningPoint } from "../turning-point.ts";

/** What a plan is to make better known. */
export type Aim =
  | { readonly kind: "constant"; readonly key: string }
  | { readonly kind: "d0" }
  | { readonly kind: "prediction"; readonly label: string }
  | { readonly kind: "model" };

/** Where the user can look, in cm-1 of vacuum. */
export interface Window {
  readonly low: number;
  readonly high: number;
  readonly text: string;
}

export interface PlanOptions {
  readonly aim: Aim;
  /** σ of the new band: in cm-1, or in a unit in which it is constant; null: the median of those stated */
  readonly sigmaNew: { readonly value: number; readonly unit: UnitName } | null;
  /** highest level of a new band; null: three beyond the last */
  readonly upTo: number | null;
  /** highest level hot bands start from */
  readonly hot: number;
  readonly windows: readonly Window[];
}

/** A band that could be measured next. */
export interface PlannedBand {
  readonly label: string;
  /** where to look, cm-1 */
  readonly position: Quantity;
  /** nm */
  readonly vacuumWavelength: number;
  readonly airWavelength: number | null;
  /** how far the same model misses the highest observed band when that is left out, cm-1 */
  readonly lastBandOut: number | null;
  /** standard uncertainty the new band is given, cm-1 */
  readonly sigmaNew: number;
  /** standard uncertainty of the aim with this band added */
  readonly uncertaintyAfter: number;
  /** uncertainty now over that after */
  readonly gain: number;
  /** aim model: by how many standard uncertainties the two models differ there; otherwise null */
  readonly separation: number | null;
  readonly observed: boolean;
}

export interface Plan {
  readonly name: string;
  readonly aim: string;
  /** the aim as it is known now; of the aim model: the last constant of the larger model */
  readonly now: Quantity;
  /** the best first */
  readonly candidates: readonly PlannedBand[];
}

/** Levels beyond the last band that are looked at when nothing else is asked. */
const BEYOND = 3;

/**
 * Which further band would most reduce the uncertainty of an aim. A new datum with row x and variance s², correlated with the others by the errors they
 * share, changes the covariance C of the constants to C - C·x·xᵀ·C/(s² + xᵀ·C·x), x and s² being those left after what the others tell of it (Aitken
 * 1936); for a model that is not linear in its constants that is the first-order change. Scatter τ, where one was added, is added to the new band too.
 * @throws InputError exit 2 for an aim the model cannot have or windows without any band, exit 3 when the bands determine no uncertainty
 */
export function planNext(series: Series, model: Model, given: AnalysisOptions, options: PlanOptions): Plan {
  const { solution } = solutionOf(series, model, given);
  const basis = options.aim.kind === "model" ? largerModel(solution) : solution;
  const { fit, by, treated, used } = basis;
  if (by.covariance === null)
    throw fault(
      solution,
      "no-uncertainty",
      "the bands give no uncertainty that a further band could reduce",
      "state σ with --sigma, or give a band more",
      3,
    );
  const aim = aimOf(basis, options.aim);
  const now = aim.quantity;
  const before = Math.sqrt(varianceOf(by.covariance, aim.gradient));
  const top = Math.max(...used.map((band) => model.levels(band.label).upper));
  const miss = treated.leftOut[used.findIndex((band) => model.levels(band.label).upper === top)] ?? null;
  const limit = model.well === undefined ? null : turningPoint(model.well(fit.values), 0);
  const upTo = Math.min(options.upTo ?? top + BEYOND, limit === null ? Number.POSITIVE_INFINITY : Math.ceil(limit) - 1);
  const labels = labelsUpTo(model, upTo, options.hot);
  const { calculated, jacobian } = model
    .prepare(
      labels.map((label) => ({ label, isotopologue: null })),
      basis.options,
    )
    .evaluate(fit.values);
  const inWindow = (position: number) =>
    options.windows.length === 0 || options.windows.some(({ low, high }) => position >= low && position <= high);
  const weaker = options.aim.kind === "model" ? solution : null;
  const candidates = labels.flatMap((label, i): PlannedBand[] => {
    const position = calculated[i]!;
    if (!(position > 0) || !inWindow(position)) return [];
    const sigma = sigmaOf(basis, options.sigmaNew, position);
    const after = uncertaintyWith(basis, { label, position, sigma, row: jacobian[i]! }, aim.gradient);
    const vacuumWavelength = fromWavenumber(position, "nm");
    return [
      {
        label,
        position: propagate(position, jacobian[i]!, "cm-1", by),
        vacuumWavelength,
        airWavelength:
          airRange(vacuumWavelength) === "refused" ? null : fromWavenumber(position, "nm", "air", given.air),
        lastBandOut: miss === null ? null : Math.abs(miss),
        sigmaNew: sigma,
        uncertaintyAfter: after,
        gain: after > 0 ? before / after : Number.MAX_VALUE,
        separation: weaker === null ? null : separation(weaker, label, position, sigma),
        observed: used.some((band) => band.label === label),
      },
    ];
  });
  if (candidates.length === 0)
    throw fault(
      solution,
      "no-candidates",
      `no band up to ${labels.at(-1)} lies in ${options.windows.map(({ text }) => text).join(" or ")}`,
      "widen --window or raise --up-to",
      2,
    );
  const worth = ({ gain, separation: apart }: PlannedBand) => apart ?? gain;
  return { name: series.name, aim: aim.text, now, candidates: candidates.sort((a, b) => worth(b) - worth(a)) };
}

function labelsUpTo(model: Model, upTo: number, hot: number): string[] {
  const labels = model.labels(upTo);
  for (let lower = 1; lower <= hot; lower++)
    for (let upper = lower + 1; upper <= upTo; upper++) labels.push(`${upper}-${lower}`);
  return labels;
}

/** One constant more than the fit has; the same number against one fewer where there is none. */
function largerModel(solution: Solution): Solution {
  const { model, series, options, fit } = solution;
  const terms = fit.values.length;
  const none = (what: string, mend: string) => fault(solution, "no-two-models", what, mend, 2);
  if (model.terms === null)
    throw none(`the model ${model.name} has one number of constants only`, "choose another --aim");
  if (terms >= model.terms.most) throw none(`there is no model with more than ${terms} terms`, "ask for fewer --terms");
  const larger = trySolve(series, model, { ...options, terms: terms + 1 });
  if (larger === null || larger.by.covariance === null)
    throw fault(
      solution,
      "larger-model-undetermined",
      `${solution.used.length} bands do not determine ${terms + 1} terms with an uncertainty, so nothing is known of how the two models differ`,
      "give a band more, or state σ; then the models can be planned for",
      3,
    );
  return larger;
}

/** By how many standard uncertainties the smaller model misses the band where the larger one puts it. */
function separation({ model, options, fit, by }: Solution, label: string, position: number, sigma: number): number {
  const { calculated, jacobian } = model.prepare([{ label, isotopologue: null }], options).evaluate(fit.values);
  const variance = by.covariance === null ? 0 : varianceOf(by.covariance, jacobian[0]!);
  return Math.abs(position - calculated[0]!) / Math.sqrt(sigma ** 2 + variance);
}

interface AimNow {
  readonly text: string;
  readonly quantity: Quantity;
  readonly gradient: readonly number[];
}

function aimOf(solution: Solution, aim: Aim): AimNow {
  const { model, fit, by, options } = solution;
  const p = fit.values;
  const known = fit.keys.filter((key) => options.fixed[key]?.sigma !== null).join(", ");
  const { parameters } = model.prepare([], options);
  if (aim.kind === "constant" || aim.kind === "model") {
    const key = aim.kind === "model" ? fit.keys.at(-1)! : aim.key;
    const at = fit.keys.indexOf(key);
    if (at < 0 || options.fixed[key]?.sigma === null)
      throw fault(
        solution,
        "aim",
        `this fit has no constant "${key}" to be improved`,
        `aim at ${known}, d0, prediction:7-0 or model; or fit more --terms`,
        2,
      );
    const gradient = p.map((_, k) => Number(k === at));
    return {
      text: aim.kind === "model" ? "model" : key,
      quantity: propagate(p[at]!, gradient, parameters[at]!.unit, by),
      gradient,
    };
  }
  if (aim.kind === "d0") {
    const well = model.well?.(p);
    const de = well === undefined ? null : morseDe(well, p);
    if (well === undefined || de === null)
      throw fault(
        solution,
        "aim",
        "no dissociation energy follows from this fit",
        `aim at ${known} or prediction:7-0`,
        2,
      );
    const gradient = addScaled(de.gradient, well.termGradient(0), -1);
    return { text: "d0", quantity: propagate(de.value - well.term(0), gradient, "cm-1", by), gradient };
  }
  const { calculated, jacobian } = model.prepare([{ label: aim.label, isotopologue: null }], options).evaluate(p);
  return {
    text: `prediction:${aim.label}`,
    quantity: propagate(calculated[0]!, jacobian[0]!, "cm-1", by),
    gradient: jacobian[0]!,
  };
}

/** σ of the new band at its place in cm-1. */
function sigmaOf(
  { used, sigmaKnown, fit, options }: Solution,
  given: PlanOptions["sigmaNew"],
  position: number,
): number {
  if (given !== null) return given.value * Math.abs(wavenumberPerUnit(position, given.unit, "vacuum", options.air));
  const stated = used.flatMap(({ sigma }) => sigma ?? []).sort((a, b) => a - b);
  if (sigmaKnown) return stated[Math.floor(stated.length / 2)]!;
  return Math.sqrt(fit.chiSquare / fit.degreesOfFreedom);
}

interface NewBand {
  readonly label: string;
  readonly position: number;
  readonly sigma: number;
  readonly row: readonly number[];
}

function uncertaintyWith(solution: Solution, band: NewBand, gradient: readonly number[]): number {
  const { fit, by, errors, treatment, sigmaKnown } = solution;
  const c = by.covariance!;
  const own = series(solution).map((shared) => effectOn(shared, solution, band));
  const correlated = sigmaKnown && own.some((x) => x !== 0);
  // Without stated σ the residuals say what a band is worth, and a new one will be no better than that.
  const untied = sigmaKnown
    ? (band.sigma * treatment.factor) ** 2 + treatment.scatter ** 2
    : Math.max(band.sigma ** 2, fit.chiSquare / fit.degreesOfFreedom);
  let variance = untied + (sigmaKnown ? own.reduce((sum, x) => sum + x * x, 0) : 0);
  let row = band.row;
  if (correlated) {
    const tie = fit.residuals.map((_, i) => errors.shared.reduce((sum, parts, k) => sum + parts[i]! * own[k]!, 0));
    const weighted = timesInverse(fit.whitening, tie);
    row = band.row.map((x, k) => x - fit.jacobian.reduce((sum, other, i) => sum + weighted[i]! * other[k]!, 0));
    variance -= tie.reduce((sum, x, i) => sum + x * weighted[i]!, 0);
  }
  const pulled = c.map((line) => dot(line, row));
  const share = dot(gradient, pulled);
  return Math.sqrt(Math.max(0, varianceOf(c, gradient) - share ** 2 / (variance + dot(row, pulled))));
}

const series = ({ series: { shared } }: Solution) => shared;

/** What one standard uncertainty of a cause that all bands share does to the new band; a group is one of its own, of which nothing is known. */
function effectOn(
  { kind, sigma, parts }: Shared,
  { options, model, series: { shared } }: Solution,
  { label, position }: NewBand,
): number {
  const { upper, lower } = model.levels(label);
  if (kind === "per-quantum") return sigma.value * (upper - lower);
  if (kind === "laser") return parts[0] ?? 0;
  if (kind !== "calibration") return 0;
  const unit = sigma.unit as UnitName;
  if (isWavelength(unit) && shared.some((other) => other.kind === "laser")) return 0;
  return sigma.value * wavenumberPerUnit(position, unit, "vacuum", options.air);
}

function fault(
  { series: { name, bands } }: Solution,
  code: string,
  what: string,
  mend: string,
  exit: 2 | 3,
): InputError {
  return new InputError(
    [{ code, place: { source: bands[0]?.place.source ?? name }, what: `series "${name}": ${what}`, mend }],
    exit,
  );
}
