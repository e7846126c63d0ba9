import { readVibrationalLabel, vibrationalLabelFault } from "../bands/index.ts";
import type { Parameter } from "../fitting/index.ts";
import type { ConstantInfo, Model, ModelOptions, Well } from "./model.ts";

const constants: readonly ConstantInfo[] = [
  { key: "we", unit: "cm-1", symbol: { equilibrium: "ωe", local: "ω̃" } },
  { key: "wexe", unit: "cm-1", symbol: { equilibrium: "ωexe", local: "ω̃x" } },
  { key: "weye", unit: "cm-1", symbol: { equilibrium: "ωeye", local: "ω̃y" } },
  { key: "weze", unit: "cm-1", symbol: { equilibrium: "ωeze", local: "ω̃z" } },
  { key: "y5", unit: "cm-1", symbol: { equilibrium: "Y50", local: "Y50" } },
  { key: "y6", unit: "cm-1", symbol: { equilibrium: "Y60", local: "Y60" } },
];

/** Orders of magnitude of the constants, for scaling only. */
const TYPICAL = [2000, 40, 0.2, 1e-2, 1e-3, 1e-4];

/** Only ωexe carries a minus (Herzberg 1950). */
const sign = (k: number) => (k === 1 ? -1 : 1);

/** The number of constants in play: as asked, and never fewer than the highest one named by `fixed`. */
function termsOf({ terms, fixed }: ModelOptions): number {
  const named = Object.keys(fixed).map((key) => constants.findIndex((c) => c.key === key) + 1);
  return Math.max(terms ?? oscillator.terms!.default, ...named);
}

function parameters(options: ModelOptions): Parameter[] {
  return constants.slice(0, termsOf(options)).map(({ key, unit, symbol }, k) => {
    const fixed = options.fixed[key];
    const base = { key, unit, symbol: symbol.equilibrium, start: 0, typical: TYPICAL[k]! };
    if (fixed === undefined) return base;
    if (fixed.sigma === null) return { ...base, held: fixed.value };
    return { ...base, prior: { value: fixed.value, sigma: fixed.sigma } };
  });
}

function levels(label: string): { upper: number; lower: number } {
  const read = readVibrationalLabel(label);
  if (read === null) throw new RangeError(`not a label: ${label}`);
  return read;
}

/** ±(v+½)^k, k = 1 … terms, or its derivative of that order by v: the derivatives of G(v) with respect to the constants. */
function powers(v: number, terms: number, order = 0): number[] {
  const x = v + 0.5;
  const row = new Array<number>(terms);
  let power = 1;
  for (let k = 0; k < terms; k++) {
    const exponent = k + 1 - order;
    if (exponent > 0) power *= x;
    row[k] = exponent < 0 ? 0 : sign(k) * falling(k + 1, order) * (exponent === 0 ? 1 : power);
  }
  return row;
}

/** n·(n-1)·…, `order` factors. */
function falling(n: number, order: number): number {
  let product = 1;
  for (let d = 0; d < order; d++) product *= n - d;
  return product;
}

function well(p: readonly number[]): Well {
  const terms = p.length;
  /** Coefficients of rising powers of v + ½, of G and of its derivatives. */
  const polynomials = [[0, ...p.map((constant, k) => sign(k) * constant)]];
  for (let order = 1; order <= 2; order++)
    polynomials.push(polynomials[order - 1]!.slice(1).map((coefficient, k) => coefficient * (k + 1)));
  const sum = (order: number) => {
    const coefficients = polynomials[order]!;
    return (v: number) => {
      let total = 0;
      for (let k = coefficients.length - 1; k >= 0; k--) total = total * (v + 0.5) + coefficients[k]!;
      return total;
    };
  };
  return {
    term: sum(0),
    slope: sum(1),
    curvature: sum(2),
    termGradient: (v) => powers(v, terms),
    slopeGradient: (v) => powers(v, terms, 1),
    curvatureGradient: (v) => powers(v, terms, 2),
    leading: [0, 1],
  };
}

/**
 * One oscillator: G(v) = ωe(v+½) - ωexe(v+½)² + ωeye(v+½)³ + ωeze(v+½)⁴ + … cm-1 (Dunham 1932; signs as in Herzberg);
 * two constants are exactly the Morse oscillator (Morse 1929). A band v'-v" lies at G(v') - G(v").
 */
export const oscillator: Model = {
  name: "oscillator",
  title: "a single anharmonic oscillator",
  labelForm: `v'-v" with v' > v", such as 1-0, 3-0 or 2-1`,
  references: ["dunham1932", "herzberg1950"],
  terms: { least: 2, most: 6, default: 2 },
  constants,
  check: (series) =>
    series.bands.flatMap((band) => {
      const fault = vibrationalLabelFault(band);
      return fault === null ? [] : [fault];
    }),
  prepare(transitions, options) {
    const all = parameters(options);
    const jacobian = transitions.map(({ label }) => {
      const { upper, lower } = levels(label);
      const row = powers(upper, all.length);
      const low = powers(lower, all.length);
      for (let k = 0; k < row.length; k++) row[k]! -= low[k]!;
      return row;
    });
    return {
      parameters: all,
      linear: true,
      evaluate: (p) => ({
        calculated: jacobian.map((row) => row.reduce((total, x, k) => total + x * p[k]!, 0)),
        jacobian,
      }),
    };
  },
  labels: (upTo) => Array.from({ length: upTo }, (_, v) => `${v + 1}-0`),
  levels,
  well,
};
