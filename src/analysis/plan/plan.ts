import type { Series } from "../../bands/index.ts";
import { dot } from "../../fitting/index.ts";
import type { Model } from "../../models/index.ts";
import { airRange, fromWavenumber, type Quantity, type UnitName, wavenumberPerUnit } from "../../quantity/index.ts";
import { solutionOf } from "../analyse.ts";
import { morseDe } from "../dissociation/morse.ts";
import type { AnalysisOptions } from "../options.ts";
import { addScaled, propagate, varianceOf } from "../propagation.ts";
import { type Solution, trySolve } from "../solution.ts";
import { turningPoint } from "../turning-point.ts";
import { type Basis, basisOf, planFault } from "./basis.ts";
import type { NewBand } from "./new-datum.ts";

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

/** Levels beyond the last band that are looked at when nothing else is asked, and the highest one from constants alone. */
const BEYOND = 3;
const FROM_CONSTANTS = 6;

/**
 * Which further band would most reduce the uncertainty of an aim. A new datum with row x and variance s², correlated with the others by the errors they
 * share, changes the covariance C of the constants to C - C·x·xᵀ·C/(s² + xᵀ·C·x), x and s² being those left after what the others tell of it (Aitken
 * 1936); for a model that is not linear in its constants that is the first-order change. Scatter τ, where one was added, is added to the new band too.
 * @throws InputError exit 2 for an aim the model cannot have or windows without any band, exit 3 when the bands determine no uncertainty
 */
export function planNext(series: Series, model: Model, given: AnalysisOptions, options: PlanOptions): Plan {
  const { solution } = solutionOf(series, model, given);
  return options.aim.kind === "model"
    ? planFrom(basisOf(largerModel(solution)), basisOf(solution), options)
    : planFrom(basisOf(solution), null, options);
}

/** The same from constants with a covariance; nothing is known of the bands behind them, so new ones are independent of those. */
export function planKnown(known: Omit<Basis, "datum" | "usualSigma">, options: PlanOptions): Plan {
  if (options.aim.kind === "model")
    throw planFault(
      known,
      "no-two-models",
      "constants alone do not tell two models apart",
      "plan from the bands, or choose another --aim",
      2,
    );
  const datum = ({ row, sigma }: NewBand) => ({ row, variance: sigma ** 2 });
  return planFrom({ ...known, usualSigma: null, datum }, null, options);
}

