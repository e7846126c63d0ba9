import { fitNonlinear, type NonlinearRequest } from "./nonlinear/fit-nonlinear.ts";

/** A number that depends on the constants, with its derivatives. NaN where it does not exist. */
export interface Scalar {
  readonly value: (p: readonly number[]) => number;
  readonly gradient: (p: readonly number[]) => readonly number[];
}

/** A profile: the interval and the points it was found through. */
export interface Profile {
  /** null where χ² never rises to the level on that side */
  readonly low: number | null;
  readonly high: number | null;
  /** value of the scalar and (χ² - χ²min)/variance there, rising in value */
  readonly curve: readonly { readonly value: number; readonly rise: number }[];
}

/** The fit a profile is taken about. `best` and `deviations`: constants and their standard deviations. */
export interface ProfileRequest extends Omit<NonlinearRequest, "start"> {
  readonly best: readonly number[];
  readonly deviations: readonly number[];
  readonly chiSquare: number;
  /** 1 with known σ, else the residual variance */
  readonly variance: number;
}

/** Where a curve that is drawn gets further points, as shares of the way to the bound. */
const DRAWN_AT = [0.8, 0.6, 0.4, 0.2, 1.2, 1.4];

/** Share of a standard deviation to which a bound is found. */
const TOLERANCE = 1e-7;

/**
 * Profile-likelihood interval of a scalar (Bates & Watts 1988, 6.1): the constants are reparametrised so that the scalar is one of them, it
 * is held at trial values, the rest is fitted anew by the nonlinear core, and the bounds lie where χ² has risen by `factor`² times the variance.
 * `drawn`: with further points between, for a picture.
 */
export function profileInterval(fit: ProfileRequest, scalar: Scalar, factor: number, drawn = false): Profile {
  const centre = scalar.value(fit.best);
  const gradient = scalar.gradient(fit.best);
  const u = Math.sqrt(linearVariance(fit, gradient));
  const curve = [{ value: centre, rise: 0 }];
  if (!(u > 0) || !Number.isFinite(centre)) return { low: null, high: null, curve };
  const rise = constrainedRise(fit, scalar);
  const side = (sign: 1 | -1) => {
    // √rise is nearly straight in the scalar, so the secant settles in a few fits.
    const root = (distance: number) => {
      const value = centre + sign * distance;
      const r = rise(value);
      if (Number.isFinite(r)) curve.push({ value, rise: r });
      return Math.sqrt(Math.max(0, r)) - factor;
    };
    return findBound(root, factor * u, u);
  };
  const low = side(-1);
  const high = side(1);
  if (drawn)
    for (const share of DRAWN_AT)
      for (const reach of [low === null ? null : -low, high])
        if (reach !== null) {
          const value = centre + share * reach;
          const r = rise(value);
          if (Number.isFinite(r)) curve.push({ value, rise: r });
        }
  curve.sort((a, b) => a.value - b.value);
  return { low: low === null ? null : centre - low, high: high === null ? null : centre + high, curve };
}

/** Variance to first order with the correlations taken from a fit without the scalar held: here only its size matters. */
function linearVariance({ deviations }: ProfileRequest, gradient: readonly number[]): number {
  return gradient.reduce((sum, g, k) => sum + (g * deviations[k]!) ** 2, 0);
}

/** (χ² - χ²min)/variance as a function of the value the scalar is held at; NaN where it cannot be reached. */
function constrainedRise(fit: ProfileRequest, scalar: Scalar): (value: number) => number {
  const gradient = scalar.gradient(fit.best);
  const free = fit.best.flatMap((_, k) => (fit.deviations[k]! > 0 ? [k] : []));
  const weight = (k: number) => Math.abs(gradient[k]! * fit.deviations[k]!);
  const pivot = free.reduce((best, k) => (weight(k) > weight(best) ? k : best), free[0]!);
  const rest = free.filter((k) => k !== pivot);
  let warm = rest.map((k) => fit.best[k]!);
  let warmPivot = fit.best[pivot]!;

  return (value) => {
    const whole = (theta: readonly number[]) => {
      const p = [...fit.best];
      rest.forEach((k, j) => {
        p[k] = theta[j]!;
      });
      p[pivot] = warmPivot;
      p[pivot] = solvePivot(scalar, p, pivot, value);
      return p;
    };
    if (rest.length === 0) return (chiSquareAt(fit, whole([])) - fit.chiSquare) / fit.variance;
    const result = fitNonlinear({
      ...fit,
      start: warm,
      typical: rest.map((k) => Math.max(Math.abs(fit.best[k]!), fit.deviations[k]!)),
      held: rest.map(() => false),
      model: (theta) => fit.model(whole(theta)),
      jacobian: (theta) => {
        const p = whole(theta);
        const g = scalar.gradient(p);
        return fit.jacobian(p).map((row) => rest.map((k) => row[k]! - (row[pivot]! * g[k]!) / g[pivot]!));
      },
    });
    if (!result.converged) return Number.NaN;
    warm = result.values;
    warmPivot = whole(warm)[pivot]!;
    return (result.chiSquare - fit.chiSquare) / fit.variance;
  };
}

function chiSquareAt(fit: ProfileRequest, p: number[]): number {
  if (!p.every(Number.isFinite)) return Number.NaN;
  return fitNonlinear({ ...fit, start: p, held: p.map(() => true) }).chiSquare;
}

/** The value of one constant at which the scalar is `value`, by Newton's method; NaN when it is not reached. */
function solvePivot(scalar: Scalar, p: readonly number[], pivot: number, value: number): number {
  const q = [...p];
  for (let round = 0; round < 60; round++) {
    const miss = scalar.value(q) - value;
    const slope = scalar.gradient(q)[pivot]!;
    if (!Number.isFinite(miss) || !Number.isFinite(slope) || slope === 0) return Number.NaN;
    const step = miss / slope;
    q[pivot]! -= step;
    if (Math.abs(step) <= 4 * Number.EPSILON * Math.abs(q[pivot]!)) return q[pivot]!;
  }
  return Number.NaN;
}

/** Zero of a rising function from a first guess; null when it stays negative as far as a thousand first guesses. */
function findBound(root: (distance: number) => number, guess: number, unit: number): number | null {
  let [low, high] = [0, guess];
  let atHigh = root(high);
  let atLow = Number.NaN;
  for (let grow = 0; !(atHigh >= 0); grow++) {
    if (grow > 12) return null;
    if (Number.isNaN(atHigh)) {
      // Beyond what the scalar can be: come back half way.
      high = (low + high) / 2;
      if (high - low < TOLERANCE * unit) return null;
    } else {
      [low, atLow] = [high, atHigh];
      high *= 2;
    }
    atHigh = root(high);
  }
  if (Number.isNaN(atLow)) atLow = low === 0 ? -1e300 : root(low);
  for (let round = 0; round < 60 && high - low > TOLERANCE * unit; round++) {
    const finite = atLow > -1e299;
    let middle = finite
      ? low - (atLow * (high - low)) / (atHigh - atLow)
      : high / (1 + atHigh / Math.max(1e-12, guess / unit));
    // Keep a secant step inside, and halve when it creeps.
    if (!(middle > low && middle < high) || round % 3 === 2) middle = (low + high) / 2;
    const at = root(middle);
    if (Math.abs(at) < TOLERANCE) return middle;
    if (at >= 0 || Number.isNaN(at)) [high, atHigh] = [middle, Number.isNaN(at) ? atHigh : at];
    else [low, atLow] = [middle, at];
  }
  return (low + high) / 2;
}
