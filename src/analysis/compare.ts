import type { Series } from "../bands/index.ts";
import { dot, timesInverse } from "../fitting/index.ts";
import type { Model } from "../models/index.ts";
import { interval, normalUpperTail, studentUpperTail } from "../quantity/index.ts";
import { solutionOf } from "./analyse.ts";
import { morseDe } from "./dissociation/morse.ts";
import type { Comparison, Difference } from "./document.ts";
import type { AnalysisOptions } from "./options.ts";
import { addScaled, varianceOf } from "./propagation.ts";
import type { Solution } from "./solution.ts";

/** Constants from elsewhere, uncertainties null where not stated. */
export interface GivenConstants {
  readonly keys: readonly string[];
  readonly values: readonly number[];
  readonly covariance: readonly (readonly number[])[] | null;
}

/** More series than this are not compared pair by pair. */
const MOST_SERIES = 12;

/** One side of a comparison. */
interface Side {
  readonly name: string;
  readonly keys: readonly string[];
  readonly values: readonly number[];
  readonly covariance: readonly (readonly number[])[] | null;
  readonly degreesOfFreedom: number | null;
  /** what one standard uncertainty of each error common to all series does to the constants, by cause */
  readonly common: ReadonlyMap<string, readonly number[]>;
}

/**
 * Differences of constants and of D0 between all pairs of series, and between each and constants given from elsewhere: second less first. Series are
 * independent but for errors common to them all (calibration, exciting line, per quantum, groups of one name), with p̂ = C·XᵀV⁻¹y: one standard uncertainty c of such a cause
 * moves the constants by g = C·XᵀV⁻¹c, so the covariance of two series is Σ g·gᵀ. The probability is two-sided, of so large a difference by chance.
 */
export function compareAll(
  series: readonly Series[],
  model: Model,
  optionsOf: (one: Series) => AnalysisOptions,
  given: GivenConstants | null,
): Comparison[] {
  if (model.well === undefined || series.length > MOST_SERIES || (series.length < 2 && given === null)) return [];
  const sides = series.map((one) => sideOf(solutionOf(one, model, optionsOf(one)).solution));
  const pairs: (readonly [Side, Side])[] = sides.flatMap((a, i) => sides.slice(i + 1).map((b) => [a, b] as const));
  if (given !== null) {
    const elsewhere: Side = { name: "given constants", ...given, degreesOfFreedom: null, common: new Map() };
    for (const side of sides) pairs.push([elsewhere, side]);
  }
  return pairs.map(([first, second]) => ({
    first: first.name,
    second: second.name,
    differences: [
      ...first.keys
        .filter((key) => second.keys.includes(key) && !first.common.has(`shared ${key}`))
        .map((key) => differenceOf(key, first, second, unitOf(key))),
      ...d0Difference(first, second, model),
    ],
    commonErrors: [...first.common.keys()].filter((cause) => second.common.has(cause)),
  }));
}

function sideOf({ series, fit, by, errors, sigmaKnown, options }: Solution): Side {
  const common = new Map<string, readonly number[]>();
  if (sigmaKnown && by.covariance !== null)
    series.shared.forEach(({ kind, group }, k) => {
      if (kind === "mixture") return;
      const weighted = timesInverse(fit.whitening, errors.shared[k]!);
      const onto = fit.values.map((_, p) => fit.jacobian.reduce((sum, row, i) => sum + weighted[i]! * row[p]!, 0));
      common.set(
        group === null ? kind : `group ${group}`,
        by.covariance!.map((row) => dot(row, onto)),
      );
    });
  // Given a constant that series share, their other constants are independent: p moves with it by C_ks/√C_ss.
  const { shared } = options;
  const at = shared == null || shared.spread > 0 ? -1 : fit.keys.indexOf(shared.key);
  if (at >= 0 && by.covariance !== null) {
    const u = Math.sqrt(by.covariance[at]![at]!);
    common.set(
      `shared ${shared!.key}`,
      by.covariance.map((row) => row[at]! / u),
    );
  }
  return {
    name: series.name,
    keys: fit.keys,
    values: fit.values,
    covariance: by.covariance,
    degreesOfFreedom: by.degreesOfFreedom,
    common,
  };
}

const unitOf = (key: string) => (side: Side) => side.keys.map((other) => Number(other === key));

function differenceOf(
  key: string,
  first: Side,
  second: Side,
  gradientOf: (side: Side) => readonly number[],
): Difference {
  const value = (side: Side) => dot(gradientOf(side), side.values);
  return difference(key, first, second, value(second) - value(first), gradientOf);
}

/** D0 of the Morse relation. */
function d0Difference(first: Side, second: Side, model: Model): Difference[] {
  const of = (side: Side) => {
    const well = model.well!(side.values);
    const de = morseDe(well, side.values);
    return de === null
      ? null
      : { value: de.value - well.term(0), gradient: addScaled(de.gradient, well.termGradient(0), -1) };
  };
  const [a, b] = [of(first), of(second)];
  if (a === null || b === null) return [];
  return [difference("d0", first, second, b.value - a.value, (side) => (side === first ? a : b).gradient)];
}

function difference(
  key: string,
  first: Side,
  second: Side,
  value: number,
  gradientOf: (side: Side) => readonly number[],
): Difference {
  const variances = [first, second].map((side) =>
    side.covariance === null ? null : varianceOf(side.covariance, gradientOf(side)),
  );
  const [a, b] = variances;
  if (a == null || b == null)
    return { key, difference: { value, standardUncertainty: null, interval95: null, unit: "cm-1" }, probability: null };
  let both = 0;
  for (const [cause, effect] of first.common) {
    const other = second.common.get(cause);
    if (other !== undefined) both += dot(gradientOf(first), effect) * dot(gradientOf(second), other);
  }
  const variance = Math.max(0, a + b - 2 * both);
  // Rounding of the same number: a shared constant differs by nothing.
  const u = variance < 1e-12 * (a + b) ? 0 : Math.sqrt(variance);
  const dof = effectiveDegrees(a, first.degreesOfFreedom, b, second.degreesOfFreedom);
  const t = Math.abs(value) / u;
  return {
    key,
    difference: { value, standardUncertainty: u, interval95: interval(value, u, 0.95, dof), unit: "cm-1" },
    probability: u === 0 ? null : 2 * (dof === null ? normalUpperTail(t) : studentUpperTail(t, dof)),
  };
}

/** Welch–Satterthwaite (JCGM 100:2008, G.4.1), rounded down; null: normal. */
function effectiveDegrees(a: number, first: number | null, b: number, second: number | null): number | null {
  const part = (variance: number, dof: number | null) => (dof === null ? 0 : variance ** 2 / dof);
  const parts = part(a, first) + part(b, second);
  return parts === 0 ? null : Math.max(1, Math.floor((a + b) ** 2 / parts));
}
