import { describe, expect, it } from "vitest";
import { toSeries } from "../../src/bands/index.ts";
import { flags, ofBands, understand } from "./read.ts";

const one = (bands: string, options: Readonly<Record<string, string>> = {}) =>
  toSeries(ofBands(bands), flags(options)).series[0]!;
const codes = (series: { warnings: readonly { code: string }[] }) => series.warnings.map(({ code }) => code);

/** Rounding of double arithmetic in a handful of operations. */
const ROUNDING = 1e-12;

describe("positions become wavenumbers in vacuum", () => {
  it.each([
    // 1e7/λ by definition
    ["3-0 1000 nm", 10000],
    ["3-0 1 um", 10000],
    // exact value of c: 299792458 m/s
    ["1-0 86.3 THz", 86.3 / 0.0299792458],
    ["1-0 86300 GHz", 86.3 / 0.0299792458],
    // h·c/e in eV cm, exact constants of the SI: 1.239841984332…e-4
    ["1-0 0.35 eV", 0.35 / ((6.62607015e-34 * 29979245800) / 1.602176634e-19)],
    // h·c·N_A in J cm/mol
    ["1-0 34.5 kJ/mol", 34500 / (6.62607015e-34 * 29979245800 * 6.02214076e23)],
  ])("%s", (text, wavenumber) => {
    expect(Math.abs(one(text).bands[0]!.position / wavenumber - 1)).toBeLessThan(ROUNDING);
  });

  it.each([
    // COMPUTED by an independent calculation with Ciddor's formula, printed to 0.001 cm-1; made-up positions
    ["3-0 970.056(10)", 10305.857, 0.106],
    ["4-0 745.286(10)", 13413.973, 0.18],
    ["5-0 611.031(10)", 16361.253, 0.268],
    ["6-0 522.111(15)", 19147.684, 0.55],
  ])("%s nm in air", (text, wavenumber, sigma) => {
    const [band] = one(`${text} nm air`).bands;
    // half of the last digit printed
    expect(Math.abs(band!.position - wavenumber)).toBeLessThan(0.0005 + 1e-9);
    expect(Math.abs(band!.sigma! - sigma)).toBeLessThan(0.0005 + 1e-9);
  });

  it("unit and medium of a row beat those of the request; air does nothing to wavenumbers", () => {
    const { bands } = one("1-0 2885.98 cm-1, 3-0 1000 vacuum, 4-0 745.286", { unit: "nm", medium: "air" });
    expect(bands.map((band) => band.asRead.medium)).toEqual(["vacuum", "vacuum", "air"]);
    expect(bands.slice(0, 2).map((band) => band.position)).toEqual([2885.98, 10000]);
    expect(Math.abs(bands[2]!.position - 13413.973)).toBeLessThan(0.0005 + 1e-9);
  });

  it("warmer air lowers the wavenumber read: 25 °C by 0.13 cm-1 at 700 nm", () => {
    // (n - 1) = 2.76e-4 falls by the ratio of temperatures, 10/298: 14286·2.76e-4·0.0335 = 0.132
    const change = (air: string) => one("5-0 700 nm", { medium: "air", air }).bands[0]!.position;
    expect(Math.abs(change("25 C") - change("15 C") - 0.132)).toBeLessThan(0.002);
  });

  it("air wavelengths beyond 1690 nm carry a warning that names them, others none", () => {
    const far = one("1-0 3400 nm, 2-0 1691 nm, 3-0 1198 nm", { medium: "air" });
    expect(far.warnings).toMatchObject([{ code: "air-range-extended" }]);
    expect(far.warnings[0]!.message).toMatch(/^1-0, 2-0: beyond 1690 nm/);
    expect(one("1-0 3400 nm").warnings).toEqual([]);
  });
});

