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

/**
 * Places tried, cm-1: coupling, stretch less first overtone of the bend, and the constants that bend the ladder of one polyad. They decide which
 * states cross, likely ones first.
 */
const PLACES = [100, 45, 200, 15].flatMap((ksbb) =>
  [300, 150, 50, -50, -150, -300].flatMap((detuning) =>
    [-65, -45, -90].flatMap((xss) => [-20, 0, -40].map((xsb) => ({ ksbb, detuning, xss, xsb }))),
  ),
);
const ROUNDS = 4;
const FINAL_ROUNDS = 40;
/** Places followed to their minimum where none meets the levels. */
const FOLLOWED = 8;
/** Root mean square in cm-1 from which a place is followed, and at which it is taken without trying others. */
const PROMISING = 15;
const MET = 2;
/** Sum of squares in cm-1² that ends a search. */
const SETTLED = 1e-9;
/** Below this, cm-1, the levels are met best without a coupling. */
const NONE = 0.05;

/** `given`: held or observed by the user, not by a guess of ours */
type SoftParameter = Parameter & { readonly given: boolean };

interface Trial {
  readonly p: readonly number[];
  readonly misfit: number;
}

/**
 * First constants: levels bend sharply where states cross, and none depends on a coupling of zero to first order, so that a search from one
 * place may end anywhere. Places on a grid are followed a few steps of least squares each, until one meets the levels; else the best ones to
 * their end. 0 for the coupling says that the levels are met best without one.
 */
export function startsFrom(
  levels: readonly PolyadLevel[],
  observed: readonly number[],
  { parameters, evaluate }: Prepared,
): number[] {
  const soft = softenedParameters(levels, observed, parameters);
  const at = parameters.findIndex(({ key }) => key === "ksbb");
  const follow = (p: readonly number[], rounds: number) => descend(p, soft, observed, evaluate, rounds);
  const within = ({ misfit }: Trial, rms: number) => misfit < rms ** 2 * observed.length;
  const trials: Trial[] = [];
  for (const place of PLACES) {
    const first = follow(placed(soft, place), ROUNDS);
    const trial = within(first, PROMISING) ? follow(first.p, FINAL_ROUNDS) : first;
    trials.push(trial);
    if (within(trial, MET)) break;
  }
  trials.sort((a, b) => a.misfit - b.misfit);
  const minima = within(trials[0]!, MET)
    ? trials.slice(0, 1)
    : trials.slice(0, FOLLOWED).map(({ p }) => follow(p, FINAL_ROUNDS));
  const { p } = minima.reduce((least, one) => (one.misfit < least.misfit ? one : least));
  const given = parameters[at]!.held !== undefined || parameters[at]!.prior !== undefined;
  return given || Math.abs(p[at]!) >= NONE ? [...p] : p.map((x, i) => (i === at ? 0 : x));
}

/** Constants at a place; the sum of both wavenumbers stays, for the lowest polyads show it, and what is given stays. */
function placed(parameters: readonly SoftParameter[], place: (typeof PLACES)[number]): number[] {
  const centre = new Map(parameters.map(({ key, held, prior }) => [key, held ?? prior!.value]));
  const sum = centre.get("ws")! + 2 * centre.get("wb")!;
  const { detuning, ...rest } = place;
  const moved: Readonly<Record<string, number>> = {
    ...rest,
    ws: (sum + detuning) / 2 - rest.xss,
    wb: (sum - detuning) / 4,
  };
  return parameters.map(({ key, given }) => (!given ? (moved[key] ?? centre.get(key)!) : centre.get(key)!));
}

/** A vague observation of every constant that is neither held nor observed already. */
function softenedParameters(
  levels: readonly PolyadLevel[],
  observed: readonly number[],
  parameters: readonly Parameter[],
): SoftParameter[] {
  const mean = (values: readonly number[]) =>
    values.length === 0 ? null : values.reduce((sum, x) => sum + x, 0) / values.length;
  const highest = mean(levels.flatMap(({ n, j, l }, i) => (j === 1 && l < 2 ? [observed[i]! / n] : [])));
  const lowest = mean(levels.flatMap(({ n, j, l }, i) => (j === sizeOf(n, l) ? [observed[i]! / (2 * n)] : [])));
  const ratio = GUESS.ws![0] / GUESS.wb![0];
  const wb = lowest ?? (highest === null ? GUESS.wb![0] : highest / ratio);
  const guess: Readonly<Record<string, number>> = { ws: highest ?? wb * ratio, wb };
  return parameters.map((parameter): SoftParameter => {
    if (parameter.held !== undefined || parameter.prior !== undefined) return { ...parameter, given: true };
    const [value, sigma] = GUESS[parameter.key]!;
    return { ...parameter, given: false, prior: { value: guess[parameter.key] ?? value, sigma } };
  });
}

/** Linear least squares about the last constants, steps halved until they lead down, until nothing is gained. */
function descend(
  start: readonly number[],
  parameters: readonly Parameter[],
  observed: readonly number[],
  evaluate: Prepared["evaluate"],
  rounds: number,
): Trial {
  let [p, now] = [start, evaluate(start)];
  let misfit = misfitOf(p, parameters, observed, now.calculated);
  for (let round = 0; round < rounds; round++) {
    const { calculated, jacobian } = now;
    const line = (row: readonly number[], q: readonly number[]) => row.reduce((sum, x, k) => sum + x * q[k]!, 0);
    const target = fitValues(
      {
        parameters,
        linear: true,
        evaluate: (q) => ({ calculated: jacobian.map((row) => line(row, q)), jacobian }),
        observed: observed.map((y, i) => y - calculated[i]! + line(jacobian[i]!, p)),
        errors: { sigmas: observed.map(() => 1), mixing: null, shared: [] },
      },
      UNTREATED,
    );
    const before = misfit;
    for (let share = 1; share > 0.01; share /= 2) {
      const next = p.map((x, k) => x + share * (target[k]! - x));
      const evaluation = evaluate(next);
      const there = misfitOf(next, parameters, observed, evaluation.calculated);
      if (!(there < misfit)) continue;
      [p, now, misfit] = [next, evaluation, there];
      break;
    }
    if (before - misfit < SETTLED) break;
  }
  return { p, misfit };
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
