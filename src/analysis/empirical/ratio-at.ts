import type { ReferenceFit } from "./reference-well.ts";

/**
 * How far outside its own fits a well still counts, with the ratio of its nearest fit. Downwards 0.05 of the well, but not
 * below half the fraction of its shortest fit: no well has a shorter one than its first bands give, and the ratio changes
 * by a few percent there. Upwards 0.02, but not past the middle between its longest fit and the limit.
 */
const REACH = { below: 0.05, share: 0.5, above: 0.02 } as const;

/** The ratio of a well at a covered fraction, linear between its fits; null where it has none. */
export function ratioAt(fits: readonly ReferenceFit[], covered: number): number | null {
  const first = fits[0];
  if (first === undefined || covered < Math.max(first[0] - REACH.below, first[0] * REACH.share)) return null;
  if (covered <= first[0]) return first[1];
  for (let i = 1; i < fits.length; i++) {
    const upper = fits[i]!;
    if (covered > upper[0]) continue;
    const lower = fits[i - 1]!;
    return lower[1] + ((covered - lower[0]) / (upper[0] - lower[0])) * (upper[1] - lower[1]);
  }
  const last = fits[fits.length - 1]!;
  return covered <= last[0] + Math.min(REACH.above, (1 - last[0]) * REACH.share) ? last[1] : null;
}
