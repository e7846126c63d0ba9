import type { Band, Series } from "../../bands/index.ts";
import {
  type ErrorModel,
  type Outside,
  type Prepared,
  type Problem,
  type Treatment,
  whiten,
  whitening,
  withoutColumns,
} from "../../fitting/index.ts";
import type { Model } from "../../models/index.ts";
import { errorModel } from "../error-model.ts";
import { withMixture } from "../mixture.ts";
import type { AnalysisOptions, OwnBands, SharedConstant } from "../options.ts";

/** One series of a joint fit. */
export interface Part {
  readonly used: readonly Band[];
  readonly prepared: Prepared;
  readonly errors: ErrorModel;
  readonly jacobian: readonly (readonly number[])[];
  /** what each shared error is: the same word in two series is the same error */
  readonly causes: readonly string[];
}

/** Where the constants of all series stand in one list: those of each series in turn, then one place for each shared constant (or the mean of a tied one). */
export interface Layout {
  readonly size: number;
  readonly width: number;
  /** of constant k of series i */
  column(i: number, k: number): number;
  /** constants that are one number in all series, or tied to a mean within a spread: place among those of a series, place in the list, spread */
  readonly shared: readonly { readonly at: number; readonly column: number; readonly spread: number }[];
}

export function partOf(series: Series, place: number, model: Model, options: AnalysisOptions): Part {
  const measured = withMixture(series, model, options).series;
  const used = measured.bands.filter(({ use }) => use);
  const prepared = model.prepare(used, options);
  return {
    used,
    prepared,
    errors: errorModel(measured, used, model),
    jacobian: prepared.linear ? prepared.evaluate(prepared.parameters.map(() => 0)).jacobian : [],
    causes: measured.shared.map(({ kind, group }) =>
      kind === "mixture" ? `mixture ${place}` : group === null ? kind : `group ${group}`,
    ),
  };
}

export function layoutOf(keys: readonly string[], series: number, shared: readonly SharedConstant[]): Layout {
  const size = keys.length;
  const places = shared.map(({ key, spread }, m) => ({ at: keys.indexOf(key), column: series * size + m, spread }));
  return {
    size,
    width: series * size + shared.length,
    column: (i, k) => places.find(({ at, spread }) => at === k && spread === 0)?.column ?? i * size + k,
    shared: places,
  };
}

/** The fit of all bands at once. */
export function jointProblem(parts: readonly Part[], layout: Layout): Problem {
  const { size, width, column } = layout;
  const { parameters } = parts[0]!.prepared;
  const rows = parts.flatMap(({ jacobian }, i) => jacobian.map((row) => spread(row, i, layout)));
  const ties = tiesOf(parts.length, layout);
  return {
    parameters: Array.from({ length: width }, (_, j) => {
      const shared = layout.shared.find((one) => one.column === j);
      if (shared !== undefined) return parameters[shared.at]!;
      const [i, k] = [Math.floor(j / size), j % size];
      return column(i, k) === j ? parameters[k]! : { ...parameters[k]!, held: 0 };
    }),
    linear: true,
    evaluate: (p) => ({ calculated: rows.map((row) => row.reduce((sum, x, j) => sum + x * p[j]!, 0)), jacobian: rows }),
    observed: parts.flatMap(({ used }) => used.map(({ position }) => position)),
    errors: jointErrors(parts),
    ...(ties.length === 0 ? {} : { outside: { rows: ties, right: ties.map(() => 0) } }),
  };
}

/**
 * What the bands of the other series (and the ties) say of the constants of series `place`, given its own bands: with those first, the rows of L⁻¹ of the
 * joint covariance L·Lᵀ that follow are independent of them; constants of the other series are fitted away by Householder reflections. A fit of the
 * own bands with these statements is the joint fit, with its χ², its degrees of freedom, and its block of the covariance.
 */
