/** A measured band and the companion it shares its intensity with, cm-1; what follows for the band by itself. */
export interface TwoLevels {
  /** the band as measured */
  readonly measured: number;
  readonly measuredSigma: number | null;
  readonly companion: number;
  /** that of the band where the companion has none of its own */
  readonly companionSigma: number | null;
  /** intensity of the band over that of the companion */
  readonly ratio: number;
  readonly ratioSigma: number | null;
  /** matrix element between the two, positive */
  readonly coupling: number;
  readonly couplingSigma: number | null;
  /** corrected less measured */
  readonly shift: number;
  readonly shiftSigma: number | null;
  readonly corrected: number;
  readonly sigma: number | null;
  /** companion and ratio as typed; the companion in the unit of the band */
  readonly asRead: { readonly companion: string; readonly ratio: string };
}

interface Pair {
  readonly band: number;
  readonly bandSigma: number | null;
  readonly companion: number;
  readonly companionSigma: number | null;
  readonly ratio: number;
  readonly ratioSigma: number | null;
}

/**
 * Two levels that repel each other, one of them dark: with Δ between them as observed and R the ratio of intensities, δ = Δ(R-1)/(R+1) lay between
 * them without the coupling W = Δ√R/(R+1), and the bright one stood at (R·ν + ν_companion)/(R+1), which is (Δ-δ)/2 = Δ/(R+1) nearer to the companion (two-level
 * perturbation, Herzberg 1945). Uncertainties to first order, both positions and the ratio uncorrelated; σ of the companion is that of the band where it has none.
 */
export function separate({
  band,
  bandSigma,
  companion,
  companionSigma,
  ratio: r,
  ratioSigma,
}: Pair): Omit<TwoLevels, "asRead"> {
  const corrected = (r * band + companion) / (r + 1);
  const gap = Math.abs(companion - band);
  const coupling = (gap * Math.sqrt(r)) / (r + 1);
  const other = companionSigma ?? bandSigma;
  const byRatio = (slope: number) => slope * (ratioSigma ?? 0);
  const whereKnown = (of: (band: number, companion: number) => number) =>
    bandSigma === null || other === null ? null : of(bandSigma, other);
  const moved = byRatio((band - companion) / (r + 1) ** 2);
  return {
    measured: band,
    measuredSigma: bandSigma,
    companion,
    companionSigma: other,
    ratio: r,
    ratioSigma,
    coupling,
    couplingSigma: whereKnown((a, b) =>
      Math.hypot(
        (Math.sqrt(r) / (r + 1)) * Math.hypot(a, b),
        byRatio((gap * (1 - r)) / (2 * Math.sqrt(r) * (r + 1) ** 2)),
      ),
    ),
    shift: corrected - band,
    shiftSigma: whereKnown((a, b) => Math.hypot(a / (r + 1), b / (r + 1), moved)),
    corrected,
    sigma: whereKnown((a, b) => Math.hypot((r * a) / (r + 1), b / (r + 1), moved)),
  };
}
