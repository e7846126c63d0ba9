import { fitValues, type Parameter, type Prepared, UNTREATED } from "../../fitting/index.ts";
import { sizeOf } from "./blocks.ts";
import type { PolyadLevel } from "./label.ts";

/** Guesses for X-H chromophores and how far they may be off: vague, they only stand in where the levels leave a constant open. */
const GUESS: Readonly<Record<string, readonly [guess: number, width: number]>> = {
  ws: [3000, 300],
  wb: [1400, 150],
  xss: [-50, 50],
  xbb: [-5, 10],
  xsb: [-20, 30],
  gbb: [5, 10],
  ksbb: [60, 80],
};

/** Couplings tried, cm-1; those known of X-H stretches and bends lie between 20 and 150. */
const COUPLINGS = [0, 15, 30, 45, 60, 80, 100, 125, 150, 200, 250, 300];
/** Below this, cm-1, the levels are met best without a coupling. */
const NONE = 0.05;
const ROUNDS = 8;
/** cm-1² */
const SETTLED = 1e-6;

interface Trial {
  readonly p: readonly number[];
  readonly misfit: number;
}

/**
 * First constants. For a given coupling the others follow by a few rounds of linear least squares; the coupling is the one that meets the levels
 * best among some tried. A search from anywhere could end at zero coupling, where no level depends on it to first order. 0 for the coupling
 * says that the levels are met best without one.
 */
export function startsFrom(
  levels: readonly PolyadLevel[],
  observed: readonly number[],
  { parameters, evaluate }: Prepared,
): number[] {
  const at = parameters.findIndex(({ key }) => key === "ksbb");
  const softened = softenedParameters(levels, observed, parameters);
  const first = softened.map(({ held, prior }) => held ?? prior!.value);
  const given = parameters[at]!;
  if (given.held !== undefined || given.prior !== undefined) return [...fitAt(first, softened, observed, evaluate).p];
  const trial = (k: number, from: readonly number[]) => {
    const held = softened.map((parameter, i): Parameter => {
      if (i !== at) return parameter;
      const { prior: _, ...rest } = parameter;
      return { ...rest, held: k };
    });
    return fitAt(
      from.map((x, i) => (i === at ? k : x)),
      held,
      observed,
      evaluate,
    );
  };
  let best = trial(0, first);
  let nearest = 0;
  let from = best.p;
  COUPLINGS.forEach((k, i) => {
    if (k === 0) return;
    const next = trial(k, from);
    from = next.p;
    if (next.misfit < best.misfit) [best, nearest] = [next, i];
  });
  if (nearest > 1) return [...best.p];
  const low = between(0, COUPLINGS[2]!, (k) => trial(k, best.p));
  return low.p[at]! < NONE ? low.p.map((x, i) => (i === at ? 0 : x)) : [...low.p];
}

/** A vague observation of every constant that is neither held nor observed already. */
function softenedParameters(
  levels: readonly PolyadLevel[],
  observed: readonly number[],
  parameters: readonly Parameter[],
): Parameter[] {
  const mean = (values: readonly number[]) =>
    values.length === 0 ? null : values.reduce((sum, x) => sum + x, 0) / values.length;
  const highest = mean(levels.flatMap(({ n, j, l }, i) => (j === 1 && l < 2 ? [observed[i]! / n] : [])));
  const lowest = mean(levels.flatMap(({ n, j, l }, i) => (j === sizeOf(n, l) ? [observed[i]! / (2 * n)] : [])));
  const ratio = GUESS.ws![0] / GUESS.wb![0];
  const wb = lowest ?? (highest === null ? GUESS.wb![0] : highest / ratio);
  const guess: Readonly<Record<string, number>> = { ws: highest ?? wb * ratio, wb };
  return parameters.map((parameter): Parameter => {
    if (parameter.held !== undefined || parameter.prior !== undefined) return parameter;
    const [value, sigma] = GUESS[parameter.key]!;
    return { ...parameter, prior: { value: guess[parameter.key] ?? value, sigma } };
  });
}

/** Linear least squares about the last constants, until they stand still. */
function fitAt(
  start: readonly number[],
  parameters: readonly Parameter[],
  observed: readonly number[],
  evaluate: Prepared["evaluate"],
): Trial {
  let best: Trial = { p: start, misfit: misfitOf(start, parameters, observed, evaluate(start).calculated) };
  let p = start;
  for (let round = 0; round < ROUNDS; round++) {
    const { calculated, jacobian } = evaluate(p);
    const base = p;
    const line = (row: readonly number[], q: readonly number[]) => row.reduce((sum, x, k) => sum + x * q[k]!, 0);
    p = fitValues(
      {
        parameters,
        linear: true,
        evaluate: (q) => ({ calculated: jacobian.map((row) => line(row, q)), jacobian }),
        observed: observed.map((y, i) => y - calculated[i]! + line(jacobian[i]!, base)),
        errors: { sigmas: observed.map(() => 1), mixing: null, shared: [] },
      },
      UNTREATED,
    );
    const misfit = misfitOf(p, parameters, observed, evaluate(p).calculated);
    const gain = best.misfit - misfit;
    if (gain > 0) best = { p, misfit };
    if (Math.abs(gain) < SETTLED) break;
  }
  return best;
}

function misfitOf(
  p: readonly number[],
  parameters: readonly Parameter[],
  observed: readonly number[],
  calculated: readonly number[],
): number {
  const data = observed.reduce((sum, y, i) => sum + (y - calculated[i]!) ** 2, 0);
  return parameters.reduce(
    (sum, { prior }, k) => sum + (prior === undefined ? 0 : ((p[k]! - prior.value) / prior.sigma) ** 2),
    data,
  );
}

/** The best trial between two couplings, by golden section. */
function between(low: number, high: number, trial: (k: number) => Trial): Trial {
  const golden = (Math.sqrt(5) - 1) / 2;
  let [a, b] = [low, high];
  let [x, y] = [b - golden * (b - a), a + golden * (b - a)];
  let [left, right] = [trial(x), trial(y)];
  while (b - a > NONE / 2)
    if (left.misfit <= right.misfit) {
      [b, y, right] = [y, x, left];
      x = b - golden * (b - a);
      left = trial(x);
    } else {
      [a, x, left] = [x, y, right];
      y = a + golden * (b - a);
      right = trial(y);
    }
  return left.misfit <= right.misfit ? left : right;
}
