import { describe, expect, it } from "vitest";
import { formatOf, mergeSettings, readInput, toSeries } from "../../src/bands/index.ts";
import { flags, ofBands, ofSeries, understand } from "./read.ts";

const cells = (rows: readonly { cells: object }[]) => rows.map((row) => row.cells);

describe("CSV and TSV", () => {
  it("rows keep the true line of the file, comments, empty lines and quoted line breaks counted", async () => {
    const text =
      '# c\r\n\r\nBand,POSITION,Note\r\n1-0,2885.98,"two\r\nlines"\r\n# c\r\n,,\r\n2-0,5667.98\r\n3-0,8346.78';
    const { rows } = await readInput(text, "b.csv", "csv");
    expect(rows.map(({ place }) => place)).toEqual([4, 8, 9].map((line) => ({ source: "b.csv", line })));
    expect(rows[0]!.cells).toEqual({ band: "1-0", position: "2885.98", note: "two\nlines" });
  });

  it("a byte-order mark, any line ending and either separator make no difference", async () => {
    const lines = ["# bond: 1H 35Cl", "band,position,sigma", "1-0,2885.98,0.02", "2-0,5667.98,0.02", ""];
    const plain = await readInput(lines.join("\n"), "b", "csv");
    for (const ending of ["\r\n", "\r"])
      expect(await readInput(`\uFEFF${lines.join(ending)}`, "b", "csv")).toEqual(plain);
    expect(await readInput(lines.join("\n").replaceAll(",", "\t"), "b", "tsv")).toEqual(plain);
  });

  it("# begins a comment at the start of a line or cell and after a space, not inside a label or quotes", async () => {
    const text = 'band,position,note\n1-0,2885,a # c\n210E#2,3000,# c\n# 2-0,1,1\n3-0,8346,"a # b" # c\n';
    const { rows } = await readInput(text, "b.csv", "csv");
    expect(cells(rows)).toEqual([
      { band: "1-0", position: "2885", note: "a" },
      { band: "210E#2", position: "3000" },
      { band: "3-0", position: "8346", note: "a # b" },
    ]);
  });

  it("pairs above the header are settings with their line; other words before a colon are comments", async () => {
    const text =
      "# Source: a paper\n## Reduced_Mass : 0.98 # u\n#unit:nm\n# name:\nband,position\n# medium: air\n1-0,3465\n";
    const { settings } = await readInput(text, "b.csv", "csv");
    expect([...settings]).toEqual([
      ["reduced-mass", { value: "0.98", place: { source: "b.csv", line: 2 } }],
      ["unit", { value: "nm", place: { source: "b.csv", line: 3 } }],
    ]);
  });

  it("a file of settings alone may hold its bands in one of them", async () => {
    const { settings, rows } = await readInput("# series: 2885.98 5667.98\n", "b.csv", "csv");
    expect(settings.get("series")!.value).toBe("2885.98 5667.98");
    expect(rows).toEqual([]);
  });

  it("cells missing at the end of a row are empty", async () => {
    const { rows } = await readInput("band,position,sigma,note\n1-0,2885\n", "b.csv", "csv");
    expect(cells(rows)).toEqual([{ band: "1-0", position: "2885" }]);
  });
});

describe("TOML", () => {
  it("holds settings as text, numbers and lists, and tables of bands with their lines", async () => {
    const text = [
      "# c",
      'bond = "1H 35Cl"',
      "sigma = 0.05",
      'sigma_means = "95"',
      "",
      "[[bands]]",
      'band = "1-0"',
      "position = 2885.98",
      "[[bands]]",
      "upper = 2",
      "lower = 0",
      'position = "5667.98(2)"',
      "use = false",
    ].join("\n");
    const { settings, rows } = await readInput(text, "b.toml", "toml");
    expect([...settings].map(([name, { value, place }]) => [name, value, place.line])).toEqual([
      ["bond", "1H 35Cl", 2],
      ["sigma", "0.05", 3],
      ["sigma-means", "95", 4],
    ]);
    expect(rows).toEqual([
      { cells: { band: "1-0", position: "2885.98" }, place: { source: "b.toml", line: 6 } },
      { cells: { upper: "2", lower: "0", position: "5667.98(2)", use: "no" }, place: { source: "b.toml", line: 9 } },
    ]);
  });

  it("a list of numbers is a series, a list of words are bands", async () => {
    const { settings } = await readInput("series = [2885.98, 5667.98]\n", "b.toml", "toml");
    expect(settings.get("series")!.value).toBe("2885.98 5667.98");
    const bands = (await readInput('bands = ["1-0 2885.98", "2-1 2782"]\n', "b.toml", "toml")).settings.get("bands")!;
    expect(cells(ofBands(bands.value))).toEqual([
      { band: "1-0", position: "2885.98" },
      { band: "2-1", position: "2782" },
    ]);
  });

  it("tables of series hold a name, a bond and bands in any of three forms", async () => {
    const text = [
      "[[series]]",
      'name = "a"',
      'bond = "1H 35Cl"',
      "series = [2885.98, 5667.98]",
      "[[series]]",
      'name = "b"',
      'unit = "nm"',
      'bands = "3-0 993.985(10), 4-0 764.998(10)"',
      "[[series]]",
      "[[series.bands]]",
      'band = "1-0"',
      "position = 3527.37",
    ].join("\n");
    const { series } = await understand(text, {}, "toml");
    expect(series.map(({ name, bond, bands }) => [name, bond?.text ?? null, bands.map((b) => b.label)])).toEqual([
      ["a", "1H 35Cl", ["1-0", "2-0"]],
      ["b", null, ["3-0", "4-0"]],
      ["series 3", null, ["1-0"]],
    ]);
    expect(series[1]!.bands[0]!.asRead.unit).toBe("nm");
    expect(series[2]!.bands[0]!.place).toEqual({ source: "bands.toml", line: 10 });
  });
});

