import { readFileSync } from "node:fs";
import { describe, expect, it } from "vitest";
import { readWells, tableModule } from "../../datasets/wells/build.ts";
import { figure } from "../../datasets/wells/figure.ts";
import { fitsOf } from "../../datasets/wells/fit-well.ts";
import { leaveOneOut, tally } from "../../datasets/wells/leave-one-out.ts";
import { page } from "../../datasets/wells/page.ts";
import { fit } from "../../src/commands/fit.ts";

const wells = readWells("datasets/wells");
const named = (name: string) => wells.find((well) => well.name === name)!;

describe("the reference wells", () => {
  it("are at least 14, of both classes, none twice", () => {
    expect(wells.length).toBeGreaterThanOrEqual(14);
    expect(new Set(wells.map(({ class: kind }) => kind))).toEqual(new Set(["hydride", "other"]));
    expect(new Set(wells.map(({ name }) => name)).size).toBe(wells.length);
  });

  it.each(wells.map((well) => [well.name, well] as const))(
    "%s: has a status on D0 and levels, and its spacings shrink below D0",
    (_, well) => {
      for (const status of [well.d0Status, well.status]) expect(status).toMatch(/READ|from memory|COMPUTED/);
      expect(well.class).toBe(well.atoms.includes("H") ? "hydride" : "other");
      expect(well.levels[0]).toBe(0);
      const spacings = well.levels.slice(1).map((level, v) => level - well.levels[v]!);
      for (const [v, spacing] of spacings.entries()) {
        expect(spacing).toBeGreaterThan(0);
        if (v > 0) expect(spacing).toBeLessThan(spacings[v - 1]!);
      }
      expect(well.levels.at(-1)).toBeLessThan(well.d0);
    },
  );

  // What a five-band Morse fit overshoots by, in percent: figures kept with the project's physics, COMPUTED independently from published constants.
  // Rounded to 1, and from constants where the files may hold levels: 1.5 in all.
  it.each([
    ["CO", -2],
    ["HF", 5],
    ["HCl", 18],
    ["N2", 22],
    ["O2", 29],
    ["HI", 31],
    ["Cl2", 42],
    ["Br2", 51],
  ])("%s: two terms on five bands miss D0 by %i %%", (name, percent) => {
    const well = named(name);
    const five = fitsOf(well, 2).find(({ bands }) => bands === 5)!;
    expect(Math.abs(100 * (five.d0 / well.d0 - 1) - percent)).toBeLessThan(1.5);
  });

  it("I2: the recalled polynomial has ωe and ωexe of Huber & Herzberg (READ, 214.502 and 0.6147) in its first spacings", () => {
    const { levels } = named("I2");
    const [first, second] = [levels[1]!, levels[2]! - levels[1]!];
    // ωe and ωexe from two spacings differ from equilibrium ones by what the higher terms do: 0.1 % and 1 %
    expect(Math.abs((first + (first - second)) / 214.502 - 1)).toBeLessThan(1e-3);
    expect(Math.abs((first - second) / 2 / 0.6147 - 1)).toBeLessThan(1e-2);
  });
});

describe("the table and the page", () => {
  it("src/analysis/empirical/wells.data.ts is what datasets/wells gives (node datasets/wells/generate.mjs)", () => {
    expect(readFileSync("src/analysis/empirical/wells.data.ts", "utf8")).toBe(tableModule(wells));
  });

  it("docs/empirical-error.md is what the wells give (node datasets/wells/generate.mjs --docs)", () => {
    expect(readFileSync("docs/empirical-error.md", "utf8")).toBe(page(wells));
  });
});

describe("the figure of the page", () => {
  const spec = figure(wells);
  const points = spec.panels[0]!.traces.flatMap((trace) => (trace.kind === "points" ? [trace] : []));

  it("has a row for every well with five bands, and a range whose bar spans the accepted value exactly where it says so", () => {
    const trials = leaveOneOut(wells, 2, 5);
    expect(points.find(({ name }) => name === "fitted")!.points.length).toBe(trials.length);
    for (const { name, points: some } of points.filter(({ name }) => name !== "fitted"))
      for (const { x, xError } of some) expect(Math.abs(x - 1) <= xError!).toBe(name!.endsWith("holds"));
  });

  it("is the PNG in docs: 85 mm wide at 600 dpi", () => {
    const png = readFileSync("docs/empirical-error.png");
    expect(png.readUInt32BE(16)).toBe(Math.round((85 / 25.4) * 600));
    expect(png.readUInt32BE(20)).toBe(Math.round((spec.heightMm / 25.4) * 600));
  });
});

const bandsOf = (name: string, count: number) =>
  named(name)
    .levels.slice(1, count + 1)
    .join(" ");

describe("H2 by its first n bands (Komasa et al. 2011, READ; accepted D0 36118.0695)", () => {
  it.each([
    [2, 7.7, 8087],
    [5, 9.91, 18491],
    [10, 9.08, 31150],
    [14, 4.39, 35973],
  ])("n = %i: fitted D0 %f %% too large, corrected range from %i up", async (count, percent, floor) => {
    const { series } = await fit({ series: bandsOf("H2", count), bond: "1H 1H" });
    const { d0, empirical } = series[0]!.dissociation[0]!;
    // half a unit of the last printed digit
    expect(Math.abs(100 * (d0!.value / 36118.0695 - 1) - percent)).toBeLessThan(0.0051);
    expect(empirical!.correctedRange[0]).toBeGreaterThanOrEqual(floor);
  });
});

describe("O2 and I2, five bands, themselves left out", () => {
  // fitted/accepted from five bands, COMPUTED independently (29 % for O2, 1.48 for I2)
  it.each([
    ["O2", "16O 16O", 1.29],
    ["I2", "127I 127I", 1.48],
  ])("%s: a coded warning whose range of fitted/accepted holds the true ratio", async (name, bond, ratio) => {
    const { series } = await fit({ series: bandsOf(name, 5), bond });
    const { errorRange } = series[0]!.dissociation[0]!.empirical!;
    expect(errorRange[0]).toBeLessThan(ratio);
    expect(errorRange[1]).toBeGreaterThan(ratio);
    const warning = series[0]!.warnings.find(({ code }) => code === "extrapolation-error")!;
    expect(warning.message).toContain(`${errorRange[0].toFixed(2)} to ${errorRange[1].toFixed(2)}`);
  });
});

describe("leave-one-well-out, two terms", () => {
  // the targets are those the issue asks for: 10 wells of 14, and 25 %
  it.each([3, 4, 5, 6])("%i bands: holds D0 and is nearer in 10 of 14, half-width at most 25 %%", (bands) => {
    const { wells: tried, ranges, holds, nearer, widest } = tally(leaveOneOut(wells, 2, bands));
    expect(tried).toBeGreaterThanOrEqual(14);
    expect(ranges).toBe(tried);
    expect(holds / tried).toBeGreaterThanOrEqual(10 / 14);
    expect(nearer / tried).toBeGreaterThanOrEqual(10 / 14);
    expect(widest).toBeLessThanOrEqual(0.25);
  });

  it("H2+ is the exception: its range from three bands lies below the accepted D0", () => {
    const trial = leaveOneOut(wells, 2, 3).find(({ well }) => well.name === "H2+")!;
    expect(trial.fit.d0).toBeLessThan(trial.well.d0);
    expect(trial.outcome!.holds).toBe(false);
  });
});
