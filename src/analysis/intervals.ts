import {
  covarianceOf,
  type Distribution,
  dot,
  drawConstants,
  type ProfileRequest,
  profileInterval,
  type Scalar,
  summarise,
  symmetricInterval,
} from "../fitting/index.ts";
import type { Warning } from "../messages/index.ts";
import type { Well } from "../models/index.ts";
import { coverageFactor, type Quantity } from "../quantity/index.ts";
import { morseDe } from "./dissociation/morse.ts";
import { coordinate, innerMorse, morseScalar, positionScalar } from "./interval-scalars.ts";
import type { IntervalRecord, SeriesResult } from "./result.ts";
import { outsideWith, type Solution } from "./solution.ts";

/** A number of the result that gets an interval of its own: where it stands, and what it is as a function of the constants. */
interface Target {
  readonly key: string;
  readonly scalar: Scalar;
}

/** Bins of the histogram of a distribution. */
const BINS = 40;

/** Replace the linear intervals of constants, De, D0 and predictions by those asked for; the estimates stay. */
export function refineIntervals(solution: Solution, result: SeriesResult): SeriesResult {
  const { options, fit, model } = solution;
  if (options.intervals === "linear") return result;
  if (fit.covariance === null) return result;
  const refine = options.intervals === "profile" ? byProfile(solution) : byResampling(solution);
  const warnings: Warning[] = [];
  const record: {
    profiles: IntervalRecord["profiles"][number][];
    distributions: IntervalRecord["distributions"][number][];
  } = {
    profiles: [],
    distributions: [],
  };
  const apply = (target: Target, quantity: Quantity, keep: boolean): Quantity => {
    const refined = refine(target, quantity, keep ? record : null);
    if (refined.interval95 === null)
      warnings.push({
        code: "interval-open",
        message: `the bands do not bound ${target.key} on both sides at 95 %: no interval is given; add bands nearer the limit or a constant known from elsewhere`,
        about: target.key,
      });
    return refined;
  };
  const well = (p: readonly number[]) => model.well!(p);
  const manifold = model.manifold?.(options) ?? null;
  const even = model.prepare([], options).parameters.flatMap((one) => (one.even === true ? [one.key] : []));
  const constants = Object.fromEntries(
    Object.entries(result.constants).map(([key, quantity]) => {
      const at = fit.keys.indexOf(key);
      if (quantity.standardUncertainty === null) return [key, quantity];
      const refined = apply({ key, scalar: coordinate(at, fit.keys.length) }, quantity, true);
      return [key, even.includes(key) && options.intervals === "profile" ? fromZero(refined) : refined];
    }),
  );
  const dissociation = result.dissociation.map((row, i) => {
    // There the limit is one of the constants.
    if (row.method === "near-limit") return row.d0 === null ? row : { ...row, d0: constants[limitKey(solution)]! };
    if (row.method !== "morse" || row.d0 === null || row.de === null) return row;
    if (manifold !== null)
      return {
        ...row,
        de: apply({ key: "De", scalar: innerMorse(manifold, i, false) }, row.de, false),
        d0: apply({ key: "D0", scalar: innerMorse(manifold, i, true) }, row.d0, true),
      };
    const de = apply({ key: "De", scalar: morseScalar(well, false) }, row.de, false);
    return {
      ...row,
      de: shifted(de, row.de, solution, well),
      d0: apply({ key: "D0", scalar: morseScalar(well, true) }, row.d0, true),
    };
  });
  const predictions = result.predictions.map((line) => ({
    ...line,
    position: apply({ key: line.label, scalar: positionScalar(solution, line.label) }, line.position, false),
  }));
  return {
    ...result,
    constants,
    dissociation,
    predictions,
    intervals: {
      kind: options.intervals,
      resamples: options.intervals === "resample" ? options.resamples : null,
      seed: options.intervals === "resample" ? options.seed : null,
      ...record,
    },
    warnings: [...result.warnings, ...warnings],
  };
}

/** Of a constant without a sign: χ² is the same on both sides of 0, so the interval ends there. */
function fromZero(quantity: Quantity): Quantity {
  const cut = (bounds: readonly [number, number] | null): readonly [number, number] | null =>
    bounds === null ? null : [Math.max(0, bounds[0]), bounds[1]];
  const { interval } = quantity;
  return {
    ...quantity,
    interval95: cut(quantity.interval95),
    ...(interval === undefined ? {} : { interval: { ...interval, bounds: cut(interval.bounds) } }),
  };
}

const limitKey = ({ model, fit }: Solution) => fit.keys[model.limit!.energy]!;

