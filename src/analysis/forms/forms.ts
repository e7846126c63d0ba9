import { dot } from "../../fitting/index.ts";

/** A way to write the constants of one oscillator. */
export interface Form {
  readonly name: string;
  /** what it is, for tables */
  readonly title: string;
  /** keys of its constants, lowest power first, and the text of each */
  readonly keys: readonly string[];
  readonly symbols: readonly string[];
  /** coefficient of this constant (0 … n-1) as a function of those of the equilibrium form: row k of the matrix */
  row(k: number, terms: number): number[];
}

const SIZE = 6;
const sign = (k: number) => (k === 1 ? -1 : 1);

/** Coefficient of x^power in ((x + shift)^n - (x + less)^n). */
function binomial(n: number, power: number): number {
  let value = 1;
  for (let i = 1; i <= power; i++) value = (value * (n - i + 1)) / i;
  return power > n ? 0 : value;
}

const unit = (k: number, terms: number) => Array.from({ length: terms }, (_, j) => Number(j === k));

/** Coefficient of v^power, power ≥ 1, in ±[(v+½)^n - (½)^n] for n = 1 … terms. */
const inPowersOfV = (power: number, terms: number) =>
  Array.from({ length: terms }, (_, j) => sign(j) * binomial(j + 1, power) * 0.5 ** (j + 1 - power));

const names = (prefix: string, from: number) => Array.from({ length: SIZE }, (_, k) => `${prefix}${k + from}`);

/** Every form; the first is the one fits use. All are linear in each other. */
export const forms: readonly Form[] = [
  {
    name: "equilibrium",
    title: "G(v) = ωe(v+½) − ωexe(v+½)² + ωeye(v+½)³ + …",
    keys: ["we", "wexe", "weye", "weze", "y5", "y6"],
    symbols: ["ωe", "ωexe", "ωeye", "ωeze", "Y50", "Y60"],
    row: unit,
  },
  {
    name: "local",
    title: "ν̃(v-0) = v·ω̃ − v(v+1)·ω̃x + [(v+½)³ − ⅛]·ω̃y + …",
    keys: ["w", "wx", "wy", "wz", "w5", "w6"],
    symbols: ["ω̃", "ω̃x", "ω̃y", "ω̃z", "ω̃5", "ω̃6"],
    row: unit,
  },
  {
    name: "polynomial",
    title: "ν̃(v-0) = c1·v + c2·v² + c3·v³ + …",
    keys: names("c", 1),
    symbols: names("c", 1),
    row: (k, terms) => inPowersOfV(k + 1, terms),
  },
  {
    name: "position-plot",
    title: "ν̃(v-0)/v = a0 + a1·v + a2·v² + … (a0 the intercept, a1 the slope)",
    keys: names("a", 0),
    symbols: names("a", 0),
    row: (k, terms) => inPowersOfV(k + 1, terms),
  },
  {
    name: "spacing-plot",
    title: "ΔG = b0 + b1·x + b2·x² + …, x = v + ½ (b0 the intercept, b1 the slope of the Birge–Sponer plot)",
    keys: names("b", 0),
    symbols: names("b", 0),
    // ΔG of v and v+1 at x = v + ½, where G holds powers of x and of x + 1
    row: (k, terms) => Array.from({ length: terms }, (_, j) => sign(j) * (binomial(j + 1, k) - Number(k === j + 1))),
  },
];

/** Constants and their covariance (null: unknown) from one form to another. @throws RangeError for more constants than forms have */
export function changeForm(
  values: readonly number[],
  covariance: readonly (readonly number[])[] | null,
  from: Form,
  to: Form,
): { readonly values: number[]; readonly covariance: number[][] | null } {
  const terms = values.length;
  if (terms > SIZE) throw new RangeError(`${terms} constants are more than a form has`);
  const matrix = product(matrixOf(to, terms), inverse(matrixOf(from, terms)));
  return {
    values: matrix.map((row) => dot(row, values)),
    covariance:
      covariance === null
        ? null
        : matrix.map((left) =>
            matrix.map((right) =>
              dot(
                left,
                covariance.map((row) => dot(row, right)),
              ),
            ),
          ),
  };
}

const matrixOf = (form: Form, terms: number) => Array.from({ length: terms }, (_, k) => form.row(k, terms));

function product(a: readonly (readonly number[])[], b: readonly (readonly number[])[]): number[][] {
  return a.map((row) => b[0]!.map((_, j) => row.reduce((sum, x, k) => sum + x * b[k]![j]!, 0)));
}

/** All these matrices are upper triangular: row k holds powers from k up. */
function inverse(matrix: readonly (readonly number[])[]): number[][] {
  const n = matrix.length;
  const result = matrix.map(() => new Array<number>(n).fill(0));
  for (let column = 0; column < n; column++)
    for (let i = n - 1; i >= 0; i--) {
      let sum = Number(i === column);
      for (let j = i + 1; j < n; j++) sum -= matrix[i]![j]! * result[j]![column]!;
      result[i]![column] = sum / matrix[i]![i]!;
    }
  return result;
}
