import type { Problem } from "../../src/fitting/index.ts";

/** A small seeded generator (xorshift32), so that test data are the same everywhere. */
export function seeded(seed: number): () => number {
  let state = seed | 0 || 1;
  return () => {
    state ^= state << 13;
    state ^= state >>> 17;
    state ^= state << 5;
    return (state >>> 0) / 2 ** 32;
  };
}

/** Standard normal numbers by Box and Muller. */
export function normal(random: () => number): () => number {
  return () => Math.sqrt(-2 * Math.log(1 - random())) * Math.cos(2 * Math.PI * random());
}

/** A linear problem from its matrix; independent errors of σ 1 unless told otherwise. */
export function linearProblem(
  jacobian: readonly (readonly number[])[],
  observed: readonly number[],
  errors: Partial<Problem["errors"]> = {},
  parameters: readonly Partial<Problem["parameters"][number]>[] = [],
): Problem {
  return {
    parameters: jacobian[0]!.map((_, k) => ({
      key: `p${k}`,
      symbol: `p${k}`,
      unit: "",
      start: 0,
      typical: 1,
      ...parameters[k],
    })),
    linear: true,
    evaluate: (p) => ({ calculated: jacobian.map((row) => row.reduce((s, x, k) => s + x * p[k]!, 0)), jacobian }),
    observed,
    errors: { sigmas: observed.map(() => 1), mixing: null, shared: [], ...errors },
  };
}
