import { lightOf, type Series } from "../../bands/index.ts";
import { dot } from "../../fitting/index.ts";
import type { Warning } from "../../messages/index.ts";
import type { Model } from "../../models/index.ts";
import { airRange, fromWavenumber, wavenumberPerUnit } from "../../quantity/index.ts";
import { solutionOf } from "../analyse.ts";
import { limitingRegion } from "../near-limit/limiting-region.ts";
import type { AnalysisOptions } from "../options.ts";
import { propagate, varianceOf } from "../propagation.ts";
import { type Solution, trySolve } from "../solution.ts";
import { aimOf } from "./aim.ts";
import { type Basis, basisOf, planFault } from "./basis.ts";
import type { NewBand } from "./new-datum.ts";
import { bandsInReach } from "./reach.ts";
import type { Plan, PlannedBand, PlanOptions } from "./types.ts";

/**
 * Which further band would most reduce the uncertainty of an aim. A new datum with row x and variance s², correlated with the others by the errors they
 * share, changes the covariance C of the constants to C - C·x·xᵀ·C/(s² + xᵀ·C·x), x and s² being those left after what the others tell of it (Aitken
 * 1936); for a model that is not linear in its constants that is the first-order change. Scatter τ, where one was added, is added to the new band too,
 * and a Birge factor multiplies its σ. To tell models of n and n + 1 constants apart, the last constant of the larger one is what must be known.
 * @throws InputError exit 2 for an aim the model cannot have or windows without any band, exit 3 when the bands determine no uncertainty
 */
export function planNext(series: Series, model: Model, given: AnalysisOptions, options: PlanOptions): Plan {
  const { solution, choice, warnings } = solutionOf(series, model, given);
  const about = [...series.warnings, ...warnings, ...(choice?.warnings ?? [])];
  const basis = basisOf(options.aim.kind === "model" ? largerModel(solution) : solution, about);
  if (model.limit !== undefined && limitingRegion(solution, model.limit).failures.length > 0) throw outsideLaw(basis);
  return planFrom(basis, options);
}

/** The same from constants with a covariance; nothing is known of the bands behind them, so new ones are independent of those. */
export function planKnown(
  known: Omit<Basis, "datum" | "usualSigma" | "leastSigma"> & { readonly refused: boolean },
  options: PlanOptions,
): Plan {
  if (known.refused) throw outsideLaw(known);
  if (options.aim.kind === "model")
    throw planFault(
      known,
      "no-two-models",
      "constants alone do not tell two models apart",
      "plan from the bands, or choose another --aim",
      2,
    );
  const datum = ({ row, sigma }: NewBand) => ({ row, variance: sigma ** 2 });
  return planFrom({ ...known, usualSigma: null, leastSigma: 0, datum }, options);
}

function planFrom(basis: Basis, options: PlanOptions): Plan {
  const { model, values, by } = basis;
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
  const { labels, warnings } = bandsInReach(basis, options);
  const { calculated, jacobian } = model
    .prepare(
      labels.map((label) => ({ label, isotopologue: null })),
      basis.options,
    )
    .evaluate(values);
  const now = varianceOf(covariance, aim.gradient);
  const candidates = labels.flatMap((label, i): PlannedBand[] => {
    const place = placeOf(calculated[i]!, basis, options);
    if (place === null) return [];
    const { position, sigmaNew } = place;
    const { row, variance } = basis.datum({ label, position, sigma: sigmaNew, row: jacobian[i]! });
    const pulled = covariance.map((line) => dot(line, row));
    const drop = dot(aim.gradient, pulled) ** 2 / (variance + dot(row, pulled));
    const after = Math.max(0, now - drop);
    return [
      {
        label,
        position: propagate(position, jacobian[i]!, "cm-1", by),
        vacuumWavelength: place.vacuumWavelength,
        airWavelength: place.airWavelength,
        lastBandOut: basis.lastBandOut,
        sigmaNew,
        uncertaintyAfter: Math.sqrt(after),
        gain: after > 0 ? Math.sqrt(now / after) : Number.MAX_VALUE,
        // χ² of the smaller model rises by (c/u after)² - (c/u now)², c the last constant of the larger: the square of the difference of the
        // predictions over its uncertainty.
        separation:
          options.aim.kind === "model"
            ? (Math.abs(aim.quantity.value) * Math.sqrt(drop / now)) / Math.sqrt(after)
            : null,
        observed: basis.used.some((band) => band.label === label),
      },
    ];
  });
  if (candidates.length === 0) throw nothingToSee(basis, labels, options);
  return {
    name: basis.name,
    aim: aim.text,
    now: aim.quantity,
    candidates: ranked(candidates),
    scattered: basis.light.exciting !== null,
    warnings: [...basis.warnings, ...warnings, ...aboutSigma(basis, candidates, options)],
  };
}

