import { coverageFactor } from "../../quantity/index.ts";

/** Level of the range that reference wells give. */
export const LEVEL = 0.8;

/**
 * The range that holds the ratio of one more well at the level `LEVEL`: exp(m ± t·s·√(1 + 1/N)) with mean m and standard
 * deviation s of the logarithms and Student's t for N − 1 degrees of freedom (the prediction interval of a log-normal
 * sample). Few wells widen it. `ratios`: positive, at least two.
 */
export function spread(ratios: readonly number[]): readonly [number, number] {
  const count = ratios.length;
  const logs = ratios.map(Math.log);
  let mean = 0;
  for (const x of logs) mean += x / count;
  let variance = 0;
  for (const x of logs) variance += (x - mean) ** 2 / (count - 1);
  const half = student(count - 1) * Math.sqrt(variance * (1 + 1 / count));
  return [Math.exp(mean - half), Math.exp(mean + half)];
}

const factors: number[] = [];

/** Remembered, since one answer asks for it a dozen times. */
function student(degreesOfFreedom: number): number {
  factors[degreesOfFreedom] ??= coverageFactor(LEVEL, degreesOfFreedom);
  return factors[degreesOfFreedom]!;
}
