import { writeFileSync } from "node:fs";
import { join } from "node:path";
import { describe, expect, it } from "vitest";
import { displayWidth } from "../../src/reporting/text/display-width.ts";
import { emptyFolder, rungwise } from "./run.ts";

const bands = "1-0 3526.00(10), 2-0 6878.00(10), 3-0 10052.00(10), 4-0 13060.00(10), 5-0 15890.00(10)";
const head = "band,position,companion,ratio\n1-0,3526.0(1),,\n2-0,6878.0(1),,\n4-0,13060.0(1),,\n";

describe("the command", () => {
  it.each([
    ["a mode without a number", ["--modes", "bend"], '--modes: "bend" is no mode; write a name'],
    ["an unknown form", ["--modes", "bend:1370"], '--modes: "bend:1370" is no mode'],
    ["a mode twice", ["--modes", "bend 1370, bend 1400"], 'the mode "bend" stands there twice'],
    ["a window of zero", ["--modes", "bend 1370", "--window", "0"], "--window: 0 is not possible"],
    ["a negative window", ["--modes", "bend 1370", "--window=-5"], "--window: -5 is not possible"],
    ["a window without modes", ["--window", "20"], "--window: there are no modes to look for"],
  ])("refuses %s with exit 2, its place and the mend, and prints no result", (_, words, message) => {
    const { code, out, err } = rungwise(["fit", "--bands", bands, ...words]);
    expect([code, out]).toEqual([2, ""]);
    expect(err).toContain(`error: ${message.startsWith("--") ? message : `--modes: ${message}`}`);
  });

  it.each([
    ["a ratio of zero", "10068,0", "ratio", "is not a positive intensity ratio"],
    ["a ratio that is none", "10068,seven", "ratio", "is not a positive intensity ratio"],
    ["a companion that is no position", "x,6.7", "companion", "is not a number"],
    ["a companion where its band is", "10052.0,6.7", "companion", "the companion stands where the band stands"],
    ["a companion without a ratio", "10068,", "ratio", "not the ratio of intensities"],
    ["a ratio without a companion", ",6.7", "companion", "but no companion"],
  ])("refuses %s with exit 2 and its line", (_, cells, column, message) => {
    const cwd = emptyFolder();
    writeFileSync(join(cwd, "bands.csv"), `${head}3-0,10052.0(1),${cells}\n`);
    const { code, out, err } = rungwise(["fit", "bands.csv"], { cwd });
    expect([code, out]).toEqual([2, ""]);
    expect(err).toContain(`error: bands.csv:5 ${column}: `);
    expect(err).toContain(message);
  });

  it("prints resonances and companions as tables and in JSON, settings in a file as well", () => {
    const cwd = emptyFolder();
    const file = `# modes: bend 2000(3), rock 1190(4)\n# window: 30\n${head}3-0,10052.0(1),10072.0(1),4.0(2)\n`;
    writeFileSync(join(cwd, "bands.csv"), file);
    const { code, out } = rungwise(["fit", "bands.csv"], { cwd });
    expect(code).toBe(0);
    for (const part of ["Bands with a companion", "Near-degeneracies", "2 stretch + bend + rock"])
      expect(out).toContain(part);
    expect(Math.max(...out.split("\n").map((line) => displayWidth(line)))).toBeLessThanOrEqual(80);
    const [series] = JSON.parse(rungwise(["fit", "bands.csv", "--json"], { cwd }).out).series;
    expect(series.resonances).toMatchObject({ window: 30, standsOut: null, test: null });
    // 10072 - 4 against G(2) + 3190 = 10068, a fit through four bands on the law
    expect(Math.abs(series.resonances.candidates[0].companionGap)).toBeLessThan(0.2);
    // 10052 + 20/5, W = 20·√4/5
    expect(Math.abs(series.bands[3].twoLevels.corrected - 10056)).toBeLessThan(1e-9);
    expect(Math.abs(series.bands[3].twoLevels.coupling - 8)).toBeLessThan(1e-9);
  });

  it("a report of both is made again by check", () => {
    const cwd = emptyFolder();
    writeFileSync(join(cwd, "bands.csv"), `${head}3-0,10052.0(1),10072.0(1),4.0(2)\n`);
    const words = ["report", "bands.csv", "--modes", "bend 2000(3), rock 1190(4)", "--out", "out"];
    expect(rungwise(words, { cwd }).code).toBe(0);
    expect(rungwise(["check", "out"], { cwd }).code).toBe(0);
  });
});
