import fc from "fast-check";
import { describe, expect, it } from "vitest";
import {
  type EmpiricalError,
  empiricalError,
  type NoReference,
} from "../../../src/analysis/empirical/empirical-error.ts";
import { LEAST_OF_CLASS } from "../../../src/analysis/empirical/match-wells.ts";
import { ratioAt } from "../../../src/analysis/empirical/ratio-at.ts";
import type { ReferenceWell, WellClass } from "../../../src/analysis/empirical/reference-well.ts";

/** A well whose fits are wrong by the same ratio wherever they end. */
const well = (name: string, ratio: number, kind: WellClass = "other", atoms = ["C", "O"]): ReferenceWell => ({
  name,
  atoms: atoms as [string, string],
  class: kind,
  fits: {
    2: [
      [0.05, ratio],
      [0.95, ratio],
    ],
  },
});

const told = (answer: EmpiricalError | NoReference): EmpiricalError => {
  if ("reason" in answer) throw new Error(answer.reason);
  return answer;
};

const ask = { terms: 2, topEnergy: 10000, fittedD0: 30000, bond: { atoms: ["1H", "35Cl"] as const } };

describe("the range from reference wells", () => {
  it("is the Student prediction range of the logarithms, for ratios 1, 2, 4", () => {
    const { references, correctedRange, errorRange } = told(
      empiricalError(ask, [well("a", 1), well("b", 2), well("c", 4)]),
    );
    // t = 1.885618 (80 %, 2 degrees of freedom, tables), s = ln 2: half = 1.885618·0.6931472·√(4/3) = 1.509206
    const [low, high] = [2 * Math.exp(-1.509206), 2 * Math.exp(1.509206)];
    expect(references).toBe(3);
    // t was typed with seven digits: 1e-6 of 20000/low
    expect(Math.abs(correctedRange[0] - (10000 + 20000 / high))).toBeLessThan(0.05);
    expect(Math.abs(correctedRange[1] - (10000 + 20000 / low))).toBeLessThan(0.05);
    // an identity; rounding
    expect(errorRange[0] * correctedRange[1]).toBeCloseTo(30000, 6);
    expect(errorRange[1] * correctedRange[0]).toBeCloseTo(30000, 6);
  });

  it("names the fraction that the middle of its own range leads to, also where wells or a class drop out on the way", () => {
    fc.assert(
      fc.property(
        fc.double({ min: 0.01, max: 0.99, noNaN: true }),
        fc.integer({ min: 2, max: 6 }),
        fc.constantFrom(null, { atoms: ["1H", "1H"] as const }, { atoms: ["16O", "16O"] as const }),
        (fraction, terms, bond) => {
          const answer = empiricalError({ terms, topEnergy: 30000 * fraction, fittedD0: 30000, bond });
          if ("reason" in answer) return true;
          const [low, high] = answer.correctedRange;
          // settled to 5e-4, the step at which the search ends
          return Math.abs(answer.covered - (30000 * fraction) / ((low + high) / 2)) < 5e-4;
        },
      ),
      { seed: 5, numRuns: 2000 },
    );
  });

  it("lies above the highest observed level, whatever is asked", () => {
    fc.assert(
      fc.property(
        fc.double({ min: 100, max: 50000, noNaN: true }),
        fc.double({ min: 1.0001, max: 40, noNaN: true }),
        fc.integer({ min: 2, max: 6 }),
        fc.constantFrom(null, { atoms: ["1H", "1H"] as const }, { atoms: ["16O", "16O"] as const }),
        (topEnergy, factor, terms, bond) => {
          const answer = empiricalError({ terms, topEnergy, fittedD0: topEnergy * factor, bond });
          if ("reason" in answer) return answer.reason.length > 0;
          const ranges = [answer.correctedRange, answer.overall.correctedRange];
          return ranges.every(([low, high]) => low > topEnergy && high > low) && answer.covered < 1;
        },
      ),
      { seed: 5, numRuns: 500 },
    );
  });

  it("scales with the energies", () => {
    fc.assert(
      fc.property(fc.double({ min: 0.01, max: 100, noNaN: true }), (scale) => {
        const plain = told(empiricalError(ask));
        const scaled = told(empiricalError({ ...ask, topEnergy: 10000 * scale, fittedD0: 30000 * scale }));
        // rounding of a few dozen operations
        return plain.correctedRange.every((x, i) => Math.abs((scaled.correctedRange[i]! / x / scale - 1) * 1e9) < 1);
      }),
      { seed: 5 },
    );
  });
});

