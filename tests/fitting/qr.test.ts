import { inverse, Matrix, QrDecomposition } from "ml-matrix";
import { describe, expect, it } from "vitest";
import { inverseGram, triangularise } from "../../src/fitting/index.ts";
import { normal, seeded } from "./random.ts";

const augmented = (a: number[][], b: number[]) => Float64Array.from(a.flatMap((row, i) => [...row, b[i]!]));

describe("least squares by QR", () => {
  it("agrees with the QR of ml-matrix on random systems", () => {
    const next = normal(seeded(7));
    for (let trial = 0; trial < 50; trial++) {
      const rows = 3 + (trial % 8);
      const columns = 1 + (trial % 3);
      const a = Array.from({ length: rows }, () => Array.from({ length: columns }, next));
      const b = Array.from({ length: rows }, next);
      const own = triangularise({ rows, columns, augmented: augmented(a, b) });
      const theirs = new QrDecomposition(new Matrix(a)).solve(Matrix.columnVector(b)).to1DArray();
      const gram = inverse(new Matrix(a).transpose().mmul(new Matrix(a))).to2DArray();
      // both are backward stable; random matrices of this size have condition numbers below 1e3
      theirs.forEach((x, k) => {
        expect(Math.abs(own.solution[k]! - x)).toBeLessThan(1e-11 * (1 + Math.abs(x)));
      });
      inverseGram(own).forEach((row, i) => {
        row.forEach((c, j) => {
          expect(Math.abs(c - gram[i]![j]!)).toBeLessThan(1e-9 * Math.max(1, Math.abs(gram[i]![i]!)));
        });
      });
    }
  });

  it("keeps ten digits of a six-term polynomial in v + ½ up to v = 40", () => {
    const truth = [2170, -13.3, 1e-2, 7e-5, 1.5e-7, 2e-9];
    const x = Array.from({ length: 40 }, (_, v) => v + 1.5);
    const a = x.map((xi) => truth.map((_, k) => xi ** (k + 1)));
    const b = x.map((xi) => truth.reduce((sum, c, k) => sum + c * xi ** (k + 1), 0));
    const { solution } = triangularise({ rows: 40, columns: 6, augmented: augmented(a, b) });
    // rounding of b (1e-16 of 7e4) over the size of each term at the far end
    solution.forEach((c, k) => {
      expect(Math.abs(c - truth[k]!) * 40 ** (k + 1)).toBeLessThan(1e-5);
    });
  });

  it("names the first column that depends on those before it", () => {
    const a = [
      [1, 2, 2],
      [2, 4, 1],
      [3, 6, 5],
    ];
    expect(triangularise({ rows: 3, columns: 3, augmented: augmented(a, [1, 2, 3]) }).dependent).toBe(1);
  });

  it("refuses fewer rows than columns", () => {
    expect(() => triangularise({ rows: 1, columns: 2, augmented: new Float64Array(3) })).toThrow(RangeError);
  });
});
