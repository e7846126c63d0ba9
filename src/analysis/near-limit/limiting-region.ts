import type { Band } from "../../bands/index.ts";
import { type LinearFit, type Prepared, UNTREATED, UndeterminedError } from "../../fitting/index.ts";
import type { Limit, ModelOptions } from "../../models/index.ts";
import { coverageFactor } from "../../quantity/index.ts";
import { fitCurved } from "../curved-fit.ts";
import { errorModel } from "../error-model.ts";
import { type Solution, trySolve } from "../solution.ts";
import { bandsFrom, levelsOf } from "./levels.ts";

/** A test that the levels failed, as a clause of a sentence. */
export interface Failure {
  readonly test: "reach" | "curvature" | "drift" | "coefficient";
  readonly what: string;
}

/** Whether levels reach the region where their law holds. */
export interface Verdict {
  readonly failures: readonly Failure[];
  /** false: too few levels for any test of the law itself */
  readonly tested: boolean;
  /** D without the `left` lowest levels less D with them, cm-1; null where that cannot be had or D is given */
  readonly drift: { readonly shift: number; readonly left: number } | null;
}

/** A departure from the law counts when it moves the limit by more than this share of what is extrapolated (top level to limit) … */
const SHARE = 0.1;
/** … and chance moves it as far in fewer than one of twenty. */
const LEVEL = 0.95;

/**
 * The law holds only close under the limit, and a fit to lower levels goes through them smoothly and misses. Refused when the extrapolation is longer
 * than the range of the levels, or when the limit moves because the line may bend, because the lowest levels are left out, or
 * because a given long-range coefficient is fitted instead.
 */
export function limitingRegion(solution: Solution, limit: Limit): Verdict {
  const place = measured(solution, limit);
  const curvature = place === null ? null : bending(solution, limit, place);
  const dropping = place === null ? null : drifting(solution, place);
  const coefficient = place === null ? null : freeing(solution, limit, place);
  const reach = reaching(solution, limit);
  return {
    failures: [reach, curvature?.failure, dropping?.failure, coefficient?.failure].filter((f) => f != null),
    tested: curvature !== null || dropping !== null || coefficient !== null,
    drift: dropping === null || place?.name !== "D" ? null : { shift: dropping.shift, left: dropping.left },
  };
}

/** Share of the levels kept from one trial to the next: many levels are searched in few trials, few are left out one by one. */
const KEEP = 7 / 8;

/** A low level from which up the levels pass every test; null when no set of the highest does. */
export function passesFrom(solution: Solution, limit: Limit): number | null {
  const { series, model, options, used } = solution;
  const levels = levelsOf(used, model);
  for (let count = Math.floor(KEEP * levels.length); count >= limit.leastLevels; count = Math.floor(KEEP * count)) {
    const lowest = levels.at(-count)!;
    const kept = new Set(bandsFrom(used, lowest, model));
    const bands = series.bands.map((band) => (kept.has(band) ? band : { ...band, use: false }));
    const part = trySolve({ ...series, bands }, model, options);
    if (part === null) return null;
    const { failures, tested } = limitingRegion(part, limit);
    if (tested && failures.length === 0) return lowest;
  }
  return null;
}

/** Where the limit shows: in D, or in v_D when D is given. */
interface Measured {
  readonly at: number;
  readonly name: "D" | "vD";
  readonly unit: string;
  /** from the top level to the limit */
  readonly extrapolated: number;
}

function measured(solution: Solution, { energy, level }: Limit): Measured | null {
  const { fit, model, options, used } = solution;
  const held = (at: number) => options.fixed[fit.keys[at]!]?.sigma === null;
  const top = levelsOf(used, model).at(-1)!;
  if (!held(energy))
    return { at: energy, name: "D", unit: " cm-1", extrapolated: fit.values[energy]! - energyOf(solution, top) };
  return held(level) ? null : { at: level, name: "vD", unit: "", extrapolated: fit.values[level]! - top };
}

/** E(v) above v = 0 by the law. */
export function energyOf({ model, options, fit }: Solution, v: number): number {
  return model.prepare([{ label: `${v}-0`, isotopologue: null }], options).evaluate(fit.values).calculated[0]!;
}

function reaching(solution: Solution, { energy }: Limit): Failure | null {
  const levels = levelsOf(solution.used, solution.model);
  const [low, top] = [levels[0]!, levels.at(-1)!].map((v) => energyOf(solution, v)) as [number, number];
  const beyond = solution.fit.values[energy]! - top;
  if (beyond <= top - low) return null;
  return {
    test: "reach",
    what: `the limit comes out ${number(beyond)} cm-1 above the highest level, farther than the levels themselves reach (${number(top - low)} cm-1)`,
  };
}