/** Y00 is added to De as a constant; the interval found without it moves along. */
function shifted(
  refined: Quantity,
  linear: Quantity,
  { fit }: Solution,
  well: (p: readonly number[]) => Well,
): Quantity {
  const shift = linear.value - morseDe(well(fit.values), fit.values)!.value;
  const move = (bounds: readonly [number, number] | null): readonly [number, number] | null =>
    bounds === null ? null : [bounds[0] + shift, bounds[1] + shift];
  const { interval } = refined;
  return {
    ...refined,
    interval95: move(refined.interval95),
    ...(interval === undefined ? {} : { interval: { ...interval, bounds: move(interval.bounds) } }),
  };
}

type Refine = (
  target: Target,
  quantity: Quantity,
  record: {
    profiles: IntervalRecord["profiles"][number][];
    distributions: IntervalRecord["distributions"][number][];
  } | null,
) => Quantity;

function byProfile(solution: Solution): Refine {
  const { by } = solution;
  const request = profileRequest(solution);
  return ({ key, scalar }, quantity, record) => {
    const bounds = (level: number): readonly [number, number] | null => {
      const { low, high, curve } = profileInterval(
        request,
        scalar,
        coverageFactor(level, by.degreesOfFreedom),
        record !== null && level === 0.95,
      );
      if (record !== null && level === 0.95)
        record.profiles.push({ key, points: curve.map(({ value, rise }) => [value, rise] as const) });
      return low === null || high === null ? null : [low, high];
    };
    return withBounds(quantity, bounds);
  };
}

/** The treated problem as the nonlinear core wants it, priors as further data; variances absolute, so that χ² rises in units of one. */
function profileRequest({ used, model, options, errors, treatment, fit, sigmaKnown }: Solution): ProfileRequest {
  const n = used.length;
  const prepared = model.prepare(used, options);
  const { parameters, evaluate } = prepared;
  const observed = used.map((band) => band.position);
  const others = outsideWith(prepared, observed, errors, options, treatment).outside ?? { rows: [], right: [] };
  const priors = parameters.flatMap((p, k) => (p.prior === undefined ? [] : [{ k, ...p.prior }]));
  const size = n + priors.length + others.rows.length;
  const v = covarianceOf(errors, treatment, n);
  const variance = sigmaKnown ? 1 : fit.chiSquare / fit.degreesOfFreedom;
  const covariance = Array.from({ length: size }, (_, i) =>
    Array.from({ length: size }, (_, j) => {
      if (i < n && j < n) return v[i * n + j]! * variance;
      return i === j ? (priors[i - n]?.sigma ?? 1) ** 2 : 0;
    }),
  );
  const unit = (at: number) => parameters.map((_, k) => Number(k === at));
  return {
    y: [...observed, ...priors.map(({ value }) => value), ...others.right],
    covariance,
    model: (p) => [
      ...evaluate(p).calculated,
      ...priors.map(({ k }) => p[k]!),
      ...others.rows.map((row) => dot(row, p)),
    ],
    jacobian: (p) => [...evaluate(p).jacobian, ...priors.map(({ k }) => unit(k)), ...others.rows],
    best: fit.values,
    deviations: fit.covariance!.map((row, k) => Math.sqrt(row[k]!)),
    chiSquare: fit.chiSquare / variance,
    variance: 1,
  };
}

function byResampling({ fit, by, options }: Solution): Refine {
  const draws = drawConstants(fit.values, fit.covariance!, by.degreesOfFreedom, options.resamples, options.seed);
  const size = fit.values.length;
  return ({ key, scalar }, quantity, record) => {
    const p = new Array<number>(size);
    const trials = new Float64Array(options.resamples);
    for (let t = 0; t < trials.length; t++) {
      for (let k = 0; k < size; k++) p[k] = draws[t * size + k]!;
      trials[t] = scalar.value(p);
    }
    const distribution = summarise(trials);
    record?.distributions.push({ key, ...histogram(distribution), missing: distribution.missing });
    return withBounds({ ...quantity, standardUncertainty: distribution.standardUncertainty }, (level) =>
      symmetricInterval(distribution, level),
    );
  };
}

function withBounds(quantity: Quantity, bounds: (level: number) => readonly [number, number] | null): Quantity {
  const { interval } = quantity;
  return {
    ...quantity,
    interval95: bounds(0.95),
    ...(interval === undefined ? {} : { interval: { ...interval, bounds: bounds(interval.coverage) } }),
  };
}

/** Counts between the 0.5 % and 99.5 % points. */
function histogram({ sorted }: Distribution): { edges: number[]; counts: number[] } {
  const low = sorted[Math.floor(0.005 * sorted.length)]!;
  const high = sorted[Math.ceil(0.995 * sorted.length) - 1]!;
  const width = (high - low) / BINS;
  const edges = Array.from({ length: BINS + 1 }, (_, i) => low + i * width);
  const counts = new Array<number>(BINS).fill(0);
  for (const x of sorted) if (x >= low && x <= high) counts[Math.min(BINS - 1, Math.floor((x - low) / width))]!++;
  return { edges, counts };
}
