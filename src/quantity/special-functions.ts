/*
 * The three special functions behind the distributions, for arguments that are halves of degrees of freedom.
 * Formulas: Abramowitz & Stegun, Handbook of Mathematical Functions (1964), 6.1.40, 6.5.29, 6.5.31, 26.5.8.
 */

const iterations = 10_000;
const smallest = 1e-300;

/** ln Γ(x) for x > 0: Stirling's series (6.1.40) after shifting x above 15, where eight terms are exact to rounding. */
export function logGamma(x: number): number {
  let shift = 1;
  let z = x;
  while (z < 15) shift *= z++;
  const w = 1 / (z * z);
  const series =
    (1 / 12 - w * (1 / 360 - w * (1 / 1260 - w * (1 / 1680 - w * (1 / 1188 - w * (691 / 360360 - w * (1 / 156))))))) /
    z;
  return (z - 0.5) * Math.log(z) - z + 0.5 * Math.log(2 * Math.PI) + series - Math.log(shift);
}

/** Continued fraction b0 + a1/(b1 + a2/(b2 + …)) by the modified Lentz method (Thompson & Barnett 1986). */
function continuedFraction(b0: number, term: (i: number) => readonly [a: number, b: number]): number {
  let value = b0 || smallest;
  let c = value;
  let d = 0;
  for (let i = 1; i <= iterations; i++) {
    const [a, b] = term(i);
    d = 1 / (b + a * d || smallest);
    c = b + a / c || smallest;
    value *= c * d;
    if (Math.abs(c * d - 1) < Number.EPSILON) break;
  }
  return value;
}

/** Upper regularised incomplete gamma function Q(a, x) for a > 0, x ≥ 0. */
export function upperGamma(a: number, x: number): number {
  if (x <= 0) return 1;
  if (x === Number.POSITIVE_INFINITY) return 0;
  const front = Math.exp(a * Math.log(x) - x - logGamma(a));
  if (front === 0) return x > a ? 0 : 1;
  if (x > a + 1) return front / continuedFraction(x + 1 - a, (i) => [-i * (i - a), x + 2 * i + 1 - a]);
  let term = 1 / a;
  let sum = term;
  for (let i = 1; i <= iterations && term > sum * (Number.EPSILON / 4); i++) {
    term *= x / (a + i);
    sum += term;
  }
  return 1 - front * sum;
}

/** Regularised incomplete beta function I_x(a, b) for a, b > 0; `y` is 1 − x, given apart so that it keeps its digits. */
export function incompleteBeta(x: number, y: number, a: number, b: number): number {
  if (x <= 0) return 0;
  if (y <= 0) return 1;
  if (x > (a + 1) / (a + b + 2)) return 1 - incompleteBeta(y, x, b, a);
  const front = Math.exp(a * Math.log(x) + b * Math.log(y) + logGamma(a + b) - logGamma(a) - logGamma(b)) / a;
  const fraction = continuedFraction(1, (i) => {
    const m = Math.floor(i / 2);
    const below = (a + i - 1) * (a + i);
    return [(i % 2 === 0 ? m * (b - m) : -(a + m) * (a + b + m)) * (x / below), 1];
  });
  return front / fraction;
}