function bending(solution: Solution, limit: Limit, place: Measured): { failure: Failure | null } | null {
  const { model, options, used } = solution;
  const bent = refit(solution, limit.bent(used, options), [...solution.stated.values, 0]);
  if (bent === null) return null;
  const at = bent.values.length - 1;
  const significance = deviates(bent, bent.values[at]!, at);
  if (significance === null) return null;
  if (!significance || !far(solution, bent, place)) return { failure: null };
  return {
    failure: {
      test: "curvature",
      what: `${limit.line(options)} against v is not a straight line: ${model.constants[place.at]!.symbol.equilibrium} moves ${move(solution, bent, place)} when it may bend`,
    },
  };
}

function drifting(
  solution: Solution,
  place: Measured,
): { failure: Failure | null; shift: number; left: number } | null {
  const { model, options, used, sigmaKnown, stated } = solution;
  const levels = levelsOf(used, model);
  const free = stated.keys.filter((key) => options.fixed[key]?.sigma !== null).length;
  const keep = Math.max(free + (sigmaKnown ? 0 : 1), Math.ceil(levels.length / 2));
  if (keep >= levels.length) return null;
  const upper = bandsFrom(used, levels.at(-keep)!, model);
  const part = refit(solution, model.prepare(upper, options), starts(solution, upper, options), upper);
  if (part === null) return null;
  const shift = part.values[place.at]! - stated.values[place.at]!;
  const significance = deviates(part, shift, place.at);
  if (significance === null) return null;
  const left = levels.length - keep;
  const failure: Failure = {
    test: "drift",
    what: `without the ${left === 1 ? "lowest level" : `${left} lowest levels`} ${place.name} moves ${move(solution, part, place)}`,
  };
  return { failure: significance && far(solution, part, place) ? failure : null, shift, left };
}

function freeing(solution: Solution, { slope }: Limit, place: Measured): { failure: Failure | null } | null {
  const { model, options, used, stated } = solution;
  const key = stated.keys[slope]!;
  if (options.fixed[key]?.sigma !== null) return null;
  const { [key]: given, ...fixed } = options.fixed;
  const freed = refit(
    solution,
    model.prepare(used, { ...options, fixed }),
    starts(solution, used, { ...options, fixed }),
  );
  if (freed === null) return null;
  const significance = deviates(freed, freed.values[slope]! - given!.value, slope);
  if (significance !== true || !far(solution, freed, place)) return { failure: null };
  return {
    failure: {
      test: "coefficient",
      what: `the levels do not agree with the given ${model.constants.find((c) => c.key === key)!.symbol.equilibrium} of ${number(given!.value)}: left free it becomes ${number(freed.values[slope]!)}, and ${place.name} moves ${move(solution, freed, place)}`,
    },
  };
}

/** The model's own first values, so that a poor fit does not pass itself on. */
function starts({ model, stated }: Solution, bands: readonly Band[], options: ModelOptions): readonly number[] {
  const observed = bands.map((band) => band.position);
  return model.starts?.(bands, observed, options) ?? stated.values;
}

/** Another fit of used bands, σ as stated; null when it is not determined. */
function refit(
  solution: Solution,
  prepared: Prepared,
  start: readonly number[],
  bands = solution.used,
): LinearFit | null {
  const errors = errorModel(solution.series, bands, solution.model);
  const problem = { ...prepared, observed: bands.map((band) => band.position), errors };
  try {
    const { fit } = fitCurved(problem, UNTREATED, start);
    return fit.converged ? fit : null;
  } catch (error) {
    if (error instanceof UndeterminedError) return null;
    throw error;
  }
}

/** Whether a difference is more than chance, its uncertainty taken from the residuals where they exceed σ; null when nothing can tell. */
function deviates(other: LinearFit, by: number, at: number): boolean | null {
  const { covariance, chiSquare, degreesOfFreedom: dof, sigmaKnown, exact } = other;
  // Without scatter any difference is real.
  if (covariance === null) return exact && dof > 0 ? true : null;
  const excess = sigmaKnown && dof > 0 ? Math.max(1, chiSquare / dof) : 1;
  const u = Math.sqrt(covariance[at]![at]! * excess);
  if (!Number.isFinite(u)) return null;
  return Math.abs(by) > coverageFactor(LEVEL, sigmaKnown && excess === 1 ? null : dof) * u;
}

const far = ({ stated }: Solution, other: LinearFit, { at, extrapolated }: Measured) =>
  Math.abs(other.values[at]! - stated.values[at]!) > SHARE * extrapolated;

const move = ({ stated }: Solution, other: LinearFit, { at, unit }: Measured) =>
  `from ${number(stated.values[at]!)} to ${number(other.values[at]!)}${unit}`;

const number = (x: number) => String(Number(x.toPrecision(6)));
