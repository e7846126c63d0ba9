import { kappa, logGamma } from "../../quantity/index.ts";

/**
 * K_n = 2√π·n·√(κ/μ)·C_n^(-1/n)·Γ(1+1/n)/Γ(½+1/n), for a potential D - C_n/rⁿ far out (LeRoy & Bernstein 1970):
 * dE/dv = K_n·(D-E)^((n+2)/2n). `power` n > 2, `cn` in cm-1 Åⁿ, `reducedMass` in u; K_n in (cm-1)^((n-2)/2n). NaN for cn ≤ 0.
 */
export function limitSlope(power: number, cn: number, reducedMass: number): number {
  return slopeFactor(power, reducedMass) * cn ** (-1 / power);
}

/** K_n·C_n^(1/n): all of K_n but the dependence on C_n. */
function slopeFactor(power: number, reducedMass: number): number {
  const gammas = Math.exp(logGamma(1 + 1 / power) - logGamma(0.5 + 1 / power));
  return 2 * Math.sqrt(Math.PI) * power * Math.sqrt(kappa / reducedMass) * gammas;
}

/** H_n = K_n·(n-2)/2n: (D-E)^((n-2)/2n) falls by H_n from one level to the next. */
export const lineSlope = (power: number, cn: number, reducedMass: number) =>
  (limitSlope(power, cn, reducedMass) * (power - 2)) / (2 * power);

/** The C_n of an H_n; inverse of `lineSlope`. */
export const coefficientOf = (power: number, hn: number, reducedMass: number) =>
  ((slopeFactor(power, reducedMass) * (power - 2)) / (2 * power * hn)) ** power;

/** 2n/(n-2): 10/3 for n = 5, 3 for n = 6. */
export const exponent = (power: number) => (2 * power) / (power - 2);

/** (n-2)/2n as text, in lowest terms for a whole n: 3/10 for n = 5. */
export function exponentText(power: number): string {
  if (!Number.isInteger(power)) return String(Number((1 / exponent(power)).toPrecision(4)));
  const divisor = (a: number, b: number): number => (b === 0 ? a : divisor(b, a % b));
  const common = divisor(2 * power, power - 2);
  return `${(power - 2) / common}/${(2 * power) / common}`;
}

/** D - E(v) and its derivatives by v_D, H_n and the bend. */
export interface Binding {
  readonly value: number;
  readonly byVd: number;
  readonly byHn: number;
  readonly byBend: number;
}

/**
 * D - E(v) = [H_n·(v_D-v)·(1 + bend·(v_D-v))]^(2n/(n-2)) cm-1; bend 0 is the law of LeRoy & Bernstein (1970), another bend asks the data
 * whether their line is straight. NaN from v_D up, where there are no levels.
 */
export function binding(power: number, vd: number, hn: number, bend: number, v: number): Binding {
  const m = exponent(power);
  const left = vd - v;
  const straight = 1 + bend * left;
  const height = hn * left * straight;
  const value = left > 0 && height > 0 ? height ** m : Number.NaN;
  return {
    value,
    byVd: (m * value * (1 + 2 * bend * left)) / (left * straight),
    byHn: (m * value) / hn,
    byBend: (m * value * left) / straight,
  };
}
