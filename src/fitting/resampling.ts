import { uniformFloat64 } from "pure-rand/distribution/uniformFloat64";
import { xoroshiro128plus } from "pure-rand/generator/xoroshiro128plus";

/** A source of random numbers that is the same for the same seed on every machine. */
export interface Random {
  /** uniform on [0, 1) */
  readonly uniform: () => number;
  /** standard normal (Box & Muller 1958) */
  readonly normal: () => number;
}

/** xoroshiro128+ from pure-rand. `seed`: a whole number. */
export function randomFrom(seed: number): Random {
  const generator = xoroshiro128plus(seed);
  const uniform = () => uniformFloat64(generator);
  let spare: number | null = null;
  const normal = () => {
    if (spare !== null) {
      const kept = spare;
      spare = null;
      return kept;
    }
    const radius = Math.sqrt(-2 * Math.log(1 - uniform()));
    const angle = 2 * Math.PI * uniform();
    spare = radius * Math.sin(angle);
    return radius * Math.cos(angle);
  };
  return { uniform, normal };
}

/** What a sample says of a quantity (JCGM 101:2008, 7). */
export interface Distribution {
  readonly mean: number;
  readonly standardUncertainty: number;
  /** of the trials in which the quantity existed, rising */
  readonly sorted: Float64Array;
  /** share of the trials in which it did not exist */
  readonly missing: number;
}

/** Summarise trials; NaN and infinite ones count as missing. */
export function summarise(trials: Float64Array): Distribution {
  const sorted = trials.filter(Number.isFinite).sort();
  const mean = sorted.reduce((sum, x) => sum + x, 0) / sorted.length;
  const squares = sorted.reduce((sum, x) => sum + (x - mean) ** 2, 0);
  return {
    mean,
    standardUncertainty: Math.sqrt(squares / (sorted.length - 1)),
    sorted,
    missing: 1 - sorted.length / trials.length,
  };
}

/**
 * Probabilistically symmetric interval of that level (JCGM 101:2008, 7.7.2). Missing trials lie beyond the far end, so the interval
 * is null when they reach into it.
 */
export function symmetricInterval({ sorted, missing }: Distribution, level: number): readonly [number, number] | null {
  const tail = (1 - level) / 2;
  if (sorted.length < 20 || missing > tail) return null;
  const total = sorted.length / (1 - missing);
  const at = (share: number) => {
    const position = share * total - 0.5;
    const below = Math.min(sorted.length - 1, Math.max(0, Math.floor(position)));
    const above = Math.min(sorted.length - 1, below + 1);
    return sorted[below]! + (sorted[above]! - sorted[below]!) * Math.min(1, Math.max(0, position - below));
  };
  return [at(tail), at(1 - tail)];
}

/** The shortest interval of that level (JCGM 101:2008, 5.3.4). */
export function shortestInterval({ sorted }: Distribution, level: number): readonly [number, number] {
  const span = Math.round(level * sorted.length);
  let best = 0;
  for (let i = 1; i + span < sorted.length; i++)
    if (sorted[i + span]! - sorted[i]! < sorted[best + span]! - sorted[best]!) best = i;
  return [sorted[best]!, sorted[Math.min(sorted.length - 1, best + span)]!];
}

/** Propagate distributions through a function by Monte Carlo (JCGM 101:2008): `draw` gives the inputs of one trial. */
export function propagateDistributions<T>(
  draw: (random: Random) => T,
  evaluate: (input: T) => number,
  trials: number,
  seed: number,
): Distribution {
  const random = randomFrom(seed);
  return summarise(Float64Array.from({ length: trials }, () => evaluate(draw(random))));
}

/**
 * Draws of the constants: normal about the best values with their covariance, or Student t when the variance was estimated with
 * `degreesOfFreedom`. One row a trial, flat. `covariance` may have zero rows (constants held).
 */
export function drawConstants(
  best: readonly number[],
  covariance: readonly (readonly number[])[],
  degreesOfFreedom: number | null,
  trials: number,
  seed: number,
): Float64Array {
  const size = best.length;
  const root = semidefiniteRoot(covariance);
  const random = randomFrom(seed);
  const rows = new Float64Array(trials * size);
  const z = new Float64Array(size);
  for (let t = 0; t < trials; t++) {
    for (let k = 0; k < size; k++) z[k] = random.normal();
    let stretch = 1;
    if (degreesOfFreedom !== null) {
      let square = 0;
      for (let d = 0; d < degreesOfFreedom; d++) square += random.normal() ** 2;
      stretch = Math.sqrt(degreesOfFreedom / square);
    }
    for (let i = 0; i < size; i++) {
      let sum = 0;
      for (let k = 0; k <= i; k++) sum += root[i * size + k]! * z[k]!;
      rows[t * size + i] = best[i]! + stretch * sum;
    }
  }
  return rows;
}

/** Lower triangular L with L·Lᵀ = C for a covariance that may have zero rows. */
function semidefiniteRoot(covariance: readonly (readonly number[])[]): Float64Array {
  const n = covariance.length;
  const l = new Float64Array(n * n);
  for (let j = 0; j < n; j++) {
    for (let i = j; i < n; i++) {
      let sum = covariance[i]![j]!;
      for (let k = 0; k < j; k++) sum -= l[i * n + k]! * l[j * n + k]!;
      if (i === j) l[j * n + j] = Math.sqrt(Math.max(0, sum));
      else l[i * n + j] = l[j * n + j]! > 0 ? sum / l[j * n + j]! : 0;
    }
  }
  return l;
}
