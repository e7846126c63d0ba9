/** Akaike's criterion and its small-sample form. */
export interface Criteria {
  readonly aic: number | null;
  readonly aicc: number | null;
}

/**
 * σ known: χ² + 2p. σ unknown: n·ln(RSS/n) + 2K with K = p + 1 (the variance counts), and AICc = that + 2K(K+1)/(n-K-1), undefined
 * for n ≤ K+1 (Akaike 1974; Hurvich & Tsai 1989). The small-sample term belongs to an unknown variance and is not added otherwise.
 */
export function informationCriteria(
  sigmaKnown: boolean,
  sumOfSquares: number,
  data: number,
  constants: number,
): Criteria {
  if (sigmaKnown) return { aic: sumOfSquares + 2 * constants, aicc: null };
  if (!(sumOfSquares > 0) || data <= constants) return { aic: null, aicc: null };
  const k = constants + 1;
  const aic = data * Math.log(sumOfSquares / data) + 2 * k;
  return { aic, aicc: data > k + 1 ? aic + (2 * k * (k + 1)) / (data - k - 1) : null };
}
