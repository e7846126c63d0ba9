import { describe, expect, it } from "vitest";
import { fit } from "../../src/commands/fit.ts";
import type { FitRequest } from "../../src/commands/request.ts";
import { formatFault, InputError } from "../../src/messages/index.ts";

const csv = (text: string): FitRequest => ({ input: { text, source: "bands.csv", format: "csv" } });
const good = "1-0,2885.98\n2-0,5667.98\n3-0,8346.78\n";

async function refused(request: FitRequest): Promise<InputError> {
  try {
    await fit(request);
  } catch (error) {
    if (error instanceof InputError) return error;
    throw error;
  }
  throw new Error("it was accepted");
}

/** what is given, the codes of its faults, and what the message must hold */
const cases: [string, FitRequest, string[], string[]][] = [
  ["an empty file", csv(""), ["empty-file"], ["bands.csv: is empty", "header"]],
  ["blank lines only", csv("\n \n"), ["empty-file"], []],
  ["comments only", csv("# nothing here\n"), ["no-header"], ["header"]],
  ["a header without rows", csv("band,position\n"), ["no-rows"], ["bands.csv:1", "no bands"]],
  ["a header without position", csv("band,wavenumber\n1-0,2885\n"), ["unknown-column", "no-position"], ["bands.csv:1"]],
  ["a header without labels", csv("position\n2885\n"), ["no-label"], ["column band"]],
  ["a misspelt column", csv("band,positon\n1-0,2885\n"), ["unknown-column", "no-position"], ["did you mean position"]],
  [
    "text in a number",
    csv("# head\nband,position\n1-0,2885.98\n2-0,56x7.9\n"),
    ["position"],
    ['bands.csv:4 position: "56x7.9" is not a number; write a value such as'],
  ],
  [
    "a negative position",
    csv("band,position\n1-0,-2885\n2-0,5667\n"),
    ["position-not-positive"],
    ["bands.csv:2 position"],
  ],
  ["a position of zero", csv("band,position\n1-0,0\n2-0,5667\n"), ["position-not-positive"], ["bands.csv:2"]],
  ["an infinite position", csv("band,position\n1-0,Infinity\n2-0,5667\n"), ["position"], ["not a finite number"]],
  ["NaN", csv("band,position\n1-0,NaN\n2-0,5667\n"), ["position"], ["not a finite number"]],
  [
    "an empty position",
    csv("band,position,sigma\n1-0,,0.1\n2-0,5667,0.1\n"),
    ["no-position"],
    ["bands.csv:2 position"],
  ],
  [
    "upper below lower",
    csv("band,position\n0-1,2885\n2-0,5667\n"),
    ["upper-not-above-lower"],
    ["bands.csv:2 band", "write 1-0"],
  ],
  [
    "upper equal to lower",
    csv("upper,lower,position\n1,1,2885\n2,0,5667\n"),
    ["upper-not-above-lower"],
    ["bands.csv:2"],
  ],
  [
    "a label that is none",
    csv("band,position\nfundamental,2885\n2-0,5667\n"),
    ["label"],
    ['"fundamental" is not a label', "1-0"],
  ],
  [
    "the same band twice without σ",
    csv("band,position\n1-0,2885\n2-0,5667\n1-0,2885.2\n"),
    ["band-twice"],
    ["bands.csv:4", "bands.csv:2"],
  ],
  [
    "the same band twice, more than 5 σ apart",
    csv("band,position\n1-0,2885.0(1)\n2-0,5667.0(1)\n1-0,2887.0(1)\n"),
    ["band-twice"],
    ["more than 5 σ"],
  ],
  [
    "an unknown unit",
    { series: "1 2 3", unit: "nanometres" },
    ["unknown-unit"],
    ['"nanometres" is not a unit', "cm-1, nm"],
  ],
  [
    "an unknown unit in a row",
    csv("band,position,unit\n1-0,2885,cm\n2-0,5667,cm-1\n"),
    ["unknown-unit"],
    ["bands.csv:2 unit", "did you mean cm-1"],
  ],
  ["an unknown isotope", { series: "2885 5667 8346", bond: "1H 36Cl" }, ["bond"], ["35Cl", "37Cl"]],
  ["an unknown element", { series: "2885 5667 8346", bond: "1H 35Xx" }, ["bond"], ["Xx"]],
  [
    "an unknown model",
    { series: "2885 5667 8346", model: "oscilator" },
    ["unknown-model"],
    ["did you mean oscillator"],
  ],
  [
    "an air wavelength below 230 nm",
    { bands: "1-0 221.5 nm, 2-0 210 nm", medium: "air" },
    ["air-below-230-nm", "air-below-230-nm"],
    ["230 nm", "vacuum"],
  ],
  ["σ of zero", { series: "2885 5667 8346", sigma: 0 }, ["sigma-not-positive"], ["--sigma"]],
  [
    "a negative σ in a row",
    csv("band,position,sigma\n1-0,2885,-1\n2-0,5667,1\n"),
    ["sigma-not-positive"],
    ["bands.csv:2 sigma"],
  ],
  ["a decimal comma in --series", { series: "2885,98 5667,98" }, ["decimal-comma"], ["write 2885.98"]],
  ["a decimal comma in --bands", { bands: "1-0 2885,98; 2-0 5667,98" }, ["decimal-comma"], ["write 2885.98"]],
  [
    "a decimal comma in a quoted cell",
    csv('band,position\n1-0,"2885,98"\n2-0,5667\n'),
    ["position"],
    ["decimal comma", "2885.98"],
  ],
  [
    "an unquoted decimal comma",
    csv("band,position\n1-0,2885,98\n2-0,5667\n"),
    ["too-many-cells"],
    ["bands.csv:2", "decimals take a point"],
  ],
  [
    "overtones that fall",
    { series: "2885.98 2782.0 2678.8" },
    ["series-falls"],
    ['--bands "1-0 2885.98, 2-1 2782.0 …"'],
  ],
  [
    "different phases in one series",
    csv("band,position,phase\n1-0,2885,gas\n2-0,5667,liquid\n"),
    ["phases-mixed"],
    ["bands.csv:3", "bands.csv:2"],
  ],
  ["a binary file", csv("band\u0000,position"), ["not-text"], ["UTF-8"]],
  ["bytes that are no UTF-8", csv("band,position\n1-0,2885\uFFFD\n"), ["not-text"], ["UTF-8"]],
  ["no bands at all", {}, ["no-bands"], ["--series", "--bands", "FILE"]],
  ["bands given twice", { ...csv(`band,position\n${good}`), series: "1 2 3" }, ["bands-twice"], ["give them once"]],
  [
    "two series of which one is faulty",
    csv("series,band,position\na,1-0,2885\na,2-0,5667\nb,1-0,36x\nb,2-0,7000\n"),
    ["position"],
    ['series "b"', "bands.csv:4"],
  ],
  [
    "use that is neither",
    csv("band,position,use\n1-0,2885,maybe\n2-0,5667,yes\n"),
    ["use"],
    ["bands.csv:2 use", "yes or no"],
  ],
  ["every band unused", csv("band,position,use\n1-0,2885,no\n2-0,5667,no\n"), ["no-used-bands"], []],
  ["terms out of range", { series: "2885 5667 8346", terms: 7 }, ["out-of-range"], ["2 to 6"]],
  ["terms that are no number", { series: "2885 5667 8346", terms: "two" }, ["not-a-number"], ["--terms"]],
  ["an unknown constant to hold", { series: "2885 5667 8346", fix: "wx=3" }, ["unknown-constant"], ["wexe"]],
  [
    "an unknown excess treatment",
    { series: "2885 5667 8346", excess: "inflate" },
    ["unknown-choice"],
    ["scatter or birge or none"],
  ],
  ["an accepted D0 that is no number", { series: "2885 5667 8346", accepted: "big" }, ["not-a-number"], ["35759(5)"]],
  ["an accepted D0 of zero", { series: "2885 5667 8346", accepted: 0 }, ["out-of-range"], ["positive"]],
  ["an accepted D0 as a wavelength", { series: "2885 5667 8346", accepted: "280 nm" }, ["unknown-unit"], ["eV"]],
  ["a coverage above one", { series: "2885 5667 8346", coverage: 95 }, ["out-of-range"], ["between 0 and 1"]],
  [
    "a companion where the band is",
    csv("band,position,companion\n1-0,2885,2885\n2-0,5667,\n"),
    ["companion-equals-band"],
    ["bands.csv:2"],
  ],
  [
    "a ratio that is not positive",
    csv("band,position,companion,ratio\n1-0,2885,2880,0\n2-0,5667,,\n"),
    ["ratio"],
    ["bands.csv:2 ratio"],
  ],
  [
    "a setting one slip from a known one",
    csv(`# sigme: 0.1\nband,position\n${good}`),
    ["unknown-setting"],
    ["bands.csv:1", "write sigma"],
  ],
  [
    "TOML that is none",
    { input: { text: 'series = "1 2', source: "b.toml", format: "toml" } },
    ["toml-form"],
    ["b.toml:1"],
  ],
  [
    "an unknown key in TOML",
    { input: { text: 'serie = "1 2"', source: "b.toml", format: "toml" } },
    ["unknown-setting"],
    ["did you mean series"],
  ],
];

