import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { renderTable, type TableData } from "../../src/reporting/index.ts";
import { alignPoints } from "../../src/reporting/table.ts";
import { displayWidth } from "../../src/reporting/text/display-width.ts";
import { wrap } from "../../src/reporting/text/wrap.ts";

const pointColumn = (line: string) => [...line].findIndex((c, i, all) => c === "." && /\d/.test(all[i - 1] ?? ""));

describe("display width", () => {
  it("counts no column for combining marks", () => expect(displayWidth("ω̃x")).toBe(2));
  it("counts one column for superscripts, minus and dash", () => expect(displayWidth("cm⁻¹ − —")).toBe(8));
  it("counts two columns for East Asian letters", () => expect(displayWidth("水")).toBe(2));
});

describe("alignment on decimal points", () => {
  it("puts points, ends of whole numbers and dashes in their places", () => {
    expect(alignPoints(["3765.96(11)", "83.383(55)", "−0.019(11)", "46510(150)", "—"])).toEqual([
      " 3765.96(11) ",
      "   83.383(55)",
      "   −0.019(11)",
      "46510(150)   ",
      "    —        ",
    ]);
  });

  it("gives every number with a point the same column, whatever its size", () => {
    const number = fc
      .tuple(fc.double({ min: -1e7, max: 1e7, noNaN: true }), fc.integer({ min: 1, max: 6 }))
      .map(([x, d]) => x.toFixed(d).replace("-", "−"));
    fc.assert(
      fc.property(fc.array(number, { minLength: 1, maxLength: 8 }), (cells) => {
        const set = alignPoints(cells);
        expect(new Set(set.map((cell) => cell.indexOf("."))).size).toBe(1);
        expect(new Set(set.map(displayWidth)).size).toBe(1);
        expect(set.map((cell) => cell.trim())).toEqual(cells);
      }),
      { seed: 20, numRuns: 200 },
    );
  });
});

describe("plain-text table", () => {
  const data: TableData = {
    columns: [
      { quantity: "constant", align: "left" },
      { quantity: "value of it", unit: "kJ/mol", align: "point" },
      { quantity: "range", unit: "cm-1", align: "interval" },
    ],
    rows: [
      { cells: ["ω̃", "12.30(11)", "9.5 to 10.25"] },
      { cells: ["ω̃x", "1.234(5)", "−10 to 2"], muted: true },
      { cells: ["ωe", "—", "—"] },
    ],
    notes: ["Why there is a dash."],
  };

  it("has quotients as heads, one rule, aligned numbers and no trailing spaces", () => {
    expect(renderTable(data).split("\n")).toEqual([
      "           value of it /          range /",
      "constant      (kJ mol⁻¹)             cm⁻¹",
      "─────────────────────────────────────────",
      "ω̃              12.30(11)     9.5 to 10.25",
      "ω̃x              1.234(5)   −10   to  2",
      "ωe              —            —",
      "Why there is a dash.",
    ]);
  });

  it("hands muted rows, and only those, to the style", () => {
    const lines = renderTable(data, { mute: (line) => `<${line}>` }).split("\n");
    expect(lines.filter((line) => line.startsWith("<"))).toHaveLength(1);
    expect(lines[4]).toMatch(/^<ω̃x .*>$/);
  });

  it("continues below with the first column repeated when it is too wide", () => {
    const lines = renderTable(data, { width: 30 }).split("\n");
    expect(lines.filter((line) => line.startsWith("ω̃x"))).toHaveLength(2);
    for (const line of lines) expect(displayWidth(line)).toBeLessThanOrEqual(30);
  });

  it("keeps points aligned in a whole rendered column", () => {
    const rows = ["1.5", "22.25", "333.125"].map((cell) => ({ cells: ["x", cell] }));
    const columns = [data.columns[0]!, { quantity: "n", align: "point" } as const];
    const lines = renderTable({ columns, rows, notes: [] }).split("\n").slice(2);
    expect(new Set(lines.map(pointColumn)).size).toBe(1);
  });
});

describe("wrapping", () => {
  it("breaks at spaces within the width and indents what follows", () => {
    expect(wrap("aa bb cc", "- ", "  ", 7)).toBe("- aa bb\n  cc");
  });
  it("holds no-break spaces together and prints them as spaces", () => {
    expect(wrap("aa k\u00a0=\u00a02", "", "", 6)).toBe("aa\nk = 2");
  });
});
