import { describe, expect, it } from "vitest";
import { groupDigits, holdUnits, verbatim } from "../../src/reporting/markdown/typeset.ts";
import { bandDecimals } from "../../src/reporting/text/band-decimals.ts";
import { bondText } from "../../src/reporting/text/bond-text.ts";
import { ends, exact, fixed, measured, probability, size, statistic } from "../../src/reporting/text/cells.ts";
import { printUnits, quotient } from "../../src/reporting/text/units.ts";

describe("numbers as text", () => {
  it.each([
    [measured(-1.23, 3.4), "−1.2(3.4)"],
    [measured(null, null), "—"],
    [fixed(-0.001, 2), "0.00"],
    [fixed(null, 2), "—"],
    [size(0.0995), "0.10"],
    [size(2.34), "2.3"],
    [size(123.4), "123"],
    [statistic(758.7), "758.70"],
    [statistic(7268.4), "7268"],
    [probability(0.2914), "0.29"],
    [probability(0.0123), "0.012"],
    [probability(1e-9), "< 0.0001"],
    [probability(null), "—"],
    [exact(0.22), "0.22"],
    [exact(-83.4), "−83.4"],
  ])("%s is written %s", (written, expected) => expect(written).toBe(expected));

  it("ends intervals where the uncertainty ends", () => {
    const q = { value: 52.8186, standardUncertainty: 0.0753, interval95: [51.86, 53.77] as const, unit: "cm-1" };
    expect(ends(q, q.interval95)).toEqual(["51.860", "53.770"]);
    expect(ends(q, null)).toBeNull();
  });
});

describe("decimals of a band", () => {
  const band = { observed: 14285.7, standardUncertainty: null } as Parameters<typeof bandDecimals>[0];
  const asRead = (text: string, unit: string) => ({ text, unit, medium: "vacuum" as const, sigmaText: null });

  it("are those typed, for cm-1", () => expect(bandDecimals({ ...band, asRead: asRead("14285.714", "cm-1") })).toBe(3));
  // 0.01 nm at 700 nm is 0.2 cm-1: one decimal
  it("are carried over from nm", () => expect(bandDecimals({ ...band, asRead: asRead("700.00", "nm") })).toBe(1));
  it("are those of the uncertainty where there is one", () =>
    expect(bandDecimals({ ...band, standardUncertainty: 0.02, asRead: asRead("14285.7", "cm-1") })).toBe(3));
});

describe("units and symbols", () => {
  it("puts products of units in parentheses under a quotient", () => {
    expect(quotient("D0", "kJ/mol")).toBe("D0 / (kJ mol⁻¹)");
    expect(quotient("ωe", "cm-1")).toBe("ωe / cm⁻¹");
  });
  it("prints cm-1 after a number and leaves what a user types", () =>
    expect(printUnits("τ = 0.6 cm-1; give --unit cm-1")).toBe("τ = 0.6 cm⁻¹; give --unit cm-1"));
  it("raises mass numbers of two isotopes and leaves other texts", () => {
    expect(bondText("1H 35Cl")).toBe("¹H³⁵Cl");
    expect(bondText("reduced mass 0.98")).toBe("reduced mass 0.98");
  });
});

describe("Markdown text", () => {
  it.each([
    ["46510(150)", "46\u202f510(150)"],
    ["1234.56(12)", "1234.56(12)"],
    ["0.1972345(72)", "0.197\u202f234\u202f5(72)"],
    ["−123456.5", "−123\u202f456.5"],
    ["100.02147(35)", "100.021\u202f47(35)"],
  ])("groups the digits of %s by three from five on", (plain, grouped) => expect(groupDigits(plain)).toBe(grouped));

  it("holds number and unit together", () =>
    expect(holdUnits("43 kJ mol⁻¹, 2.5(3) cm-1, 95 % × 10⁻⁵")).toBe(
      "43\u00a0kJ\u00a0mol⁻¹, 2.5(3)\u00a0cm⁻¹, 95\u00a0%\u00a0×\u00a010⁻⁵",
    ));

  it("shows text from outside as it is", () =>
    expect(verbatim("a|b *c* <d> `e`\n# f_g")).toBe(String.raw`a\|b \*c\* \<d\> \`e\` # f\_g`));
});
