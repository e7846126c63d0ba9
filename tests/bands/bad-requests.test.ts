import { describe, expect, it } from "vitest";
import { toSeries } from "../../src/bands/index.ts";
import { faultsOf, flags, ofBands, ofSeries, understand } from "./read.ts";

const settings: [name: string, value: string, code: string, message: string][] = [
  ["unit", "parsec", "unknown-unit", '--unit: "parsec" is not a unit'],
  ["medium", "argon", "unknown-medium", '--medium: "argon" is not a medium; write vacuum or air'],
  ["air", "25 apples", "air-conditions", "--air:"],
  ["sigma", "0", "sigma-not-positive", "--sigma: an uncertainty of 0 is not positive"],
  ["sigma", "0,1", "sigma", "decimal comma"],
  ["shared-sigma", "-1 nm", "sigma-not-positive", "--shared-sigma:"],
  ["sigma-means", "3sigma", "sigma-means", "write standard, 2sigma, 95 or halfwidth"],
  ["spacings", "differences", "spacings", "write measured or subtracted"],
  ["bond", "1H 99Cl", "bond", '--bond: "99Cl" is not in the table'],
  ["reduced-mass", "0", "reduced-mass", "--reduced-mass:"],
];

const ofFlags: [what: string, work: () => unknown, code: string, message: string][] = [
  [
    "--series of falling positions",
    () => ofSeries("2885.98 2782.00 2678.8"),
    "series-falls",
    '--series: overtones rise in energy, but 2782.00 follows 2885.98; for spacings or other labels write --bands "1-0 2885.98, 2-1 2782.00 …"',
  ],
  ["--series of one position twice", () => ofSeries("2885.98 2885.98"), "series-falls", "rise in energy"],
  [
    "--series of rising wavelengths",
    () => ofSeries("3465 1764 1780", { unit: "nm" }),
    "series-falls",
    "1780 follows 1764",
  ],
  [
    "decimal commas in --series",
    () => ofSeries("2885,98 5667,98"),
    "decimal-comma",
    '"2885,98" has a decimal comma; w',
  ],
  ["decimal commas beside points", () => ofSeries("2885,98±0.02"), "decimal-comma", "write 2885.98"],
  [
    "whole numbers held together by commas, which could be either",
    () => ofSeries("2886,5668"),
    "decimal-comma",
    "write 2886.5668 (or 2886, 5668, if the comma separates)",
  ],
  ["a unit among the positions", () => ofSeries("970.0 nm 745.3 nm"), "unit-in-series", "write --unit nm, which holds"],
  ["an empty --series", () => ofSeries(" , "), "no-bands", "--series: holds no positions"],
  ["--from zero", () => ofSeries("5 6", { from: "0" }), "from", '--from: "0" is not a level'],
  ["--from text", () => ofSeries("5 6", { from: "two" }), "from", '"two" is not a level; write the upper level'],
  [
    "text in --series",
    () => toSeries(ofSeries("2885.98 56x7"), new Map()),
    "position",
    '--series 2-0: "56x7" is not a number',
  ],
  ["decimal commas in --bands", () => ofBands("1-0 2885,98, 2-0 5667,98"), "decimal-comma", "write 2885.98"],
  ["a position without a label", () => ofBands("1-0 2885.98, 5667.98"), "no-label", '"5667.98" has no label before'],
  ["a wavelength without a label", () => ofBands("970.056 nm"), "no-label", '"970.056 nm" has no label before'],
  ["a label without a position", () => ofBands("1-0 2885.98, 2–0"), "no-position", '"2–0" has no position'],
  ["an empty --bands", () => ofBands(";"), "no-bands", "--bands: holds no bands; write them as in --bands"],
  [
    "an unknown unit in --bands",
    () => toSeries(ofBands("3-0 970.056 nn"), new Map()),
    "unknown-unit",
    '--bands 3-0: "nn" is not a unit',
  ],
];

const toml: [what: string, text: string, code: string, message: string][] = [
  ["a slip of TOML", 'bond = "HCl"\nunit = = 2\n', "toml-form", "bands.toml:2 column 8: is not TOML"],
  ["a decimal comma", "series = [1]\nsigma = 0,1\n", "toml-form", "bands.toml:2"],
  [
    "an unknown setting",
    'bnod = "HCl"\nseries = [2885.98]\n',
    "unknown-setting",
    'bands.toml:1 bnod: there is no "bnod" (did you mean bond?); the names are series, from',
  ],
  [
    "an unknown column",
    '[[bands]]\nband = "1-0"\npositon = 2885\n',
    "unknown-setting",
    'bands.toml:1 positon: there is no "positon" (did you mean position?)',
  ],
  ["a table for a setting", '[bond]\natoms = "HCl"\n', "not-text-or-number", '"bond" is neither text nor a number'],
  ["a date for a name", "name = 1979-05-27\n", "not-text-or-number", '"name" is neither text nor a number'],
  ["two spellings of a setting", 'sigma-means = "95"\nsigma_means = "95"\n', "setting-twice", "bands.toml:2"],
  ["a file that says nothing", "# nothing\n", "no-rows", "bands.toml: holds no bands; write series"],
  ["a series without bands", '[[series]]\nname = "a"\n', "no-rows", "bands.toml:1: holds no bands"],
  [
    "a faulty row",
    '# c\n[[bands]]\nband = "1-0"\nposition = 2885.98\n\n[[bands]]\nband = "2-0"\nposition = -1\n',
    "position-not-positive",
    'bands.toml:6 position: "-1" is not a positive position',
  ],
  ["NaN", '[[bands]]\nband = "1-0"\nposition = nan\n', "position", '"NaN" is not a finite number'],
];

describe("what is wrong with flags or TOML is said with its place and its mend, and nothing else is", () => {
  it.each(toml)("TOML: %s", async (_, text, code, message) => {
    const faults = await faultsOf(() => understand(text, {}, "toml"));
    expect(faults.map((fault) => fault.code)).toEqual([code]);
    expect(faults[0]!.text).toContain(message);
  });

  it.each(settings)("--%s %s", async (name, value, code, message) => {
    const faults = await faultsOf(() => toSeries(ofBands("1-0 2885.98"), flags({ [name]: value })));
    expect(faults.map((fault) => fault.code)).toEqual([code]);
    expect(faults[0]!.text).toContain(message);
  });

  it.each(ofFlags)("%s", async (_, work, code, message) => {
    const faults = await faultsOf(work);
    expect(faults.map((fault) => fault.code)).toEqual([code]);
    expect(faults[0]!.text).toContain(message);
  });

  it("a bond and a reduced mass in one place are one too many", async () => {
    const both = flags({ bond: "1H 35Cl", "reduced-mass": "0.98" });
    expect(await faultsOf(() => toSeries(ofBands("1-0 2885.98"), both))).toMatchObject([{ code: "bond-twice" }]);
  });
});