describe("which wells count", () => {
  const hydrides = Array.from({ length: LEAST_OF_CLASS }, (_, i) => well(`h${i}`, 1 + i / 10, "hydride", ["H", "X"]));
  const others = [well("a", 1.5), well("b", 1.6), well("c", 1.7)];

  it("those of the user's class where there are enough, beside all of them", () => {
    const answer = told(empiricalError(ask, [...hydrides, ...others]));
    expect(answer.class).toBe("hydride");
    expect(answer.references).toBe(LEAST_OF_CLASS);
    expect(answer.overall.references).toBe(LEAST_OF_CLASS + 3);
  });

  it("all of them where the class has too few, or where the bond is not known", () => {
    expect(told(empiricalError(ask, [...hydrides.slice(1), ...others])).class).toBe("all");
    expect(told(empiricalError({ ...ask, bond: null }, [...hydrides, ...others])).class).toBe("all");
    expect(told(empiricalError({ ...ask, bond: { atoms: null } }, [...hydrides, ...others])).class).toBe("all");
  });

  it.each([[["1H", "35Cl"]], [["37Cl", "D"]], [["Cl", "T"]], [["2H", "Cl"]]])(
    "not the molecule of the bond %j nor its isotopologues",
    (atoms) => {
      const own = well("HCl", 3, "hydride", ["Cl", "H"]);
      const bond = { atoms: atoms as [string, string] };
      expect(told(empiricalError({ ...ask, bond }, [own, ...others])).references).toBe(3);
    },
  );

  it("H2+ is left out for H-H, since the bond cannot tell it from H2", () => {
    const h2 = { terms: 2, topEnergy: 8087, fittedD0: 38899 };
    const without = told(empiricalError({ ...h2, bond: { atoms: ["1H", "1H"] } }));
    const withBoth = told(empiricalError({ ...h2, bond: { atoms: ["1H", "32S"] } }));
    expect(withBoth.references - without.references).toBe(2);
  });
});

describe("no answer", () => {
  it("no reference at this coverage: says how many wells reach it and how many are needed", () => {
    const answer = empiricalError(ask, [well("a", 1.5), well("b", 1.6)]);
    expect(answer).toEqual({
      reason: "no reference at this coverage: 2 of 2 wells reach 33 % of their D0 with 2 terms, 3 are needed",
    });
  });

  it("no reference far below the lowest fits, and none just under the limit", () => {
    expect(empiricalError({ ...ask, topEnergy: 100 })).toHaveProperty("reason");
    expect(empiricalError({ ...ask, topEnergy: 29999 })).toHaveProperty("reason");
  });

  it("a fitted D0 below the highest observed level has no extrapolated part", () => {
    expect(empiricalError({ ...ask, topEnergy: 31000 })).toHaveProperty("reason");
  });
});

describe("the ratio of one well", () => {
  const fits = [
    [0.2, 1.1],
    [0.4, 1.5],
  ] as const;

  it("is linear between its fits", () => expect(ratioAt(fits, 0.3)).toBeCloseTo(1.3, 12)); // rounding

  it("stays that of the nearest fit a little outside, and ends there", () => {
    expect(ratioAt(fits, 0.16)).toBe(1.1);
    expect(ratioAt(fits, 0.14)).toBeNull();
    expect(ratioAt(fits, 0.41)).toBe(1.5);
    expect(ratioAt(fits, 0.43)).toBeNull();
    expect(ratioAt([[0.06, 1.2]], 0.029)).toBeNull();
    expect(ratioAt([], 0.3)).toBeNull();
  });
});