/** `weaker`: the smaller of two models that are to be told apart. */
function planFrom(basis: Basis, weaker: Basis | null, options: PlanOptions): Plan {
  const { model, values, by, used } = basis;
  if (model.well === undefined && model.limit === undefined)
    throw planFault(
      basis,
      "no-plan",
      `the model ${model.name} lists no bands to choose from`,
      "plan with --model oscillator",
      2,
    );
  const { covariance } = by;
  if (covariance === null)
    throw planFault(
      basis,
      "no-uncertainty",
      "there is no uncertainty that a further band could reduce",
      "state σ with --sigma, give a band more, or write constants with theirs",
      3,
    );
  const aim = aimOf(basis, options.aim);
  const before = Math.sqrt(varianceOf(covariance, aim.gradient));
  const top = Math.max(0, ...used.map((label) => model.levels(label).upper));
  const limit = model.well === undefined ? null : turningPoint(model.well(values), 0);
  const wanted = options.upTo ?? (top > 0 ? top + BEYOND : FROM_CONSTANTS);
  const labels = labelsUpTo(model, Math.min(wanted, limit === null ? wanted : Math.ceil(limit) - 1), options.hot);
  const { calculated, jacobian } = model
    .prepare(
      labels.map((label) => ({ label, isotopologue: null })),
      basis.options,
    )
    .evaluate(values);
  const inWindow = (position: number) =>
    options.windows.length === 0 || options.windows.some(({ low, high }) => position >= low && position <= high);
  const candidates = labels.flatMap((label, i): PlannedBand[] => {
    const position = calculated[i]!;
    if (!(position > 0) || !inWindow(position)) return [];
    const sigma = sigmaOf(basis, options.sigmaNew, position);
    const { row, variance } = basis.datum({ label, position, sigma, row: jacobian[i]! });
    const pulled = covariance.map((line) => dot(line, row));
    const drop = dot(aim.gradient, pulled) ** 2 / (variance + dot(row, pulled));
    const after = Math.sqrt(Math.max(0, varianceOf(covariance, aim.gradient) - drop));
    const vacuumWavelength = fromWavenumber(position, "nm");
    return [
      {
        label,
        position: propagate(position, jacobian[i]!, "cm-1", by),
        vacuumWavelength,
        airWavelength:
          airRange(vacuumWavelength) === "refused" ? null : fromWavenumber(position, "nm", "air", basis.options.air),
        lastBandOut: basis.lastBandOut,
        sigmaNew: sigma,
        uncertaintyAfter: after,
        gain: after > 0 ? before / after : Number.MAX_VALUE,
        separation: weaker === null ? null : separation(weaker, label, position, sigma),
        observed: used.includes(label),
      },
    ];
  });
  if (candidates.length === 0)
    throw planFault(
      basis,
      "no-candidates",
      `no band up to ${labels.at(-1)} lies in ${options.windows.map(({ text }) => text).join(" or ")}`,
      "widen --window or raise --up-to",
      2,
    );
  const worth = ({ gain, separation: apart }: PlannedBand) => apart ?? gain;
  return {
    name: basis.name,
    aim: aim.text,
    now: aim.quantity,
    candidates: candidates.sort((a, b) => worth(b) - worth(a)),
  };
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
  const none = (what: string, mend: string) => planFault(basisOf(solution), "no-two-models", what, mend, 2);
  if (model.terms === null)
    throw none(`the model ${model.name} has one number of constants only`, "choose another --aim");
  if (terms >= model.terms.most) throw none(`there is no model with more than ${terms} terms`, "ask for fewer --terms");
  const larger = trySolve(series, model, { ...options, terms: terms + 1 });
  if (larger === null || larger.by.covariance === null)
    throw planFault(
      basisOf(solution),
      "larger-model-undetermined",
      `${solution.used.length} bands do not determine ${terms + 1} terms with an uncertainty, so nothing is known of how the two models differ`,
      "give a band more, or state σ; then the models can be planned for",
      3,
    );
  return larger;
}

/** By how many standard uncertainties the smaller model misses the band where the larger one puts it. */
function separation({ model, options, values, by }: Basis, label: string, position: number, sigma: number): number {
  const { calculated, jacobian } = model.prepare([{ label, isotopologue: null }], options).evaluate(values);
  const variance = by.covariance === null ? 0 : varianceOf(by.covariance, jacobian[0]!);
  return Math.abs(position - calculated[0]!) / Math.sqrt(sigma ** 2 + variance);
}

interface AimNow {
  readonly text: string;
  readonly quantity: Quantity;
  readonly gradient: readonly number[];
}

function aimOf(basis: Basis, aim: Aim): AimNow {
  const { model, keys, by, options, values: p } = basis;
  const known = keys.filter((key) => options.fixed[key]?.sigma !== null).join(", ");
  const { parameters } = model.prepare([], options);
  if (aim.kind === "constant" || aim.kind === "model") {
    const key = aim.kind === "model" ? keys.at(-1)! : aim.key;
    const at = keys.indexOf(key);
    if (at < 0 || options.fixed[key]?.sigma === null)
      throw planFault(
        basis,
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
      throw planFault(
        basis,
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
function sigmaOf(basis: Basis, given: PlanOptions["sigmaNew"], position: number): number {
  if (given !== null)
    return given.value * Math.abs(wavenumberPerUnit(position, given.unit, "vacuum", basis.options.air));
  if (basis.usualSigma !== null) return basis.usualSigma;
  throw planFault(
    basis,
    "sigma-new-missing",
    "nothing says how well a new band would be measured",
    "state it with --sigma-new 0.02",
    2,
  );
}
