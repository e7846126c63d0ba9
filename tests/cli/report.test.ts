import { spawnSync } from "node:child_process";
import { existsSync, mkdirSync, readdirSync, readFileSync, symlinkSync, writeFileSync } from "node:fs";
import { join } from "node:path";
import { describe, expect, it } from "vitest";
import { emptyFolder, rungwise } from "./run.ts";

const bands = ["--series", "2885.9775 5667.9841 8346.7821 10922.803", "--bond", "1H 35Cl"];
const contents = [
  "bands.csv",
  "constants.csv",
  "figures/birge-sponer.png",
  "figures/dissociation.png",
  "figures/positions.png",
  "figures/potential.png",
  "figures/residuals.png",
  "input.toml",
  "predictions.csv",
  "report.md",
  "result.json",
];
const filesIn = (folder: string) =>
  readdirSync(folder, { recursive: true, encoding: "utf8" })
    .filter((name) => name.includes("."))
    .sort();

/** Width and density (pixels per metre) as the chunks of a PNG state them. */
function png(file: string): { width: number; perMetre: number; densityBeforeData: boolean } {
  const data = readFileSync(file);
  let at = 8;
  let perMetre = 0;
  let densityAt = Number.POSITIVE_INFINITY;
  let dataAt = Number.POSITIVE_INFINITY;
  while (at < data.length) {
    const length = data.readUInt32BE(at);
    const type = data.toString("latin1", at + 4, at + 8);
    if (type === "pHYs") [perMetre, densityAt] = [data.readUInt32BE(at + 8), at];
    if (type === "IDAT") dataAt = Math.min(dataAt, at);
    at += 12 + length;
  }
  return { width: data.readUInt32BE(16), perMetre, densityBeforeData: densityAt < dataAt };
}