describe("bad input", () => {
  it.each(cases)("%s: exit 2 with place and mend", async (_, request, codes, parts) => {
    const error = await refused(request);
    expect(error.exit).toBe(2);
    expect(error.faults.map(({ code }) => code)).toEqual(codes);
    const text = error.faults.map(formatFault).join("\n");
    for (const part of parts) expect(text).toContain(part);
    for (const fault of error.faults) {
      expect(fault.mend.length).toBeGreaterThan(5);
      expect(fault.mend).not.toMatch(/undefined|NaN|\[object/);
    }
  });

  it("shows several independent faults together", async () => {
    const { faults } = await refused({ ...csv("band,position\n1-0,x\n2-0,y\n"), excess: "inflate", terms: 9 });
    expect(faults.map(({ code }) => code).sort()).toEqual(["out-of-range", "position", "position", "unknown-choice"]);
  });

  it("fewer bands than constants: exit 3 with what is needed", async () => {
    for (const request of [
      { series: "2885" },
      { series: "2885 5667 8346", terms: 4 },
      csv("band,position\n1-0,2885.0(1)\n1-0,2885.1(1)\n"),
    ]) {
      const error = await refused(request);
      expect(error.exit).toBe(3);
      expect(error.faults[0]!.code).toBe("not-determined");
      expect(formatFault(error.faults[0]!)).toMatch(/give at least \d different bands/);
    }
  });

  it("bands that differ but leave a constant open: exit 3 and names it", async () => {
    // 1-0 and 1-0 of a hot ladder alone cannot tell more than one slope
    const error = await refused({ bands: "1-0 2885, 2-0 5667, 2-1 2782", terms: 3 });
    expect(error.exit).toBe(3);
    expect(error.faults[0]!.mend).toContain("ωeye");
  });
});

describe("input that is odd but right", () => {
  const plain = { series: "2885.98 5667.98 8346.78" };
  const constantsOf = async (request: FitRequest) =>
    Object.values((await fit(request)).series[0]!.constants).map(({ value }) => value);

  it.each([
    ["BOM and CRLF", csv(`\uFEFFband,position\r\n${good.replaceAll("\n", "\r\n")}`)],
    ["dashes and minus signs in labels", csv("Band,Position\n1–0,2885.98\n2−0,5667.98\n3 - 0,8346.78\n")],
    ["upper and lower columns", csv("upper,lower,position\n1,0,2885.98\n2,0,5667.98\n3,0,8346.78\n")],
    ["comments after values", csv(`band,position # in vacuum\n${good.replace("2885.98", "2885.98 # strong")}`)],
    [
      "TSV",
      { input: { text: "band\tposition\n1-0\t2885.98\n2-0\t5667.98\n3-0\t8346.78\n", source: "b.tsv", format: "tsv" } },
    ],
    ["TOML with a string", { input: { text: 'series = "2885.98 5667.98 8346.78"', source: "b.toml", format: "toml" } }],
    [
      "TOML with numbers",
      { input: { text: "series = [2885.98, 5667.98, 8346.78]", source: "b.toml", format: "toml" } },
    ],
    [
      "TOML with tables",
      {
        input: {
          text: ["1-0", "2-0", "3-0"]
            .map((band, i) => `[[bands]]\nband = "${band}"\nposition = ${[2885.98, 5667.98, 8346.78][i]}`)
            .join("\n"),
          source: "b.toml",
          format: "toml",
        },
      },
    ],
    ["semicolons and commas", { series: "2885.98; 5667.98,8346.78" }],
    ["labelled bands on lines", { bands: "1-0 2885.98\n2-0 5667.98\n3-0 8346.78" }],
    ["another order of rows", { bands: "3-0 8346.78, 1-0 2885.98, 2-0 5667.98" }],
  ] as [string, FitRequest][])("%s", async (_, request) => {
    const expected = await constantsOf(plain);
    const values = await constantsOf(request);
    // the same numbers up to the rounding of another order of sums
    values.forEach((value, k) => expect(Math.abs(value / expected[k]! - 1)).toBeLessThan(1e-12));
  });

  it("a band marked use: no is kept and shown but not fitted", async () => {
    const { series } = await fit(
      csv(`band,position,use,note\n${good.replace(/(\d)\n/g, "$1,yes,\n")}4-0,10950,no,misread\n`),
    );
    expect(series[0]!.quality.bands).toBe(3);
    const unused = series[0]!.bands[3]!;
    expect(unused).toMatchObject({ label: "4-0", used: false, note: "misread", studentizedResidual: null });
    expect(unused.residual).not.toBeNull();
  });

  it("repeated measurements that agree within 5 σ are taken as such, and it says so", async () => {
    const { series } = await fit({
      bands: "1-0 2885.98(2), 1-0 2885.99(3), 2-0 5667.98(2), 3-0 8346.78(5)",
      excess: "none",
    });
    expect(series[0]!.quality.bands).toBe(4);
    expect(series[0]!.warnings.map(({ code }) => code)).toContain("repeated-measurements");
  });

  it("σ on some bands only: treated as unknown for all, with a warning that names them", async () => {
    const { series } = await fit({ bands: "1-0 2885.98(2), 3-0 8346.78(5), 2-1 2782.0" });
    const warning = series[0]!.warnings.find(({ code }) => code === "sigma-partly-missing")!;
    expect(warning.message).toContain("2-1");
    expect(series[0]!.quality.chiSquare).toBeNull();
  });

  it("flags beat the file", async () => {
    const { series } = await fit({
      ...csv(`# bond: 1H 35Cl\n# terms: 3\nband,position\n${good}4-0,10922.8\n`),
      terms: 2,
    });
    expect(series[0]!.terms).toBe(2);
    expect(series[0]!.bond).toBe("1H 35Cl");
  });

  it("ωexe ≤ 0: the fit is shown, dissociation is null, and it says so", async () => {
    const { series } = await fit({ bands: "1-0 1000, 2-0 2010, 3-0 3030" });
    const { constants, dissociation, derived, warnings } = series[0]!;
    expect(constants.wexe!.value).toBeLessThan(0);
    expect(dissociation[0]!.d0).toBeNull();
    expect(dissociation[0]!.note).toContain("not positive");
    expect(derived!.highestLevel).toBeNull();
    expect(warnings.map(({ code }) => code)).toContain("wexe-not-positive");
  });

  it("exactly determined: without σ no uncertainty and no 0 or NaN; with σ uncertainties", async () => {
    const bare = (await fit({ series: "2885.98 5667.98" })).series[0]!;
    expect(bare.constants.we!.standardUncertainty).toBeNull();
    expect(bare.quality.standardDeviation).toBeNull();
    expect(bare.correlation).toBeNull();
    expect(bare.warnings.map(({ code }) => code)).toContain("exactly-determined");
    const stated = (await fit({ series: "2885.98 5667.98", sigma: 0.02 })).series[0]!;
    expect(stated.constants.we!.standardUncertainty).toBeGreaterThan(0);
    expect(JSON.stringify([bare, stated])).not.toMatch(/NaN|Infinity/);
  });
});