export function outsideOf(
  parts: readonly Part[],
  layout: Layout,
  place: number,
  own: OwnBands,
  treatment: Treatment,
): Outside {
  const { size, width, column, shared } = layout;
  const others = parts.flatMap((part, i) => (i === place ? [] : [{ part, i }]));
  const { parameters } = parts[0]!.prepared;
  const ownWidth = own.jacobian[0]?.length ?? size;
  /** constants of the other series and means of tied ones; the held ones among them are subtracted */
  const foreign = Array.from({ length: width }, (_, j) => j).filter((j) => {
    const mean = shared.find((one) => one.column === j);
    if (mean !== undefined) return mean.spread > 0;
    const [i, k] = [Math.floor(j / size), j % size];
    return i !== place && column(i, k) === j;
  });
  const heldAt = (j: number) => (j < parts.length * size ? parameters[j % size]!.held : undefined);
  const free = foreign.filter((j) => heldAt(j) === undefined);
  const stride = free.length + ownWidth + 1;
  const line = (row: readonly number[], right: number): number[] => {
    const known = foreign.reduce((sum, j) => sum + row[j]! * (heldAt(j) ?? 0), 0);
    const ofOwn = Array.from({ length: ownWidth }, (_, k) => (k < size ? row[column(place, k)]! : 0));
    return [...free.map((j) => row[j]!), ...ofOwn, right - known];
  };
  const bands = [
    ...own.jacobian.map((row, b) => [...free.map(() => 0), ...row, own.observed[b]!]),
    ...others.flatMap(({ part, i }) =>
      part.jacobian.map((row, b) => line(spread(row, i, layout), part.used[b]!.position)),
    ),
  ];
  const white = Float64Array.from(bands.flat());
  const mine = { errors: own.errors, causes: parts[place]!.causes };
  const by = whitening(jointErrors([mine, ...others.map(({ part }) => part)]), treatment, bands.length);
  for (let j = 0; j < stride; j++) whiten(by, white, stride, j);
  const priors = free.flatMap((j) => {
    const prior = j < parts.length * size ? parameters[j % size]!.prior : undefined;
    return prior === undefined ? [] : [line(unit(width, j, 1 / prior.sigma), prior.value / prior.sigma)];
  });
  const ties = tiesOf(parts.length, layout).map((row) => line(row, 0));
  const rest = [...white.subarray(own.jacobian.length * stride), ...priors.flat(), ...ties.flat()];
  const left = withoutColumns(
    { rows: rest.length / stride, columns: stride - 1, augmented: Float64Array.from(rest) },
    free.length,
  );
  return { rows: left.map((row) => row.slice(0, -1)), right: left.map((row) => row.at(-1)!) };
}

/** Errors of several series in one list; those of one cause are one error. */
function jointErrors(parts: readonly Pick<Part, "errors" | "causes">[]): ErrorModel {
  const lengths = parts.map(({ errors }) => errors.sigmas!.length);
  const size = lengths.reduce((sum, n) => sum + n, 0);
  const effects = new Map<string, number[]>();
  let before = 0;
  parts.forEach(({ errors, causes }, i) => {
    causes.forEach((cause, c) => {
      const effect = effects.get(cause) ?? new Array<number>(size).fill(0);
      errors.shared[c]!.forEach((x, b) => {
        effect[before + b] = x;
      });
      effects.set(cause, effect);
    });
    before += lengths[i]!;
  });
  return { sigmas: parts.flatMap(({ errors }) => errors.sigmas!), mixing: null, shared: [...effects.values()] };
}

/** A row over the constants of one series as one over all. */
function spread(row: readonly number[], i: number, { width, column }: Layout): number[] {
  const all = new Array<number>(width).fill(0);
  row.forEach((x, k) => {
    all[column(i, k)]! += x;
  });
  return all;
}

/** Constant less mean = 0 within the spread, one row a series. */
function tiesOf(series: number, { size, width, shared }: Layout): number[][] {
  return shared
    .filter((one) => one.spread > 0)
    .flatMap(({ at, column, spread: within }) =>
      Array.from({ length: series }, (_, i) => {
        const row = unit(width, i * size + at, 1 / within);
        row[column] = -1 / within;
        return row;
      }),
    );
}

const unit = (width: number, at: number, value: number) =>
  Array.from({ length: width }, (_, j) => (j === at ? value : 0));
