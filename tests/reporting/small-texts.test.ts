import { describe, expect, it } from "vitest";
import { renderConversion, renderDatasets } from "../../src/reporting/terminal/index.ts";

describe("conversions in the terminal", () => {
  const to = (unit: string, medium: "vacuum" | "air", values: [string, number, number | null][]) =>
    renderConversion({
      results: values.map(([input, value, standardUncertainty]) => ({
        input,
        value,
        standardUncertainty,
        unit,
        medium,
      })),
    });

  it("stand beside their input, aligned, the medium named for wavelengths only", () => {
    const text = to("nm", "air", [
      ["10305.857", 970.0559712, null],
      ["3599.8(1)", 2777.17403, 0.0771],
    ]);
    expect(text).toBe(
      "input       λ in air / nm\n─────────────────────────\n10305.857     970.055971\n3599.8(1)    2777.174(77)\n",
    );
    expect(to("cm-1", "vacuum", [["1 eV", 8065.543937, null]])).toContain("in cm⁻¹");
  });

  it("keep nine digits where no uncertainty says how many count", () =>
    expect(to("cm-1", "vacuum", [["1 eV", 8065.5439373492, null]])).toContain("8065.54394"));

  it("are empty for no values", () => expect(to("nm", "air", [])).toBe(""));
});

describe("the list of series in the terminal", () => {
  it("gives name, title, source and status where known, and the folder", () => {
    const datasets = [
      { name: "x/hcl", title: "HCl", source: "A 1950", status: "from memory" },
      { name: "y", title: "Y", source: null, status: null },
    ];
    expect(renderDatasets(datasets, "/d")).toBe(
      "x/hcl\n  HCl\n  Source: A 1950\n  Status: from memory\n\ny\n  Y\n\nFiles in /d\n",
    );
  });
});
