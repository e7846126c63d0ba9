import { fitValues, type Parameter, UNTREATED } from "../../fitting/index.ts";
import type { ModelOptions } from "../model.ts";
import { keysOf, parametersOf } from "./constants.ts";
import type { Resolved } from "./label.ts";
import { solveBlocks } from "./ladder.ts";

interface Ends {
  readonly upper: Resolved;
  readonly lower: Resolved | null;
}

/** What stands in for a constant the bands say nothing of at first. */
const GUESS: Readonly<Record<string, number>> = {
  w: 3000,
  wx: 60,
  lambda: -1,
  wxcross: 0,
  w1: 3000,
  wx1: 60,
  w2: 3000,
  wx2: 60,
};

/** Uncertainty of that guess as a share of what is typical; weak, so that bands decide where they can. */
const VAGUE = 100;

/**
 * First constants by least squares to first order in the coupling: levels at Σ p_k·∂E/∂p_k with the derivatives of uncoupled states, then of the
 * states those constants give, twice. A vague prior stands in where the bands leave a constant open; the fit itself then says so.
 */
export function startsFrom(pairs: readonly Ends[], observed: readonly number[], options: ModelOptions): number[] {
  const keys = keysOf(options);
  const parameters = parametersOf(options).map((parameter): Parameter => {
    if (parameter.held !== undefined) return parameter;
    const guess = parameter.prior?.value ?? GUESS[parameter.key]!;
    return { ...parameter, prior: parameter.prior ?? { value: guess, sigma: VAGUE * parameter.typical } };
  });
  let p = parameters.map(({ held, prior, key }) => held ?? prior?.value ?? GUESS[key]!);
  for (let round = 0; round < 3; round++) {
    // Almost no coupling at first: what is left tells degenerate states apart by species.
    const at = round === 0 ? p.map((x, k) => (keys[k] === "lambda" ? 1e-3 * Math.sign(x || -1) : x)) : p;
    const gradient = ({ total, among, place }: Resolved) => {
      const blocks = solveBlocks(options.bonds, total, keys, at);
      const all = among.map(({ species, order }) => {
        const block = blocks.find((one) => one.species === species)!;
        return { energy: block.energies[order]!, row: block.gradients[order]! };
      });
      return [...all].sort((a, b) => a.energy - b.energy)[all.length === 1 ? 0 : place]!.row;
    };
    const jacobian = pairs.map(({ upper, lower }) => {
      const high = gradient(upper);
      const low = lower === null ? null : gradient(lower);
      return high.map((x, k) => x - (low?.[k] ?? 0));
    });
    p = fitValues(
      {
        parameters,
        linear: true,
        evaluate: (q) => ({
          calculated: jacobian.map((row) => row.reduce((sum, x, k) => sum + x * q[k]!, 0)),
          jacobian,
        }),
        observed,
        errors: { sigmas: observed.map(() => 1), mixing: null, shared: [] },
      },
      UNTREATED,
    );
  }
  return p;
}
