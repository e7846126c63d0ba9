import fc from "fast-check";
import { describe, expect, test } from "vitest";
import { readMeasurement } from "../../src/quantity/index.ts";

const seeded = { seed: 20261202, numRuns: 500 };

describe("a number as written", () => {
  test.each([
    ["2885.98", 2885.98, null, 2],
    ["2885", 2885, null, 0],
    ["2885.", 2885, null, 0],
    [".5", 0.5, null, 1],
    ["1e4", 10000, null, 0],
    ["1.5e-3", 0.0015, null, 4],
    ["1.25E1", 12.5, null, 1],
    ["+3.0", 3, null, 1],
    ["-0.5", -0.5, null, 1],
    ["−0.5", -0.5, null, 1], // U+2212
    ["  7 ", 7, null, 0],
    ["2885.98(2)", 2885.98, 0.02, 2],
    ["2885.98 (2)", 2885.98, 0.02, 2],
    ["2885(12)", 2885, 12, 0],
    ["12.3(12)", 12.3, 1.2, 1], // digits count units of the last place
    ["12.3(1.2)", 12.3, 1.2, 1],
    ["2885.98(1.2)", 2885.98, 1.2, 2],
    ["1.234(5)e4", 12340, 50, 0],
    ["-1.234(5)e-4", -1.234e-4, 5e-7, 7],
    ["2885.98±0.02", 2885.98, 0.02, 2],
    ["2885.98+-0.02", 2885.98, 0.02, 2],
    ["2885.98 +/- 0.02", 2885.98, 0.02, 2],
    ["1.5e3±2e1", 1500, 20, 0],
    ["1.5e3 ± 20", 1500, 20, 0],
    ["5 ± 1e-3", 5, 0.001, 0],
  ])("%j is %d with uncertainty %d", (text, value, sigma, decimals) => {
    expect(readMeasurement(text)).toEqual({ ok: true, value, sigma, decimals });
  });
});

describe("a number that is refused says what is wrong and what to write", () => {
  test.each([
    ["28x5.9", '"28x5.9" is not a number', "write a value such as 2885.9 or 2885.98(2)"],
    ["", "the value is missing", "write a value such as 2885.9 or 2885.98(2)"],
    ["2885,98", '"2885,98" has a decimal comma', "write 2885.98"],
    ["2885,98(2)", '"2885,98(2)" has a decimal comma', "write 2885.98(2)"],
    ["2885,98 ± 0,02", '"2885,98 ± 0,02" has a decimal comma', "write 2885.98 ± 0.02"],
    ["2,885", '"2,885" has a decimal comma', "write 2.885 (or 2885, if thousands were meant)"],
    ["2,885.98", '"2,885.98" has separators of thousands', "write 2885.98"],
    ["2 885.98", '"2 885.98" has separators of thousands', "write 2885.98"],
    ["2 885,98", '"2 885,98" has separators of thousands', "write 2885.98"],
    ["2\u202f885.98", '"2\u202f885.98" has separators of thousands', "write 2885.98"],
    ["2885.979 65(4)", '"2885.979 65(4)" has spaces between digits', "write 2885.97965(4)"],
    ["NaN", '"NaN" is not a finite number', "write a value such as 2885.9"],
    ["-Infinity", '"-Infinity" is not a finite number', "write a value such as 2885.9"],
    ["1e999", '"1e999" is not a finite number', "write a value such as 2885.9"],
    ["2885.98(0)", 'the uncertainty of "2885.98(0)" is zero', "write a positive one such as 2885.98(2), or none"],
    ["5±0", 'the uncertainty of "5±0" is zero', "write a positive one such as 5(2), or none"],
    ["5±-1", 'the uncertainty of "5±-1" is negative', "write a positive one such as 5(2), or none"],
    ["5.1(-2)", 'the uncertainty of "5.1(-2)" is negative', "write a positive one such as 5.1(2), or none"],
    ["12(3", '"12(3" is not a number', "write a value such as 2885.9 or 2885.98(2)"],
    ["12()", '"12()" is not a number', "write a value such as 2885.9 or 2885.98(2)"],
    ["1 2", '"1 2" is not a number', "write a value such as 2885.9 or 2885.98(2)"],
    ["0x10", '"0x10" is not a number', "write a value such as 2885.9 or 2885.98(2)"],
    ["1e4(2)", '"1e4(2)" is not a number', "write a value such as 2885.9 or 2885.98(2)"],
  ])("%j", (text, what, mend) => {
    expect(readMeasurement(text)).toEqual({ ok: false, what, mend });
  });
});

test("every finite double is read back exactly from its own digits", () => {
  fc.assert(
    fc.property(fc.double({ noNaN: true, noDefaultInfinity: true }), (x) => {
      const read = readMeasurement(String(x));
      expect(read.ok && read.value + 0).toBe(x + 0); // −0 is written 0
    }),
    seeded,
  );
});

test("no text makes it throw, and what is accepted is finite with a positive uncertainty", () => {
  const piece = fc.constantFrom(..."0123456789.,()±+-−e/ xNa".split(""));
  fc.assert(
    fc.property(fc.string({ unit: piece, maxLength: 12 }), (text) => {
      const read = readMeasurement(text);
      if (!read.ok) return;
      expect(Number.isFinite(read.value)).toBe(true);
      expect(read.sigma === null || (read.sigma > 0 && Number.isFinite(read.sigma))).toBe(true);
      expect(read.decimals).toBeGreaterThanOrEqual(0);
    }),
    { ...seeded, numRuns: 5000 },
  );
});
