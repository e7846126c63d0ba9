import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { niceTicks, paddedRange, scatteredTicks, tickText } from "../../../src/reporting/figures/ticks.ts";

describe("ticks", () => {
  it("stand at multiples of 1, 2 or 5 times a power of ten, inside the range, equally spaced", () => {
    fc.assert(
      fc.property(
        fc.double({ min: -1e5, max: 1e5, noNaN: true }),
        fc.double({ min: 1e-3, max: 1e5, noNaN: true }),
        fc.integer({ min: 2, max: 10 }),
        (low, span, wanted) => {
          const { values, step, decimals } = niceTicks(low, low + span, wanted);
          expect([1, 2, 5]).toContain(Math.round(step / 10 ** Math.floor(Math.log10(step) + 1e-9)));
          for (const value of values) {
            // the range may be exceeded by a rounding of a billionth of a step, so that an end tick is kept
            expect(value).toBeGreaterThanOrEqual(low - 1e-8 * step);
            expect(value).toBeLessThanOrEqual(low + span + 1e-8 * step);
            expect(Number(value.toFixed(decimals))).toBe(value);
          }
        },
      ),
      { seed: 5, numRuns: 300 },
    );
  });

  it("are exact decimals: 0.3 and not 0.1 + 0.2", () => {
    expect(niceTicks(0, 0.5, 5).values).toEqual([0, 0.1, 0.2, 0.3, 0.4, 0.5]);
  });

  it("of quantum numbers are whole", () => {
    expect(niceTicks(0.4, 3.6, 10, 1).values).toEqual([1, 2, 3]);
  });

  it("are printed with equal decimals, a true minus and no thousands separators", () => {
    expect(tickText(-12345.6, 1)).toBe("−12345.6");
    expect(tickText(-0.001, 1)).toBe("0.0");
    expect(tickText(40000, 0)).toBe("40000");
  });

  it("of a wavelength axis keep apart", () => {
    const place = (nm: number) => 1e7 / nm;
    const chosen = scatteredTicks([400, 5000], place, 2000)
      .map(place)
      .sort((a, b) => a - b);
    expect(chosen.length).toBeGreaterThan(4);
    chosen.slice(1).forEach((at, i) => expect(at - chosen[i]!).toBeGreaterThanOrEqual(2000));
  });

  it("a range is padded so that no point sits on the frame, also for one value", () => {
    const [low, high] = paddedRange([3, 7]);
    expect(low).toBeLessThan(3);
    expect(high).toBeGreaterThan(7);
    const [a, b] = paddedRange([5, 5, 5]);
    expect(a).toBeLessThan(5);
    expect(b).toBeGreaterThan(5);
  });
});
