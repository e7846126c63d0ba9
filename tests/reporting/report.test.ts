import { describe, expect, it } from "vitest";
import { type ReportOptions, renderReport } from "../../src/reporting/index.ts";
import { bare, compared, growing, local, sideBySide, symbols, threeBands } from "./documents.ts";

const options: ReportOptions = {
  commandLine: "rungwise report input.csv --out again",
  figures: [{ name: "levels", file: "figures/levels.png", caption: "Levels of [x].", alt: "A ladder" }],
  notation: "equilibrium",
  symbols: symbols(),
};
const cases = Object.entries({ sideBySide, compared, threeBands, bare, growing, local });
const SECTIONS = [
  "Summary",
  "Bands as read and as used",
  "Excluded bands",
  "Constants",
  "Differences",
  "Observed − calculated",
  "Dissociation energy",
  "Derived numbers",
  "Predictions",
  "Stability",
  "Figures",
  "Methods",
  "Warnings",
  "Reproduction",
  "References",
];
const sectionOf = (text: string, name: string) =>
  text.split(/^## /m).find((part) => part.startsWith(`${name}\n`)) ?? "";

describe("report.md", () => {
  it.each(cases)("has every section in order (%s)", async (_, make) => {
    const document = await make();
    const heads = [...renderReport(document, options).matchAll(/^## (.*)$/gm)].map(([, head]) => head);
    // Several series are compared, one is not.
    const expected = document.series.length > 1 ? SECTIONS : SECTIONS.filter((head) => head !== "Differences");
    expect(heads).toEqual(expected);
  });

  it.each(cases)("gives identical bytes for an identical request (%s)", async (_, make) => {
    expect(renderReport(await make(), options)).toBe(renderReport(await make(), options));
  });

  it.each(cases)("shows no NaN, undefined, null or infinity, no hyphen for a minus (%s)", async (_, make) => {
    const text = renderReport(await make(), options);
    expect(text).not.toMatch(/NaN|undefined|\bnull\b|Infinity/);
    expect(sectionOf(text, "Constants")).not.toMatch(/\| +-\d/);
    expect(sectionOf(text, "Observed − calculated")).not.toMatch(/\| +-\d/);
  });

  it.each(cases)("has the same number of cells in every row of a table (%s)", async (_, make) => {
    let columns = 0;
    for (const line of renderReport(await make(), options).split("\n")) {
      if (!line.startsWith("|")) columns = 0;
      else {
        const cells = line.split(/(?<!\\)\|/).length;
        if (columns === 0) columns = cells;
        expect(cells, line).toBe(columns);
      }
    }
  });

  it("cites exactly the works it lists, in the order of first citation", async () => {
    const text = renderReport(await sideBySide(), options);
    const cited = [...sectionOf(text, "Methods").matchAll(/\[([\d, ]+)\]/g)].flatMap(([, n]) =>
      n!.split(", ").map(Number),
    );
    const listed = sectionOf(text, "References").match(/^\d+\. /gm)!.length;
    expect([...new Set(cited)]).toEqual(Array.from({ length: listed }, (_, i) => i + 1));
  });

  it("names only methods that were used", async () => {
    const used = sectionOf(renderReport(await sideBySide(), options), "Methods");
    for (const word of ["Morse relation", "Spacing sum", "Turning point", "refractive index of dry air", "AME2020"])
      expect(used).toContain(word);
    expect(used).not.toMatch(/Birge factor|scatter|Y00|Local-mode/);
    const growingText = sectionOf(renderReport(await growing(), options), "Methods");
    expect(growingText).not.toMatch(/Morse|AME2020|Spacing sum/);
  });

  it("writes the equation in the notation asked for", async () => {
    const text = renderReport(await local(), { ...options, notation: "local", symbols: symbols("local") });
    expect(text).toContain("G(v) = ω̃(v + ½) − ω̃x(v + ½)² + ω̃y(v + ½)³");
    expect(sectionOf(text, "References")).toContain("Henry");
  });

  it("shows input as typed beside what was used", async () => {
    const section = sectionOf(renderReport(await sideBySide(), options), "Bands as read and as used");
    // 970.056 nm in air is 10305.857(106) cm-1 in vacuum (independent calculation with Ciddor's formula)
    expect(section).toMatch(
      /\| 3-0 +\| 970\.056\(10\) \| +0\.01 \| nm, air +\| +10\u202f305\.86\(11\) \| yes +\| bonds\.csv:5/,
    );
  });

  it("keeps words from outside as they are, out of the way of Markdown", async () => {
    const text = renderReport(await sideBySide(), options);
    expect(text).toContain(String.raw`meets a dark state \| see \<scan 20240611\>, #2`);
    expect(text).toContain("![A ladder](figures/levels.png)\n\nFigure 1. Levels of \\[x\\].");
  });

  it("groups digits of long numbers and holds units in the summary", async () => {
    const summary = sectionOf(renderReport(await sideBySide(), options), "Summary");
    expect(summary).toMatch(/D0 = 40\u202f\d{3}\(26\)\u00a0cm⁻¹, 486\.\d\d\(31\)\u00a0kJ\u00a0mol⁻¹/);
  });

  it("says why a number is missing", async () => {
    const text = renderReport(await bare(), options);
    expect(text).toContain("Morse a —: no masses are known.");
    expect(text).toContain("χ² is —: not every band carries a σ");
    expect(sectionOf(renderReport(await growing(), options), "Summary")).toContain("No dissociation energy follows");
  });

  it("tells how to reproduce it", async () => {
    const document = await sideBySide();
    const section = sectionOf(renderReport(document, options), "Reproduction");
    expect(section).toContain("```sh\nrungwise report input.csv --out again\n```");
    for (const word of [document.tool.version, document.input!.sha256, "CODATA 2022", "AME2020"])
      expect(section).toContain(word);
  });

  it("fences a command line that holds backticks", async () => {
    const text = renderReport(await bare(), { ...options, commandLine: "rungwise report --name '```'" });
    expect(text).toContain("````sh\nrungwise report --name '```'\n````");
  });
});
