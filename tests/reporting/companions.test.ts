import { describe, expect, it } from "vitest";
import { fit } from "../../src/commands/fit.ts";
import { report } from "../../src/commands/report.ts";
import { bandsTable, companionsTable } from "../../src/reporting/tables/index.ts";

/** The demo's bond b with its companion, invented. */
const text = [
  "# name: b",
  "# bond: 16O 1H",
  "band,position,unit,medium,companion,ratio",
  "1-0,3527.37(3),cm-1,vacuum,,",
  "2-0,6881.26(5),cm-1,vacuum,,",
  "3-0,993.985(10),nm,air,991.201(10),6.7(3)",
  "4-0,764.998(10),nm,air,,",
  "5-0,628.716(10),nm,air,,",
].join("\n");
const input = { text, source: "b.csv", format: "csv" } as const;
const request = { input, modes: "bend 1600.6(10), torsion 310" };

describe("a band corrected for its companion", () => {
  it("stands as measured and as corrected in the table of bands", async () => {
    const { columns, rows, notes } = bandsTable((await fit(request)).series[0]!);
    expect(columns.slice(0, 3).map(({ quantity }) => quantity)).toEqual(["band", "observed", "corrected"]);
    // COMPUTED: (6.7·10057.756 + 10086.006)/7.7, and first-order σ with 0.3 of the ratio
    expect(rows[2]!.cells.slice(0, 3)).toEqual(["3-0", "10057.76(10)", "10061.43(17)"]);
    expect(rows[1]!.cells.slice(0, 3)).toEqual(["2-0", "6881.260(50)", ""]);
    expect(notes[0]).toContain("3-0");
  });

  it("has a row of its own with coupling and shift, and none is made without a companion", async () => {
    const { rows } = companionsTable((await fit(request)).series[0]!)!;
    expect(rows.map(({ cells }) => cells)).toEqual([
      ["3-0", "991.201(10) nm", "10057.76(10)", "10086.01(10)", "6.70(30)", "9.50(16)", "3.67(14)", "10061.43(17)"],
    ]);
    const plain = (await fit({ series: "2885.98 5667.98 8346.78" })).series[0]!;
    expect(companionsTable(plain)).toBeNull();
    expect(bandsTable(plain).columns.map(({ quantity }) => quantity)).not.toContain("corrected");
  });

  it("without σ keeps the digits that were typed", async () => {
    const bare = { text: text.replace(/\(\d+\)/g, ""), source: "b.csv", format: "csv" } as const;
    const { rows } = companionsTable((await fit({ input: bare })).series[0]!)!;
    expect(rows[0]!.cells.slice(2, 5)).toEqual(["10057.76", "10086.01", "6.7"]);
  });

  it("bands.csv holds both, and read again it gives the same constants", async () => {
    const { files, document } = await report(request);
    const csv = String(files.find(({ name }) => name === "bands.csv")!.content);
    const lines = csv.split("\n").filter((line) => !line.startsWith("#"));
    const cells = (line: string) => line.split(",");
    const third = Object.fromEntries(cells(lines[0]!).map((name, i) => [name, cells(lines[3]!)[i]]));
    const pair = document.series[0]!.bands[2]!.twoLevels!;
    expect(third).toMatchObject({
      position: String(pair.corrected),
      sigma: String(pair.sigma),
      measured_position: String(pair.measured),
      companion_position: String(pair.companion),
      companion_coupling: String(pair.coupling),
      companion_shift: String(pair.shift),
      as_read_companion: "991.201(10)",
      as_read_ratio: "6.7(3)",
    });
    const again = await fit({ input: { text: csv, source: "bands.csv", format: "csv" } });
    // numbers are written with all their digits
    for (const key of ["we", "wexe"])
      expect(
        Math.abs(again.series[0]!.constants[key]!.value / document.series[0]!.constants[key]!.value - 1),
      ).toBeLessThan(1e-12);
    const plain = await report({ series: "2885.98 5667.98 8346.78" });
    expect(String(plain.files.find(({ name }) => name === "bands.csv")!.content)).not.toContain("companion");
  });

  it("the report shows the band as read, as measured and as corrected, the equations, the caution and the candidates", async () => {
    const { files } = await report(request);
    // spaces of print are no matter here
    const page = String(files.find(({ name }) => name === "report.md")!.content).replaceAll(/[\u00a0\u202f]/g, " ");
    expect(page).toMatch(/\| 3-0 +\| 993\.985\(10\) .*10 057\.76\(10\) .*10 061\.43\(17\)/);
    for (const part of [
      "## Bands with a companion",
      "## Near-degeneracies",
      "W = Δ√R/(R + 1)",
      "harmonic sums",
      "carries no intensity of its own",
      "2 stretch + 2 bend",
      // 10086.01 - 3.67
      "The companion of 3-0 lay at 10 082.3 cm⁻¹ by itself; nearest to that: 2 stretch + 2 bend",
    ])
      expect(page).toContain(part);
    const plain = String(
      (await report({ series: "2885.98 5667.98 8346.78" })).files.find(({ name }) => name === "report.md")!.content,
    );
    for (const part of ["companion", "Near-degeneracies"]) expect(plain).not.toContain(part);
  });
});
