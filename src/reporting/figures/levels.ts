import type { BandResult } from "../../analysis/index.ts";

/** Upper and lower level of a label such as `3-0`; null for labels of another form. */
export function levelsOf(label: string): { readonly upper: number; readonly lower: number } | null {
  const match = /^(\d+)-(\d+)$/.exec(label.trim());
  return match === null ? null : { upper: Number(match[1]), lower: Number(match[2]) };
}

/** A spacing between two observed levels with none observed between them. */
export interface Spacing {
  readonly lower: number;
  readonly upper: number;
  /** mean of G(v+1) - G(v) over the gap, cm-1 */
  readonly mean: number;
  /** from the stated uncertainties; null when a band has none */
  readonly standardUncertainty: number | null;
}

interface Link {
  readonly upper: number;
  readonly lower: number;
  readonly position: number;
  readonly weight: number;
}

/**
 * Spacings between neighbouring observed levels. Each used band links two levels; the energies of linked levels follow by least
 * squares with the stated uncertainties (equal weights when one is missing), which for v-0 bands alone are plain differences and
 * for hot bands and repeats weighted means.
 */
export function observedSpacings(bands: readonly BandResult[]): readonly Spacing[] {
  const used = bands.filter(({ used }) => used);
  const known = used.every(({ standardUncertainty: u }) => u !== null && u > 0);
  const links = used.flatMap(({ label, observed, standardUncertainty }) => {
    const levels = levelsOf(label);
    const weight = known ? 1 / standardUncertainty! ** 2 : 1;
    return levels === null ? [] : [{ ...levels, position: observed, weight }];
  });
  return components(links).flatMap((levels) => spacingsOf(levels, links, known));
}

/** Levels in groups linked by bands, each in rising order. */
function components(links: readonly Link[]): readonly (readonly number[])[] {
  const group = new Map<number, Set<number>>();
  for (const { upper, lower } of links) {
    const joined = new Set([...(group.get(upper) ?? [upper]), ...(group.get(lower) ?? [lower])]);
    for (const level of joined) group.set(level, joined);
  }
  return [...new Set(group.values())].map((levels) => [...levels].sort((a, b) => a - b));
}

function spacingsOf(levels: readonly number[], links: readonly Link[], known: boolean): Spacing[] {
  // The lowest level is the zero; the weighted matrix of a linked group is positive definite.
  const size = levels.length - 1;
  const at = new Map(levels.map((level, i) => [level, i - 1]));
  const matrix = Array.from({ length: size }, () => new Array<number>(size).fill(0));
  const right = new Array<number>(size).fill(0);
  for (const { upper, lower, position, weight } of links) {
    const [u, l] = [at.get(upper), at.get(lower)];
    if (u === undefined || l === undefined) continue;
    for (const [i, sign] of [
      [u, 1],
      [l, -1],
    ] as const) {
      if (i < 0) continue;
      matrix[i]![i]! += weight;
      right[i]! += sign * weight * position;
    }
    if (u >= 0 && l >= 0) {
      matrix[u]![l]! -= weight;
      matrix[l]![u]! -= weight;
    }
  }
  const inverse = inverted(matrix);
  const energy = [0, ...inverse.map((row) => row.reduce((sum, c, i) => sum + c * right[i]!, 0))];
  const covariance = (i: number, j: number) => (i < 0 || j < 0 ? 0 : inverse[i]![j]!);
  return levels.slice(1).map((upper, i) => {
    const lower = levels[i]!;
    const variance = covariance(i, i) + covariance(i - 1, i - 1) - 2 * covariance(i, i - 1);
    return {
      lower,
      upper,
      mean: (energy[i + 1]! - energy[i]!) / (upper - lower),
      standardUncertainty: known ? Math.sqrt(Math.max(0, variance)) / (upper - lower) : null,
    };
  });
}

/** Inverse of a positive definite matrix by Gauss–Jordan steps on scaled rows, pivots on the diagonal. */
function inverted(matrix: readonly (readonly number[])[]): number[][] {
  const size = matrix.length;
  const scale = matrix.map((row, i) => 1 / Math.sqrt(row[i]!));
  const work = matrix.map((row, i) => [
    ...row.map((value, j) => value * scale[i]! * scale[j]!),
    ...row.map((_, j) => (i === j ? 1 : 0)),
  ]);
  for (let k = 0; k < size; k++) {
    const pivot = work[k]![k]!;
    for (let j = 0; j < 2 * size; j++) work[k]![j]! /= pivot;
    for (let i = 0; i < size; i++) {
      const factor = work[i]![k]!;
      if (i === k || factor === 0) continue;
      for (let j = 0; j < 2 * size; j++) work[i]![j]! -= factor * work[k]![j]!;
    }
  }
  return work.map((row, i) => row.slice(size).map((value, j) => value * scale[i]! * scale[j]!));
}