describe("uncertainties become standard ones in cm-1", () => {
  it("0.1 nm is 0.087 cm-1 at 3400 nm and 2.04 at 700 nm", () => {
    const { bands } = one("1-0 3400 nm, 5-0 700 nm", { sigma: "0.1" });
    // 1e7·0.1/λ²
    expect(Math.abs(bands[0]!.sigma! / (1e6 / 3400 ** 2) - 1)).toBeLessThan(ROUNDING);
    expect(Math.abs(bands[1]!.sigma! / (1e6 / 700 ** 2) - 1)).toBeLessThan(ROUNDING);
  });

  it("comes from the position, else the row, else the request", async () => {
    const text = "band,position,sigma,sigma_unit\n1-0,2885.98(2),,\n2-0,5000,0.1,nm\n3-0,8346.78,±0.5,\n4-0,10922,,\n";
    const { series } = await understand(text, { sigma: "0.7" });
    const expected = [0.02, (0.1 * 5000 ** 2) / 1e7, 0.5, 0.7];
    series[0]!.bands.forEach((band, i) => {
      expect(Math.abs(band.sigma! / expected[i]! - 1)).toBeLessThan(ROUNDING);
    });
  });

  it.each([
    // JCGM 100:2008: 4.3.7 (halfwidth of a rectangle, √3), 4.3.4 and table G.1 (95 %: 1.960)
    ["standard", 1],
    ["2sigma", 2],
    ["95", 1.959964],
    ["95%", 1.959964],
    ["halfwidth", Math.sqrt(3)],
  ])("--sigma-means %s divides ±, the column and --sigma by its factor, and leaves parentheses", (means, factor) => {
    const { bands } = one("1-0 2885.98±0.06, 2-0 5667.98, 3-0 8346.78(6)", { "sigma-means": means, sigma: "0.06" });
    // the factor of 95 % is given to seven digits
    expect(Math.abs((bands[0]!.sigma! * factor) / 0.06 - 1)).toBeLessThan(1e-7);
    expect(Math.abs((bands[1]!.sigma! * factor) / 0.06 - 1)).toBeLessThan(1e-7);
    expect(Math.abs(bands[2]!.sigma! / 0.06 - 1)).toBeLessThan(ROUNDING);
  });

  it("warns when --sigma-means meets uncertainties in parentheses", () => {
    expect(codes(one("1-0 2885.98(2)", { "sigma-means": "2sigma" }))).toEqual(["sigma-means-not-applied"]);
    expect(codes(one("1-0 2885.98(2)", { "sigma-means": "standard" }))).toEqual([]);
    expect(codes(one("1-0 2885.98±0.02", { "sigma-means": "2sigma" }))).toEqual([]);
  });

  it("warns when some used bands have σ and others have none; unused ones do not count", async () => {
    const text = "band,position,use\n1-0,2885.98(2),\n2-0,5667.98,\n3-0,8346.78,no\n";
    const partly = await understand(text);
    expect(codes(partly.series[0]!)).toEqual(["sigma-partly-missing"]);
    expect(partly.series[0]!.warnings[0]!.message).toMatch(/^2-0 carries no σ/);
    expect(partly.series[0]!.bands.map((band) => band.sigma)).toEqual([expect.any(Number), null, null]);
    expect(codes((await understand(text.replace("5667.98", "5667.98(2)"))).series[0]!)).toEqual([]);
  });

  it("a shared offset in nm has one negative entry a band, -s·ν̃²/1e7; in cm-1 it is the same everywhere", () => {
    const bands = "1-0 3000, 2-0 6000";
    const inNm = one(bands, { "shared-sigma": "0.01 nm" }).shared[0]!.parts;
    // s·ν̃²/1e7: 0.009 and 0.036
    expect(Math.abs(inNm[0]! / -0.009 - 1)).toBeLessThan(ROUNDING);
    expect(Math.abs(inNm[1]! / -0.036 - 1)).toBeLessThan(ROUNDING);
    expect(one(bands, { "shared-sigma": "0.02" }).shared.map(({ parts }) => parts)).toEqual([[0.02, 0.02]]);
    expect(one(bands).shared).toEqual([]);
  });

  it("a bare shared offset is in the unit of the request", () => {
    const [offset] = one("3-0 1000", { unit: "nm", "shared-sigma": "0.01" }).shared[0]!.parts;
    expect(Math.abs(offset! / -0.1 - 1)).toBeLessThan(ROUNDING);
  });
});