describe("report", () => {
  it("writes the folder of the contract, its figures 2008 px wide at 23622 px/m", () => {
    const cwd = emptyFolder();
    const { code, out } = rungwise(["report", ...bands, "--out", "hcl"], { cwd });
    expect([code, out]).toEqual([0, "hcl/report.md\n"]);
    expect(filesIn(join(cwd, "hcl"))).toEqual(contents);
    // 85 mm at 600 dpi, F1 and F2 of the figure rules
    for (const name of contents.filter((file) => file.endsWith(".png")))
      expect(png(join(cwd, "hcl", name))).toEqual({ width: 2008, perMetre: 23622, densityBeforeData: true });
    const result = JSON.parse(readFileSync(join(cwd, "hcl/result.json"), "utf8"));
    expect(result.series[0].constants.we.value).toBeGreaterThan(2980);
  });

  it("is made again, byte for byte, from the input it keeps and the command it names", () => {
    const cwd = emptyFolder();
    expect(rungwise(["report", ...bands, "--terms", "3", "--out", "first"], { cwd }).code).toBe(0);
    expect(rungwise(["report", "first/input.toml", "--out", "second"], { cwd }).code).toBe(0);
    for (const name of contents)
      expect(readFileSync(join(cwd, "second", name)).equals(readFileSync(join(cwd, "first", name)))).toBe(true);
    expect(readFileSync(join(cwd, "first/report.md"), "utf8")).toContain("rungwise report input.toml");
  });

  it("bands.csv is readable again and gives the same constants", () => {
    const cwd = emptyFolder();
    rungwise(["report", ...bands, "--out", "r"], { cwd });
    const again = rungwise(["fit", "r/bands.csv", "--json", "--quiet"], { cwd });
    expect(again.code).toBe(0);
    const stored = JSON.parse(readFileSync(join(cwd, "r/result.json"), "utf8"));
    expect(JSON.parse(again.out).series[0].constants).toEqual(stored.series[0].constants);
  });

  it("check makes it again, and finds a number that was changed", () => {
    const cwd = emptyFolder();
    rungwise(["report", ...bands, "--sigma", "0.01", "--out", "r"], { cwd });
    expect(rungwise(["check", "r"], { cwd })).toMatchObject({ code: 0 });
    const file = join(cwd, "r/result.json");
    const result = JSON.parse(readFileSync(file, "utf8"));
    result.series[0].constants.we.value += 0.01;
    writeFileSync(file, JSON.stringify(result));
    const { code, out } = rungwise(["check", "r/result.json", "--json"], { cwd });
    expect(code).toBe(2);
    const { ok, differences } = JSON.parse(out);
    expect(ok).toBe(false);
    expect(differences.map(({ where }: { where: string }) => where)).toEqual(["series[0].constants.we.value"]);
    expect(rungwise(["check", "nowhere"], { cwd }).code).toBe(2);
  });

  it("check agrees with every sample report of the repository", () => {
    for (const name of ["hcl", "co", "two-bonds"])
      expect(rungwise(["check", `reports/${name}`]).out).toContain("comes out again");
  });

  it("predict reads its result.json", () => {
    const cwd = emptyFolder();
    rungwise(["report", ...bands, "--out", "r"], { cwd });
    const stored = JSON.parse(readFileSync(join(cwd, "r/result.json"), "utf8"));
    const { code, out } = rungwise(["predict", "r/result.json", "--up-to", "7", "--json", "--quiet"], { cwd });
    expect(code).toBe(0);
    const { predictions } = JSON.parse(out);
    expect(predictions).toHaveLength(7);
    // the same constants and covariance: rounding of a sum only
    const sixth = (list: { label: string; position: { value: number; standardUncertainty: number } }[]) =>
      list.find(({ label }) => label === "6-0")!.position;
    expect(sixth(predictions).value).toBeCloseTo(sixth(stored.series[0].predictions).value, 8);
    expect(sixth(predictions).standardUncertainty).toBeCloseTo(
      sixth(stored.series[0].predictions).standardUncertainty,
      8,
    );
  });

  it("without --out: exit 2 and nothing written", () => {
    const cwd = emptyFolder();
    const { code, err } = rungwise(["report", ...bands], { cwd });
    expect(code).toBe(2);
    expect(err).toContain("--out DIR");
    expect(readdirSync(cwd)).toEqual([]);
  });

  it("an existing folder stays as it is; --force replaces a report, and nothing else", () => {
    const cwd = emptyFolder();
    rungwise(["report", ...bands, "--out", "r"], { cwd });
    const before = readFileSync(join(cwd, "r/result.json"), "utf8");
    const refused = rungwise(["report", "--series", "1000 1990 2970", "--out", "r"], { cwd });
    expect(refused.code).toBe(2);
    expect(refused.err).toContain("--force");
    expect(readFileSync(join(cwd, "r/result.json"), "utf8")).toBe(before);
    expect(rungwise(["report", "--series", "1000 1990 2970", "--out", "r", "--force"], { cwd }).code).toBe(0);
    expect(readFileSync(join(cwd, "r/result.json"), "utf8")).not.toBe(before);
    mkdirSync(join(cwd, "mine"));
    writeFileSync(join(cwd, "mine/thesis.txt"), "mine");
    expect(rungwise(["report", ...bands, "--out", "mine", "--force"], { cwd }).code).toBe(2);
    expect(readFileSync(join(cwd, "mine/thesis.txt"), "utf8")).toBe("mine");
    expect(readdirSync(cwd).sort()).toEqual(["mine", "r"]);
  });

  it.each([
    ["a file", "file.txt"],
    ["below a file", "file.txt/report"],
    ["where the system allows no folder", "/proc/nowhere/report"],
  ])("an output that is %s: exit 2, nothing left behind", (_, out) => {
    const cwd = emptyFolder();
    writeFileSync(join(cwd, "file.txt"), "x");
    const { code, err } = rungwise(["report", ...bands, "--out", out], { cwd });
    expect(code).toBe(2);
    expect(err).toMatch(/^error: .*; name another folder with --out\n/m);
    expect(readdirSync(cwd)).toEqual(["file.txt"]);
  });

  it("a faulty input writes nothing", () => {
    const cwd = emptyFolder();
    expect(rungwise(["report", "--series", "2885,98 5667", "--out", "r"], { cwd }).code).toBe(2);
    expect(rungwise(["report", "--series", "2885.98", "--out", "r"], { cwd }).code).toBe(3);
    expect(existsSync(join(cwd, "r"))).toBe(false);
  });
});

