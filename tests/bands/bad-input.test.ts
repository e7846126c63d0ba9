import { describe, expect, it } from "vitest";
import { faultsOf, understand } from "./read.ts";

type Case = [what: string, text: string, code: string, message: string];

/** Each text holds one thing wrong; the message names place, fault and mend. */
const csv: Case[] = [
  [
    "text in a number",
    "band,position\n1-0,2885.98\n2-0,28x5.9\n",
    "position",
    'bands.csv:3 position: "28x5.9" is not a number; write a value such as 2885.9 or 2885.98(2)',
  ],
  [
    "a quoted decimal comma",
    'band,position\n1-0,"2885,98"\n',
    "position",
    'bands.csv:2 position: "2885,98" has a decimal comma; write 2885.98',
  ],
  [
    "a decimal comma that makes a row longer",
    "band,position,sigma\n1-0,2885,98,0.02\n",
    "too-many-cells",
    'bands.csv:2 position: "2885,98" makes the row longer than its header; decimals take a point: write 2885.98',
  ],
  ["a negative position", "band,position\n1-0,-3\n", "position-not-positive", '"-3" is not a positive position'],
  ["a position of zero", "band,position\n1-0,0.0\n", "position-not-positive", '"0.0" is not a positive position'],
  ["an infinite position", "band,position\n1-0,inf\n", "position", '"inf" is not a finite number'],
  ["a position beyond all numbers", "band,position\n1-0,1e999\n", "position", '"1e999" is not a finite number'],
  ["NaN", "band,position\n1-0,NaN\n", "position", '"NaN" is not a finite number'],
  ["a row without a position", "band,position\n1-0,\n", "no-position", "bands.csv:2 position: has no position"],
  ["a row without a label", "band,position\n,2885\n", "no-label", "bands.csv:2 band: has no label"],
  ["one level of two", "upper,lower,position\n1,,2885\n", "no-label", "bands.csv:2 lower: has no lower level"],
  [
    "a label and levels that differ",
    "band,upper,lower,position\n1-0,2,0,2885\n",
    "labels-differ",
    "give the label once",
  ],
  [
    "a unit inside the position",
    "band,position\n3-0,970.056 nm\n",
    "position",
    "write 970.056, and nm in the column unit",
  ],
  [
    "an unknown unit",
    "band,position,unit\n1-0,3465,cn-1\n",
    "unknown-unit",
    'bands.csv:2 unit: "cn-1" is not a unit (did you mean cm-1?); write one of cm-1, nm, um',
  ],
  ["an unknown medium", "band,position,medium\n1-0,3465,water\n", "unknown-medium", "write vacuum or air"],
  [
    "air beside a wavenumber in one row",
    "band,position,unit,medium\n1-0,2885,cm-1,air\n",
    "air-without-wavelength",
    "bands.csv:2 medium: air stands beside a position in cm-1",
  ],
  [
    "an air wavelength below 230 nm",
    "band,position,unit,medium\n9-0,229.9,nm,air\n",
    "air-below-230-nm",
    "229.9 nm in air lies below 230 nm, where the dispersion of air is not known; give the vacuum wavelength",
  ],
  [
    "an unknown isotope",
    "band,position,isotopologue\n1-0,2885,1H 36Cl\n",
    "bond",
    'bands.csv:2 isotopologue: "36Cl" is not in the table of isotopes; Cl has 35Cl, 37Cl',
  ],
  ["σ of zero", "band,position,sigma\n1-0,2885,0\n", "sigma-not-positive", "bands.csv:2 sigma: an uncertainty of 0"],
  ["a negative σ", "band,position,sigma\n1-0,2885,-0.1\n", "sigma-not-positive", "is not positive"],
  ["σ of zero in parentheses", "band,position\n1-0,2885.98(0)\n", "position", "is zero"],
  ["text for σ", "band,position,sigma\n1-0,2885,small\n", "sigma", '"small" is not a number'],
  ["σ with an uncertainty", "band,position,sigma\n1-0,2885,0.02(1)\n", "sigma", "carries one itself"],
  ["σ given twice", "band,position,sigma\n1-0,2885.98(2),0.05\n", "sigma-twice", "give it once"],
  [
    "σ in two units",
    "band,position,sigma,sigma_unit\n1-0,2885,0.1 nm,cm-1\n",
    "sigma-units-differ",
    "the uncertainty is in nm and in cm-1",
  ],
  ["use that is no answer", "band,position,use\n1-0,2885,maybe\n", "use", '"maybe" is neither yes nor no'],
  ["a ratio of zero", "band,position,companion,ratio\n1-0,2885,2900,0\n", "ratio", "is not a positive intensity ratio"],
  [
    "a companion where the band stands",
    "band,position,companion\n1-0,2885,2885.0\n",
    "companion-equals-band",
    "weaker",
  ],
  [
    "the same band twice without σ",
    "# a comment\nband,position\n1-0,2885.9\n2-0,5667.9\n1-0,2885.8\n",
    "band-twice",
    "bands.csv:5 band: 1-0 stands here and at bands.csv:3; mend a label, mark one of them use: no, or give both a σ",
  ],
  [
    "the same band twice, further apart than five σ",
    "band,position\n1-0,2885.90(1)\n1-0,2886.00(1)\n",
    "band-twice",
    "bands.csv:3 band: 1-0 stands here and at bands.csv:2, and the values differ by more than 5 σ",
  ],
  [
    "the same band in two spellings",
    "band,position\n1-0,2885.9\n1 − 0,2885.9\n",
    "band-twice",
    "1-0 stands here and at bands.csv:2",
  ],
  [
    "two phases in one series",
    "band,position,phase\n1-0,2885.9,gas\n2-0,5660,liquid\n",
    "phases-mixed",
    'bands.csv:3 phase: 2-0 is of phase "liquid", 1-0 (bands.csv:2) of "gas"; fit one phase at a time',
  ],
  ["no band to use", "band,position,use\n1-0,2885.9,no\n", "no-used-bands", "every band is marked use: no"],
  [
    "a fault in one of several series",
    "band,position,series\n1-0,2885.9,HCl\n1-0,26x,HBr\n",
    "position",
    'bands.csv:3 position: series "HBr": "26x" is not a number',
  ],
  [
    "an unknown column",
    "band,position,sigam\n1-0,2885,0.1\n",
    "unknown-column",
    'bands.csv:1: there is no column "sigam" (did you mean sigma?); the columns are band, upper, lower',
  ],
  [
    "a unit in the header",
    "band,position,sigma (nm)\n3-0,970,0.1\n",
    "unknown-column",
    'there is no column "sigma (nm)" (did you mean sigma?); write sigma, and the unit in a line above',
  ],
  [
    "a column under another word of the trade",
    "band,position,error\n1-0,2885,0.1\n",
    "unknown-column",
    "(did you mean sigma?)",
  ],
  ["a column twice", "band,position,position\n1-0,1,2\n", "column-twice", 'has the column "position" twice'],
  ["a table without positions", "band,sigma\n1-0,0.1\n", "no-position", "bands.csv:1: has no column position"],
  ["a table without labels", "position,sigma\n2885,0.1\n", "no-label", "add a column band (1-0, 2-0 …), or upper and"],
  ["no header", "1-0,2885.98\n2-0,5667.98\n", "no-header", 'bands.csv:1: "1-0,2885.98" is no header; begin the table'],
  ["semicolons", "band;position\n1-0;2885,98\n", "wrong-separator", "separated by semicolons; separate them by commas"],
  ["tabs in a .csv", "band\tposition\n1-0\t2885.98\n", "wrong-separator", "say --format tsv"],
  ["a row longer than the header", "band,position\n1-0,2885.9,why\n", "too-many-cells", "has 3 cells under 2 columns"],
  ["a quote that does not close", 'band,position,note\n1-0,2885.9,"open\n', "csv-form", "do not close"],
  ["a header without rows", "# c\nband,position\n\n", "no-rows", "bands.csv:2: has a header but no bands; write one"],
  ["an empty file", " \r\n", "empty-file", "bands.csv: is empty; write a header such as band,position"],
  ["comments alone", "# nothing here\n", "no-header", "bands.csv: has no header"],
  ["a binary file", "band,position\n1-0\u0000,2885\n", "not-text", "bands.csv:2: is not a text file in UTF-8; save it"],
  ["bytes that are no UTF-8", "band,position\n\n1-0,2885\uFFFD0.1\n", "not-text", "bands.csv:3: is not a text file"],
  [
    "a setting one slip away",
    "# comment: fine\n# bnod: also fine, two slips\n# units: nm\nband,position\n1-0,2885\n",
    "unknown-setting",
    'bands.csv:3: there is no setting "units"; write unit, or take the colon away if it is a comment',
  ],
  [
    "a setting twice",
    "# unit: nm\n# unit: um\nband,position\n1-0,3465\n",
    "setting-twice",
    'bands.csv:2: "unit" stands here and at bands.csv:1; write it once',
  ],
];

describe("what is wrong with a table is said with its place and its mend, and nothing else is", () => {
  it.each(csv)("CSV: %s", async (_, text, code, message) => {
    const faults = await faultsOf(() => understand(text));
    expect(faults.map((fault) => fault.code)).toEqual([code]);
    expect(faults[0]!.text).toContain(message);
  });

  it("a column under another name is missing as well", async () => {
    const faults = await faultsOf(() => understand("label,position (nm)\n1-0,970\n"));
    expect(faults.map(({ code }) => code)).toEqual(["unknown-column", "unknown-column", "no-position", "no-label"]);
    expect(faults[0]!.text).toContain("did you mean band?");
    expect(faults[1]!.text).toContain('write position, and the unit in a line above the header, such as "# unit: nm"');
  });

  it("lists everything wrong together, in the order of the file", async () => {
    const text = "band,position,unit,use\n1-0,x,cm-1,yes\n2-0,5667,furlong,yes\n3-0,8346,cm-1,perhaps\n";
    const faults = await faultsOf(() => understand(text, { medium: "argon" }));
    expect(faults.map(({ code }) => code)).toEqual(["unknown-medium", "position", "unknown-unit", "use"]);
  });
});
