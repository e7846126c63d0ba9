/** What a ladder of levels is expected to look like; wavenumbers in cm-1. */
export interface Plausible {
  readonly omega: readonly [number, number];
  /** ωx/ω */
  readonly ratio: readonly [number, number];
  /** standard deviation of ωy/ω about 0: how far real ladders bend beyond two constants */
  readonly cubic: number;
  /** highest v looked for */
  readonly highest: number;
}

/** A ladder through some peaks: ν(v) = v·ω - v(v+1)·ωx + [(v+½)³ - ⅛]·ωy, ωy known beforehand to be about 0. */
export interface Ladder {
  readonly omega: number;
  readonly omegaX: number;
  readonly omegaY: number;
  /** of the three constants */
  readonly covariance: readonly number[];
  /** residuals over their σ, squared, and the prior of ωy */
  readonly misfit: number;
  /** ln of the integral of the likelihood over the constants, the priors of ω and ωx left out */
  readonly logIntegral: number;
}

const row = (v: number): readonly [number, number, number] => [v, -v * (v + 1), (v + 0.5) ** 3 - 0.125];

/**
 * Bayesian least squares for the constants of a ladder: flat in ω and ωx, ωy normal about 0 with the given deviation. null where fewer than two
 * different levels are given.
 */
export function fitLadder(
  members: readonly { readonly v: number; readonly position: number; readonly sigma: number }[],
  deviation: number,
): Ladder | null {
  let [a00, a01, a02, a11, a12, a22] = [0, 0, 0, 0, 0, 1 / deviation ** 2];
  let [b0, b1, b2] = [0, 0, 0];
  let norm = 0;
  for (const { v, position, sigma } of members) {
    const [x, y, z] = row(v);
    const w = 1 / sigma ** 2;
    a00 += w * x * x;
    a01 += w * x * y;
    a02 += w * x * z;
    a11 += w * y * y;
    a12 += w * y * z;
    a22 += w * z * z;
    b0 += w * x * position;
    b1 += w * y * position;
    b2 += w * z * position;
    norm += Math.log(sigma * Math.sqrt(2 * Math.PI));
  }
  const c00 = a11 * a22 - a12 * a12;
  const c01 = a02 * a12 - a01 * a22;
  const c02 = a01 * a12 - a02 * a11;
  const determinant = a00 * c00 + a01 * c01 + a02 * c02;
  if (!(determinant > 1e-12 * a00 * a11 * a22)) return null;
  const c11 = a00 * a22 - a02 * a02;
  const c12 = a01 * a02 - a00 * a12;
  const c22 = a00 * a11 - a01 * a01;
  const covariance = [c00, c01, c02, c01, c11, c12, c02, c12, c22].map((c) => c / determinant);
  const omega = covariance[0]! * b0 + covariance[1]! * b1 + covariance[2]! * b2;
  const omegaX = covariance[3]! * b0 + covariance[4]! * b1 + covariance[5]! * b2;
  const omegaY = covariance[6]! * b0 + covariance[7]! * b1 + covariance[8]! * b2;
  let misfit = (omegaY / deviation) ** 2;
  for (const { v, position, sigma } of members) {
    const [x, y, z] = row(v);
    misfit += ((position - omega * x - omegaX * y - omegaY * z) / sigma) ** 2;
  }
  const logIntegral = -norm - misfit / 2 + Math.log(2 * Math.PI) - Math.log(determinant) / 2 - Math.log(deviation);
  return { omega, omegaX, omegaY, covariance, misfit, logIntegral };
}

/** Where the ladder puts level v, and the variance of that (its constants, without the σ of a peak). */
export function predictLevel(
  { omega, omegaX, omegaY, covariance: c }: Ladder,
  v: number,
): { readonly position: number; readonly variance: number } {
  const [x, y, z] = row(v);
  return {
    position: omega * x + omegaX * y + omegaY * z,
    variance: Math.max(
      0,
      x * (c[0]! * x + c[1]! * y + c[2]! * z) +
        y * (c[3]! * x + c[4]! * y + c[5]! * z) +
        z * (c[6]! * x + c[7]! * y + c[8]! * z),
    ),
  };
}

/** Whether constants lie inside the limits. */
export function isPlausible(
  { omega, omegaX }: Pick<Ladder, "omega" | "omegaX">,
  { omega: [low, high], ratio }: Plausible,
): boolean {
  const share = omegaX / omega;
  return omega >= low && omega <= high && share >= ratio[0] && share <= ratio[1];
}
