/** A measured band and the companion it shares its intensity with, cm-1; what follows for the band by itself. */
export interface TwoLevels {
  /** the band as measured */
  readonly measured: number;
  readonly measuredSigma: number | null;
  readonly companion: number;
  /** intensity of the band over that of the companion */
  readonly ratio: number;
  readonly ratioSigma: number | null;
  /** matrix element between the two, positive */
  readonly coupling: number;
  readonly couplingSigma: number | null;
  /** corrected less measured */
  readonly shift: number;
  readonly corrected: number;
  readonly sigma: number | null;
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
 * them without the coupling W = Δ√R/(R+1), and the bright one stood at (R·ν + ν_companion)/(R+1) (two-level perturbation, Herzberg 1950). Uncertainties to first
 * order; σ of the companion is that of the band where it has none.
 */
export function separate({ band, bandSigma, companion, companionSigma, ratio: r, ratioSigma }: Pair): TwoLevels {
  const corrected = (r * band + companion) / (r + 1);
  const gap = Math.abs(companion - band);
  const coupling = (gap * Math.sqrt(r)) / (r + 1);
  const other = companionSigma ?? bandSigma;
  const known = bandSigma !== null && other !== null;
  const byRatio = (slope: number) => slope * (ratioSigma ?? 0);
  return {
    measured: band,
    measuredSigma: bandSigma,
    companion,
    ratio: r,
    ratioSigma,
    coupling,
    couplingSigma: known
      ? Math.hypot(
          (Math.sqrt(r) / (r + 1)) * Math.hypot(bandSigma, other),
          byRatio((gap * (1 - r)) / (2 * Math.sqrt(r) * (r + 1) ** 2)),
        )
      : null,
    shift: corrected - band,
    corrected,
    sigma: known
      ? Math.hypot((r * bandSigma) / (r + 1), other / (r + 1), byRatio((band - companion) / (r + 1) ** 2))
      : null,
  };
}