describe("--series and --bands", () => {
  it.each([
    "2885.98 5667.98 8346.78",
    "2885.98, 5667.98, 8346.78",
    "2885.98,5667.98;8346.78",
    " 2885.98;\n5667.98  8346.78 ",
  ])("--series %j are three overtones", (text) => {
    expect(cells(ofSeries(text))).toEqual([
      { band: "1-0", position: "2885.98" },
      { band: "2-0", position: "5667.98" },
      { band: "3-0", position: "8346.78" },
    ]);
  });

  it("--from names the first upper level", () => {
    expect(ofSeries("8346.78 10922.8", { from: "3" }).map((row) => row.cells.band)).toEqual(["3-0", "4-0"]);
  });

  it("wavelengths of rising overtones fall", () => {
    expect(ofSeries("3465 1764 1198", { unit: "nm" })).toHaveLength(3);
  });

  it("uncertainties may stand apart from their values", () => {
    expect(cells(ofSeries("2885.98 ± 0.02, 5667.98 (3); 8346.78 +/- 0.1"))).toEqual([
      { band: "1-0", position: "2885.98±0.02" },
      { band: "2-0", position: "5667.98(3)" },
      { band: "3-0", position: "8346.78+/-0.1" },
    ]);
  });

  it("--bands takes labels of several words, units, media and any separator", () => {
    const text =
      "1-0 2885.98(2), 3-0 970.056(10) nm air;20+ from 10- 3700.1\n2-0 67.8 kJ mol-1,4-0 745.3nm, 2–1 2782 ± 0.5 vacuum";
    expect(cells(ofBands(text))).toEqual([
      { band: "1-0", position: "2885.98(2)" },
      { band: "3-0", position: "970.056(10)", unit: "nm", medium: "air" },
      { band: "20+ from 10-", position: "3700.1" },
      { band: "2-0", position: "67.8", unit: "kJ/mol" },
      { band: "4-0", position: "745.3", unit: "nm" },
      { band: "2–1", position: "2782±0.5", medium: "vacuum" },
    ]);
  });

  it("a comma without a space may separate bands, also after whole numbers", () => {
    expect(cells(ofBands("1-0 2886,2-0 5668"))).toEqual([
      { band: "1-0", position: "2886" },
      { band: "2-0", position: "5668" },
    ]);
  });
});

describe("settings and formats", () => {
  it("flags beat the file, also by another name for the same thing", () => {
    const file = flags({ bond: "1H 35Cl", unit: "nm", series: "1 2" });
    const merged = mergeSettings(flags({ "reduced-mass": "0.98", unit: "um", bands: "1-0 5" }), file);
    expect([...merged].map(([name, { value }]) => [name, value])).toEqual([
      ["unit", "um"],
      ["reduced-mass", "0.98"],
      ["bands", "1-0 5"],
    ]);
  });

  it.each([
    ["a/b.csv", "csv"],
    ["B.TSV", "tsv"],
    ["x.y.toml", "toml"],
    ["csv", null],
    ["a.txt", null],
  ])("%s is read as %s", (name, format) => {
    expect(formatOf(name)).toBe(format);
  });

  it("what stood in the input is kept as typed", async () => {
    const [series] = toSeries(ofBands("3-0 970.056(10) nm air, 1-0 2885.90"), flags({ sigma: "0.1 nm" })).series;
    expect(series!.bands.map((band) => band.asRead)).toEqual([
      { text: "970.056(10)", unit: "nm", medium: "air", sigmaText: "0.01" },
      { text: "2885.90", unit: "cm-1", medium: "vacuum", sigmaText: "0.1 nm" },
    ]);
  });
});