describe("rows become series", () => {
  it("splits by the column series in order of appearance, and names by it, --name, the bond or nothing", async () => {
    const text = "band,position,series\n1-0,3599.83,b\n1-0,3527.37,a\n2-0,7034.69,b\n";
    const { series } = await understand(text, { name: "ignored" });
    expect(series.map(({ name, bands }) => [name, bands.map((band) => band.position)])).toEqual([
      ["b", [3599.83, 7034.69]],
      ["a", [3527.37]],
    ]);
    expect(one("1-0 5", { name: "my bond", bond: "1H 35Cl" }).name).toBe("my bond");
    expect(one("1-0 5", { bond: "1H 35Cl" }).name).toBe("1H 35Cl");
    expect(one("1-0 5").name).toBe("oscillator");
  });

  it("the bond is that of the rows if they agree, else the one of the request", async () => {
    const text = "band,position,isotopologue\n1-0,2885.98,1H 35Cl\n2-0,5667.98,1H 35Cl\n";
    const [agreed] = (await understand(text, { bond: "1H 37Cl" })).series;
    expect(agreed!.bond!.text).toBe("1H 35Cl");
    expect(codes(agreed!)).toEqual(["bond-differs"]);
    const [mixed] = (await understand(text.replace("5667.98,1H 35Cl", "5663.93,1H 37Cl"), { bond: "D Cl" })).series;
    expect(mixed!.bond!.text).toBe("D Cl");
    expect(mixed!.bands.map((band) => band.isotopologue!.text)).toEqual(["1H 35Cl", "1H 37Cl"]);
    expect(one("1-0 5", { "reduced-mass": "0.98" }).bond).toMatchObject({ atoms: null, reducedMass: 0.98 });
  });

  it("bands not to use, companions, groups and notes are kept", async () => {
    const text =
      "band,position,unit,use,companion,ratio,group,note,phase\n3-0,1000,nm,NO,1250,6.7,laser,weak,gas\n1-0,3527,,Yes,,,,,\n";
    const [dark, bright] = (await understand(text)).series[0]!.bands;
    expect(dark).toMatchObject({
      use: false,
      twoLevels: { companion: 8000, ratio: 6.7 },
      group: "laser",
      note: "weak",
      phase: "gas",
    });
    expect(bright).toMatchObject({ use: true, twoLevels: null, group: null, note: null, phase: null });
  });

  it("the same band twice within five combined σ is a repeated measurement, and said", () => {
    // 0.07 apart, five combined σ are 5·0.01·√2 = 0.0707
    const repeated = one("1-0 2885.90(1), 1-0 2885.97(1)");
    expect(repeated.warnings).toMatchObject([{ code: "repeated-measurements", about: "1-0" }]);
    expect(repeated.bands).toHaveLength(2);
  });

  it("the same label of two isotopologues, or of a band not used, is no repeat", async () => {
    const text = "band,position,isotopologue,use\n1-0,2885.98,1H 35Cl,\n1-0,2883.89,1H 37Cl,\n1-0,2880,1H 37Cl,no\n";
    expect((await understand(text)).series[0]!.warnings).toEqual([]);
  });

  it("--spacings subtracted marks the series", () => {
    expect(one("1-0 5, 2-1 4", { spacings: "subtracted" }).subtracted).toBe(true);
    expect(one("1-0 5, 2-1 4", { spacings: "measured" }).subtracted).toBe(false);
    expect(one("1-0 5, 2-1 4").subtracted).toBe(false);
  });

  it("a band of another phase may stand there unused", async () => {
    const text = "band,position,phase,use\n1-0,2885.9,gas,\n1-0,2830,liquid,no\n";
    expect((await understand(text)).series[0]!.bands.map((band) => band.phase)).toEqual(["gas", "liquid"]);
  });

  it("the same band in two phases is fine in two series", async () => {
    const text = "band,position,phase,series\n1-0,2885.9,gas,g\n1-0,2830,liquid,l\n";
    expect((await understand(text)).series).toHaveLength(2);
  });
});