describe("FILE", () => {
  it.each([
    ["that does not exist", "none.csv", "no such file"],
    ["that is a directory", "folder", "is a directory"],
    ["that is binary", "binary.csv", "not a text file"],
    ["that is empty", "empty.csv", "is empty"],
    ["of another kind", "notes.txt", "--format"],
  ])("%s: exit 2, one line an error, no trace", (_, file, part) => {
    const cwd = emptyFolder();
    mkdirSync(join(cwd, "folder"));
    writeFileSync(join(cwd, "binary.csv"), Buffer.from([0x89, 0x50, 0, 1, 2, 255, 254]));
    writeFileSync(join(cwd, "empty.csv"), "");
    writeFileSync(join(cwd, "notes.txt"), "band,position\n1-0,2885\n");
    const { code, out, err } = rungwise(["fit", file], { cwd });
    expect([code, out]).toEqual([2, ""]);
    expect(err).toContain(part);
    expect(err).toMatch(new RegExp(`^error: ${file.replace(".", "\\.")}`));
    expect(err).not.toMatch(/\n\s+at /);
  });

  it("- reads standard input, CSV unless told otherwise", () => {
    const csv = "band,position\n1-0,2885.98\n2-0,5667.98\n3-0,8346.78\n";
    const direct = JSON.parse(rungwise(["fit", "--series", "2885.98 5667.98 8346.78", "--json", "-q"]).out);
    const piped = JSON.parse(rungwise(["fit", "-", "--json", "-q"], { input: csv }).out);
    expect(piped.series[0].constants).toEqual(direct.series[0].constants);
    const toml = rungwise(["fit", "-", "--format", "toml", "--json", "-q"], {
      input: 'series = "2885.98 5667.98 8346.78"',
    });
    expect(JSON.parse(toml.out).series[0].constants).toEqual(direct.series[0].constants);
  });
});

describe("convert", () => {
  it("air wavelengths 1763.7 and 1197.7 nm are 5668.350 and 8347.051 cm-1, with a note on the range for the first", () => {
    const words = ["convert", "1763.7", "1197.7", "--unit", "nm", "--medium", "air", "--to", "cm-1"];
    const { code, out, err } = rungwise([...words, "--json"]);
    expect(code).toBe(0);
    const { results, warnings } = JSON.parse(out);
    // half a unit of the last digit stated; 8347.0517 is cut, not rounded, there
    expect(Math.abs(results[0].value - 5668.35)).toBeLessThan(6e-4);
    expect(Math.abs(results[1].value - 8347.051)).toBeLessThan(1e-3);
    expect(warnings).toHaveLength(1);
    expect(warnings[0].message).toContain("1763.7");
    expect(err).toContain("1690 nm");
  });
});

describe("datasets", () => {
  it("lists what comes along and prints one so that fit can read it", () => {
    const { out } = rungwise(["datasets"]);
    expect(out).toContain("hcl-h35cl");
    const csv = rungwise(["datasets", "hcl-h35cl"]).out;
    expect(rungwise(["fit", "-", "--terms", "3", "-q"], { input: csv }).code).toBe(0);
  });

  it("suggests the nearest name", () => {
    const { code, err } = rungwise(["datasets", "hdo-ho"]);
    expect(code).toBe(2);
    expect(err).toContain("hdo-oh");
  });

  it("works through a link to the command, as a global install makes it", () => {
    const cwd = emptyFolder();
    const link = join(cwd, "rungwise");
    symlinkSync(join(process.cwd(), "dist/rungwise.cjs"), link);
    const { stdout } = spawnSync(process.execPath, [link, "datasets"], { encoding: "utf8" });
    expect(stdout).toContain("hcl-h35cl");
  });
});
