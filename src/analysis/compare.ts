import type { Series } from "../bands/index.ts";
import { dot, timesInverse } from "../fitting/index.ts";
import type { Warning } from "../messages/index.ts";
import type { Model } from "../models/index.ts";
import { interval, normalUpperTail, studentUpperTail } from "../quantity/index.ts";
import { solutionOf } from "./analyse.ts";
import { morseDe } from "./dissociation/morse.ts";
import type { Comparison, Difference } from "./document.ts";
import type { AnalysisOptions, Sharing } from "./options.ts";
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
  /** the joint fit it belongs to */
  readonly sharing: Sharing | null;
}

/**
 * Differences of constants and of D0 between all pairs of up to twelve series, and between each and constants given from elsewhere: second less first. Series
 * are independent but for errors common to them all (calibration, exciting line, per quantum, groups of one name), with p̂ = C·XᵀV⁻¹y: one standard uncertainty c
 * of such a cause moves the constants by g = C·XᵀV⁻¹c, so the covariance of two series is Σ g·gᵀ; where constants are shared it is that of the joint fit.
 * The probability is two-sided, of so large a difference by chance.
 */
export function compareAll(
  series: readonly Series[],
  model: Model,
  optionsOf: (one: Series) => AnalysisOptions,
  given: GivenConstants | null,
): { readonly comparisons: Comparison[]; readonly warnings: Warning[] } {
  const byPairs = series.length > 1 && series.length <= MOST_SERIES;
  if (model.well === undefined || (!byPairs && given === null)) return { comparisons: [], warnings: [] };
  const sides = series.map((one) => sideOf(solutionOf(one, model, optionsOf(one)).solution));
  const pairs: (readonly [Side, Side])[] = byPairs
    ? sides.flatMap((a, i) => sides.slice(i + 1).map((b) => [a, b] as const))
    : [];
  if (given !== null) {
    const elsewhere: Side = {
      name: "given constants",
      ...given,
      degreesOfFreedom: null,
      common: new Map(),
      sharing: null,
    };
    for (const side of sides) pairs.push([elsewhere, side]);
  }
  return { comparisons: pairs.map(([first, second]) => comparison(first, second, model)), warnings: aboutTerms(pairs) };
}

function comparison(first: Side, second: Side, model: Model): Comparison {
  const shared = (first.sharing === null || second.sharing === null ? [] : first.sharing.constants)
    .filter(({ spread }) => spread === 0)
    .map(({ key }) => key);
  return {
    first: first.name,
    second: second.name,
    differences: [
      ...first.keys
        .filter((key) => second.keys.includes(key) && !shared.includes(key))
        .map((key) => differenceOf(key, first, second, unitOf(key))),
      ...(shared.length === first.keys.length ? [] : d0Difference(first, second, model)),
    ],
    commonErrors: [
      ...[...first.common.keys()].filter((cause) => second.common.has(cause)),
      ...shared.map((key) => `shared ${key}`),
    ],
  };
}

/** ωe of two constants and ωe of three are not the same quantity: the terms left out are in them. */
function aboutTerms(pairs: readonly (readonly [Side, Side])[]): Warning[] {
  const unlike = pairs.filter(([a, b]) => a.keys.length !== b.keys.length);
  if (unlike.length === 0) return [];
  const [[a, b]] = unlike as [readonly [Side, Side]];
  const counts = ({ name, keys }: Side) => `${name} (${keys.length})`;
  const more = unlike.length > 1 ? ` and ${unlike.length - 1} more pair${unlike.length > 2 ? "s" : ""}` : "";
  return [
    {
      code: "terms-unlike",
      message: `${counts(a)} and ${counts(b)}${more} are compared with unlike numbers of constants: the terms that one leaves out shift its others, so the difference is not only that of the bonds; give the same --terms to all`,
    },
  ];
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
  return {
    name: series.name,
    keys: fit.keys,
    values: fit.values,
    covariance: by.covariance,
    degreesOfFreedom: by.degreesOfFreedom,
    common,
    sharing: options.sharing,
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
  if (first.sharing !== null && second.sharing !== null) {
    const between = first.sharing.covariance(first.sharing.place, second.sharing.place);
    both = dot(
      gradientOf(first),
      between.map((row) => dot(row, gradientOf(second))),
    );
  } else
    for (const [cause, effect] of first.common) {
      const other = second.common.get(cause);
      if (other !== undefined) both += dot(gradientOf(first), effect) * dot(gradientOf(second), other);
    }
  const variance = Math.max(0, a + b - 2 * both);
  // Rounding of the same number: a shared constant differs by nothing.
  const u = variance < 1e-12 * (a + b) ? 0 : Math.sqrt(variance);
  // One estimate of the scatter stands behind both sides of a joint fit.
  const dof =
    first.sharing !== null && second.sharing !== null
      ? first.degreesOfFreedom
      : effectiveDegrees(a, first.degreesOfFreedom, b, second.degreesOfFreedom);
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
