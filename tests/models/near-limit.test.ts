import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { findModel, type Model, type ModelOptions } from "../../src/models/index.ts";
import { limitSlope } from "../../src/models/near-limit/index.ts";

const model = (await findModel("near-limit")) as Model;
const told = (power: number, reducedMass: number | null): ModelOptions => ({
  terms: null,
  fixed: {},
  power,
  reducedMass,
});
const transition = (label: string) => ({ label, isotopologue: null });
/** E(v) above v = 0 */
const energy = (p: readonly number[], v: number, options: ModelOptions) =>
  model.prepare([transition(`${v}-0`)], options).evaluate(p).calculated[0]!;

describe("K_n of the law of LeRoy and Bernstein", () => {
  it.each([
    [3, 0.235335394],
    [5, 1.627805383],
    [6, 2.777034087],
  ])("n = %i, μ = 10 u, C_n = 1e5 cm-1 Åⁿ: %f (COMPUTED by quadrature of the action integral)", (power, value) => {
    // the printed digits end at 1e-9; the reference has another κ in its ninth digit
    expect(Math.abs(limitSlope(power, 1e5, 10) / value - 1)).toBeLessThan(1e-8);
  });

  it("dE/dv = K_n (D-E)^((n+2)/2n), for n from 3 to 8", () => {
    for (const power of [3, 4, 5, 6, 8]) {
      const options = told(power, 10);
      const p = [5000, 40.25, 1e5];
      const middle = energy(p, 31, options);
      // central difference over two levels, extrapolated from four: error of fifth order in 1/(v_D-v), below 2e-3 here
      const slope =
        (8 * (energy(p, 32, options) - energy(p, 30, options)) - (energy(p, 33, options) - energy(p, 29, options))) /
        12;
      const expected = limitSlope(power, 1e5, 10) * (5000 - middle) ** ((power + 2) / (2 * power));
      expect(Math.abs(slope / expected - 1)).toBeLessThan(2e-3);
    }
  });
});

describe("the model near-limit", () => {
  const law = fc.record({
    power: fc.constantFrom(3, 4, 5, 6, 8),
    mass: fc.constantFrom(null, 0.5, 10, 63.45),
    d: fc.double({ min: 1e3, max: 4e4, noNaN: true }),
    vd: fc.double({ min: 30.2, max: 60, noNaN: true }),
    hn: fc.double({ min: 0.1, max: 3, noNaN: true }),
  });

  it("has the derivatives of its own positions, bands between excited levels included", () => {
    fc.assert(
      fc.property(law, ({ power, mass, d, vd, hn }) => {
        const options = told(power, mass);
        const transitions = ["20-0", "28-0", "27-22"].map(transition);
        const third = model.starts!(
          [20, 24, 28].map((v) => transition(`${v}-0`)),
          [20, 24, 28].map((v) => 1e5 - (hn * (vd - v)) ** ((2 * power) / (power - 2))),
          { ...options, fixed: { d: { value: 1e5, sigma: null } } },
        )![2]!;
        const p = [d, vd, third];
        const { evaluate } = model.prepare(transitions, options);
        const { jacobian } = evaluate(p);
        p.forEach((x, k) => {
          const step = 1e-5 * (k === 1 ? vd - 28 : x);
          const at = (sign: number) => evaluate(p.map((y, j) => (j === k ? y + sign * step : y))).calculated;
          const [high, low] = [at(1), at(-1)];
          jacobian.forEach((row, i) => {
            // central difference: relative error below 1e-7, and a few roundings of the energies over the step
            const scale = 1e-6 * (Math.abs(row[k]!) + Math.abs(jacobian[0]![k]!));
            const largest = Math.max(...high.map(Math.abs), d);
            const rounding = (16 * Number.EPSILON * largest) / step;
            expect(Math.abs((high[i]! - low[i]!) / (2 * step) - row[k]!)).toBeLessThan(scale + rounding);
          });
        });
      }),
      { seed: 20261201, numRuns: 100 },
    );
  });

  it("finds first values without a guess: exact levels lead near their own law, and above the highest level", () => {
    fc.assert(
      fc.property(law, ({ power, vd, hn }) => {
        const levels = [22, 23, 24, 26, 28, 30];
        const limit = 1e8;
        const start = model.starts!(
          levels.map((v) => transition(`${v}-0`)),
          levels.map((v) => limit - (hn * (vd - v)) ** ((2 * power) / (power - 2))),
          told(power, null),
        )!;
        // first values only have to lie where the search goes downhill; the grid of limits has steps of 26 %
        expect(Math.abs(start[2]! / hn - 1)).toBeLessThan(0.5);
        expect(start[1]).toBeGreaterThan(30);
      }),
      { seed: 20261201, numRuns: 100 },
    );
  });

  it("has C_n as its third constant where masses are known, and H_n where they are not", () => {
    const keys = (mass: number | null) =>
      model.prepare([], told(5, mass)).parameters.map(({ key, unit }) => [key, unit]);
    expect(keys(63.45).at(-1)).toEqual(["cn", "cm-1 Å^5"]);
    expect(keys(null).at(-1)).toEqual(["hn", "(cm-1)^(3/10)"]);
  });
});
