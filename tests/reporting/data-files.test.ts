import { parse } from "csv-parse/sync";
import { describe, expect, it } from "vitest";
import { fit } from "../../src/commands/fit.ts";
import { findModel, modelNames } from "../../src/models/index.ts";
import { csvText } from "../../src/reporting/csv-text.ts";
import {
  bandsCsv,
  constantsCsv,
  formatReference,
  isReference,
  predictionsCsv,
  type ReferenceKey,
  references,
  renderJson,
} from "../../src/reporting/index.ts";
import { bare, compared, growing, local, sideBySide, threeBands } from "./documents.ts";

const cases = Object.entries({ sideBySide, compared, threeBands, bare, growing, local });
const rowsOf = (text: string) =>
  parse(text, { comment: "#", comment_no_infix: true, columns: true }) as Record<string, string>[];

describe("CSV files", () => {
  it.each(cases)("are ASCII in their numbers, name tool, version and input first (%s)", async (_, make) => {
    const document = await make();
    for (const text of [bandsCsv(document), constantsCsv(document), predictionsCsv(document)]) {
      const from = document.input === null ? "a request without a file" : `sha256 ${document.input.sha256}`;
      expect(text.split("\n")[0]).toMatch(`# written by rungwise ${document.tool.version} from`);
      expect(text.split("\n")[0]).toContain(from);
      expect(text).not.toMatch(/−|NaN|undefined|null/);
      expect(text.endsWith("\n")).toBe(true);
      expect(rowsOf(text).length).toBeGreaterThan(0);
    }
  });

  it("bands begin with the columns of the input", async () => {
    const head = bandsCsv(await sideBySide())
      .split("\n")
      .find((line) => !line.startsWith("#"));
    expect(head).toMatch(/^band,position,unit,medium,sigma,series,use,note,/);
  });

  it("hold every double exactly", async () => {
    const document = await sideBySide();
    const [a] = document.series;
    const band = rowsOf(bandsCsv(document))[3]!;
    expect(Number(band.position)).toBe(a!.bands[3]!.observed);
    expect(Number(band.residual)).toBe(a!.bands[3]!.residual);
    const constant = rowsOf(constantsCsv(document))[1]!;
    expect(Number(constant.value)).toBe(a!.constants.wexe!.value);
    expect(Number(constant.covariance_weye)).toBe(a!.covariance![1]![2]);
    const line = rowsOf(predictionsCsv(document))[0]!;
    expect(Number(line.air_wavelength_nm)).toBe(a!.predictions[0]!.airWavelength);
  });

  it("leave what is not determined empty", async () => {
    const [row] = rowsOf(constantsCsv(await bare()));
    expect(row).toMatchObject({ standard_uncertainty: "", interval95_low: "", held: "no" });
    expect(rowsOf(constantsCsv(await local())).at(-1)).toMatchObject({
      constant: "weye",
      held: "yes",
      covariance_we: "",
    });
  });

  it.each(cases)("give the same fit when the input columns of bands.csv are read again (%s)", async (_, make) => {
    const document = await make();
    const text = bandsCsv(document);
    const comments = text.split("\n").filter((line) => line.startsWith("#"));
    const columns = ["band", "position", "unit", "medium", "sigma", "series", "use", "note"];
    const table = csvText(
      [],
      columns,
      rowsOf(text).map((row) => columns.map((column) => row[column])),
    );
    const again = await fit({
      input: { text: `${comments.join("\n")}\n${table}`, source: "bands.csv", format: "csv" },
    });
    const numbers = (d: typeof document) => d.series.map((s) => [s.name, s.constants, s.dissociation, s.quality]);
    expect(numbers(again)).toEqual(numbers(document));
  });

  it("quote separators, quotes, comment signs and line breaks", () => {
    expect(csvText(["a\nb"], ["x"], [['1,"2"'], ["# 3"], ["4\n5"], [null], [-0.5]])).toBe(
      '# a b\nx\n"1,""2"""\n"# 3"\n"4\n5"\n\n-0.5\n',
    );
  });

  it("refuse numbers that are none", () => expect(() => csvText([], ["x"], [[Number.NaN]])).toThrow("NaN"));
});

describe("JSON", () => {
  it.each(cases)("comes back as the same document and ends in a newline (%s)", async (_, make) => {
    const document = await make();
    const text = renderJson(document);
    expect(text.endsWith("}\n")).toBe(true);
    expect(JSON.parse(text)).toEqual(JSON.parse(JSON.stringify(document)));
    expect(renderJson(await make())).toBe(text);
  });

  it("names the place of a number that JSON cannot hold", () => {
    expect(() => renderJson({ a: [1, { b: Number.POSITIVE_INFINITY }] })).toThrow("document.a[1].b is Infinity");
  });
});

describe("references", () => {
  const keys = Object.keys(references) as ReferenceKey[];

  it.each(keys)("%s reads authors, title, place, year", (key) => {
    expect(formatReference(key)).toMatch(/^\p{L}.+, .+, .+ \((?:19|20)\d\d\)(?:, doi:10\.\d{4,}\/\S+)?\.$/u);
    expect(formatReference(key)).not.toMatch(/memory/);
  });

  // The DOI of an APS or Optica paper is made of journal, volume and page (common practice).
  it.each(keys.filter((key) => "doi" in references[key]))("the DOI of %s holds its volume and page", (key) => {
    const { where, doi } = references[key] as { where: string; doi: string };
    const [volume, page] = where.match(/\d+/g)!;
    expect(doi.endsWith(`${volume}.${page}`) || doi.endsWith(`.${volume}.00${page}`)).toBe(true);
  });

  it.each(modelNames)("hold every work that model %s names", async (name) => {
    for (const key of (await findModel(name))!.references) expect(isReference(key)).toBe(true);
  });
});