/** The best first; alike to rounding, the lower one first. */
function ranked(candidates: readonly PlannedBand[]): PlannedBand[] {
  const worth = ({ gain, separation }: PlannedBand) => Number((separation ?? gain).toPrecision(9));
  return [...candidates].sort((a, b) => worth(b) - worth(a));
}

/** Where a band is looked for and how well it is measured there; null outside the windows. */
function placeOf(position: number, basis: Basis, { windows, sigmaNew: given }: PlanOptions) {
  const { light } = basis;
  const wavenumber = lightOf(position, light);
  if (!(position > 0 && wavenumber > 0)) return null;
  const seen = windows.some(({ low, high, ofLight }) => {
    const x = ofLight ? wavenumber : position;
    return x >= low && x <= high;
  });
  if (windows.length > 0 && !seen) return null;
  const vacuumWavelength = fromWavenumber(wavenumber, "nm");
  return {
    position,
    vacuumWavelength,
    airWavelength: airRange(vacuumWavelength) === "refused" ? null : fromWavenumber(wavenumber, "nm", "air", light.air),
    sigmaNew: Math.max(basis.leastSigma, statedSigma(basis, given, wavenumber)),
  };
}

/** σ of a new band in cm-1 at a wavenumber of its light. */
function statedSigma(basis: Basis, given: PlanOptions["sigmaNew"], wavenumber: number): number {
  if (given !== null) return given.value * Math.abs(wavenumberPerUnit(wavenumber, given.unit));
  if (basis.usualSigma !== null) return basis.usualSigma;
  throw planFault(
    basis,
    "sigma-new-missing",
    "nothing says how well a new band would be measured",
    "state it with --sigma-new 0.02",
    2,
  );
}

/** That a σ better than the bands there are show cannot be counted with. */
function aboutSigma({ leastSigma }: Basis, candidates: readonly PlannedBand[], { sigmaNew }: PlanOptions): Warning[] {
  const better = sigmaNew !== null && candidates.some((band) => band.sigmaNew === leastSigma);
  if (!better) return [];
  return [
    {
      code: "sigma-new-not-reached",
      message: `a new band counts for no better than ${Number(leastSigma.toPrecision(2))} cm-1, the standard deviation of the fit, because the bands carry no σ; give --sigma`,
    },
  ];
}

/** One constant more than the fit has. */
function largerModel(solution: Solution): Solution {
  const { model, series, options, fit } = solution;
  const terms = fit.values.length;
  const refuse = (code: string, what: string, mend: string, exit: 2 | 3) =>
    planFault(basisOf(solution, []), code, what, mend, exit);
  if (model.terms === null)
    throw refuse(
      "no-two-models",
      `the model ${model.name} has one number of constants only`,
      "choose another --aim",
      2,
    );
  if (terms >= model.terms.most)
    throw refuse("no-two-models", `there is no model with more than ${terms} terms`, "ask for fewer --terms", 2);
  const larger = trySolve(series, model, { ...options, terms: terms + 1 });
  if (larger === null || larger.by.covariance === null)
    throw refuse(
      "larger-model-undetermined",
      `${solution.used.length} bands do not determine ${terms + 1} terms with an uncertainty, so nothing is known of how the two models differ`,
      "give a band more, or state σ; then the models can be planned for",
      3,
    );
  return larger;
}

function nothingToSee(basis: Basis, labels: readonly string[], { windows }: PlanOptions) {
  const none = (what: string, mend: string) => planFault(basis, "no-candidates", what, mend, 2);
  if (labels.length === 0) return none("there is no band within this reach", "raise --up-to");
  return windows.length === 0
    ? none(`no band up to ${labels.at(-1)} lies at a wavenumber that can be measured`, "give bands that rise with v")
    : none(
        `no band up to ${labels.at(-1)} lies in ${windows.map(({ text }) => text).join(" or ")}`,
        "widen --window or raise --up-to",
      );
}

function outsideLaw(basis: Pick<Basis, "place" | "name">) {
  return planFault(
    basis,
    "not-near-limit",
    "the levels do not reach the region where the law for the limit holds, so nothing beyond them can be planned by it",
    "see what fit says of them, give levels nearer the limit, or plan with --model oscillator",
    3,
  );
}
