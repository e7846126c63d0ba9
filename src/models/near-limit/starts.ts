import { binding, exponent } from "./law.ts";

/** A level and its energy above v = 0, cm-1. */
export interface Level {
  readonly v: number;
  readonly energy: number;
}

/** A band as two levels and its position in cm-1. */
export interface Link {
  readonly upper: number;
  readonly lower: number;
  readonly position: number;
}

/** What is already known of the three constants of the law. */
export interface Known {
  readonly d: number | null;
  readonly vd: number | null;
  readonly hn: number | null;
}

/** Energies of the levels that the bands link to v = 0, rising in v; v = 0 not listed. Where bands close a loop the first one counts. */
export function linkedEnergies(links: readonly Link[]): Level[] {
  const energies = new Map([[0, 0]]);
  for (let before = -1; before !== energies.size; ) {
    before = energies.size;
    for (const { upper, lower, position } of links) {
      const [high, low] = [energies.get(upper), energies.get(lower)];
      if (high === undefined && low !== undefined) energies.set(upper, low + position);
      if (low === undefined && high !== undefined) energies.set(lower, high - position);
    }
  }
  return [...energies]
    .filter(([v]) => v > 0)
    .map(([v, energy]) => ({ v, energy }))
    .sort((a, b) => a.v - b.v);
}

/**
 * D, v_D and H_n near their best values, found without a guess. For a given D the law is a straight line, (D-E)^((n-2)/2n) against v; D is tried
 * from just above the top level upwards, beginning with the line of (dE/dv)^(2n/(n+2)) against E (LeRoy & Bernstein 1970), and the line
 * that meets the energies best wins. null for fewer than two levels.
 */
export function lawStarts(levels: readonly Level[], power: number, known: Known): [number, number, number] | null {
  const top = levels.at(-1);
  const below = levels.at(-2);
  if (top === undefined || below === undefined) return null;
  const spacing = Math.abs(top.energy - below.energy) / (top.v - below.v);
  const highest = Math.max(...levels.map(({ energy }) => energy));
  const grid = Array.from({ length: 81 }, (_, i) => highest + spacing * 10 ** (-4 + i / 10));
  const candidates = known.d === null ? [limitFromSpacings(levels, power), ...grid] : [known.d];
  let best: { start: [number, number, number]; misfit: number } | null = null;
  for (const d of candidates) {
    if (!(d > highest)) continue;
    const line = straightLine(levels, d, power, known);
    if (line === null) continue;
    const misfit = levels.reduce(
      (sum, { v, energy }) => sum + (d - binding(power, line.vd, line.hn, 0, v).value - energy) ** 2,
      0,
    );
    if (best === null || misfit < best.misfit) best = { start: [d, line.vd, line.hn], misfit };
  }
  return best?.start ?? null;
}

/** D where the line of (dE/dv)^(2n/(n+2)) against E, each at the middle of a spacing, vanishes; NaN where it does not fall. */
function limitFromSpacings(levels: readonly Level[], power: number): number {
  const points = levels.slice(1).map(({ v, energy }, i) => {
    const low = levels[i]!;
    return {
      x: (energy + low.energy) / 2,
      y: ((energy - low.energy) / (v - low.v)) ** ((2 * power) / (power + 2)),
    };
  });
  const { slope, intercept } = regress(points);
  return slope < 0 ? -intercept / slope : Number.NaN;
}

/** v_D and H_n of the line (D-E)^((n-2)/2n) = H_n·(v_D-v) through the levels. */
function straightLine(
  levels: readonly Level[],
  d: number,
  power: number,
  known: Known,
): { vd: number; hn: number } | null {
  const points = levels.map(({ v, energy }) => ({ x: v, y: (d - energy) ** (1 / exponent(power)) }));
  const free = regress(points);
  const mean = { x: average(points.map(({ x }) => x)), y: average(points.map(({ y }) => y)) };
  const hn = known.hn ?? (known.vd === null ? -free.slope : mean.y / (known.vd - mean.x));
  if (!(hn > 0)) return null;
  // A start at or below the top level would have no energy there.
  const vd = Math.max(known.vd ?? mean.x + mean.y / hn, known.vd ?? levels.at(-1)!.v + 1e-3);
  return { vd, hn };
}

const average = (x: readonly number[]) => x.reduce((sum, one) => sum + one, 0) / x.length;

function regress(points: readonly { x: number; y: number }[]): { slope: number; intercept: number } {
  const x = average(points.map((p) => p.x));
  const y = average(points.map((p) => p.y));
  const spread = points.reduce((sum, p) => sum + (p.x - x) ** 2, 0);
  const slope = points.reduce((sum, p) => sum + (p.x - x) * (p.y - y), 0) / spread;
  return { slope, intercept: y - slope * x };
}
