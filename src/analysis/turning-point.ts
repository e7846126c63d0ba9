import type { Well } from "../models/index.ts";

/** No vibrational ladder of a diatomic or an X-H bond is longer than this. */
const FARTHEST_LEVEL = 2000;

/** The first v above `from` where dG/dv becomes zero, or null when the series does not converge. */
export function turningPoint(well: Well, from: number): number | null {
  if (!(well.slope(from) > 0)) return null;
  let low = from;
  for (let step = 0.25; low < FARTHEST_LEVEL; step *= 1.02) {
    const high = low + step;
    if (well.slope(high) <= 0) return bisect(well, low, high);
    low = high;
  }
  return null;
}

function bisect(well: Well, from: number, to: number): number {
  let [low, high] = [from, to];
  for (let round = 0; round < 200 && high - low > 4 * Number.EPSILON * high; round++) {
    const middle = (low + high) / 2;
    if (well.slope(middle) > 0) low = middle;
    else high = middle;
  }
  return (low + high) / 2;
}
