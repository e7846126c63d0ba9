import { writeFileSync } from "node:fs";
import { join } from "node:path";
import { describe, expect, it } from "vitest";
import { emptyFolder, rungwise } from "./run.ts";

const words = ["plan", "--series", "2885.98 5667.98", "--sigma", "0.02", "--aim", "wexe"];

describe("rungwise plan", () => {
  it("prints the candidates, the best first, with the caution on lasers; what was assumed goes to standard error", () => {
    const { code, out, err } = rungwise([...words, "--up-to", "4"]);
    expect(code).toBe(0);
    const rows = out.split("\n").filter((line) => /^ {2}\d-0/.test(line));
    expect(rows.map((line) => line.trim().split(/ {2,}/)[0])).toEqual(["4-0", "3-0", "1-0 again", "2-0 again"]);
    expect(out).toContain("laser-safety rules");
    expect(err).toContain("0.02 cm⁻¹");
    expect(rungwise([...words, "--sigma-new", "0.02"]).err).toBe("");
  });

  it("--json has the keys that are promised, the aim first", () => {
    const { code, out } = rungwise([...words, "--json", "--sigma-new", "0.01 nm"]);
    expect(code).toBe(0);
    const { aim, now, candidates } = JSON.parse(out);
    expect(aim).toBe("wexe");
    expect(now.unit).toBe("cm-1");
    for (const { label, position, vacuumWavelength, uncertaintyAfter, gain } of candidates) {
      expect(label).toMatch(/^\d-0$/);
      // two ways of writing one number
      expect(Math.abs((vacuumWavelength * position.value) / 1e7 - 1)).toBeLessThan(1e-12);
      expect(Math.abs((gain * uncertaintyAfter) / now.standardUncertainty - 1)).toBeLessThan(1e-12);
    }
  });

  it("--window may be repeated, and says the same with commas", () => {
    const labels = (...windows: string[]) =>
      JSON.parse(rungwise([...words, "--json", "-q", ...windows]).out).candidates.map(
        ({ label }: { label: string }) => label,
      );
    const both = labels("--window", "600..1000 nm", "--window", "2800..2900");
    // 4-0 and 5-0 of HCl lie near 916 and 747 nm
    expect(both).toEqual(["5-0", "4-0", "1-0"]);
    expect(labels("--window", "600..1000 nm, 2800..2900")).toEqual(both);
    expect(labels("--window", "600 nm..1000 nm")).toEqual(["5-0", "4-0"]);
  });

  it("plans from a result.json, Raman light kept", () => {
    const cwd = emptyFolder();
    const raman = ["--series", "628.49 761.69 956.8", "--unit", "nm", "--laser", "532", "--sigma", "0.01", "-q"];
    writeFileSync(join(cwd, "result.json"), rungwise(["fit", ...raman, "--terms", "2", "--json"], { cwd }).out);
    const { code, out } = rungwise(["plan", "result.json", "--aim", "we", "--sigma-new", "0.01 nm", "--json"], { cwd });
    expect(code).toBe(0);
    const { series } = JSON.parse(out);
    expect(series[0].scattered).toBe(true);
    const first = series[0].candidates.find(({ label }: { label: string }) => label === "1-0");
    // the line that was given, to the residual of the fit
    expect(Math.abs(first.vacuumWavelength - 628.49)).toBeLessThan(0.1);
  });

  it.each<[string, string[], number, string]>([
    ["no aim", ["--series", "2885.98 5667.98", "--sigma", "0.02"], 2, "--aim: no aim is given"],
    ["an aim the fit cannot have", [...words.slice(0, -2).slice(1), "--aim", "weye", "--terms", "2"], 2, "weye"],
    ["a window without bands", [...words.slice(1), "--window", "200..210 nm"], 2, "200 to 210 nm (vacuum)"],
    ["no uncertainty", ["--series", "2885.98 5667.98", "--aim", "we", "--sigma-new", "0.02"], 3, "--sigma"],
  ])("%s: one message, and the exit code", (_, rest, exit, part) => {
    const { code, out, err } = rungwise(["plan", ...rest]);
    expect([code, out]).toEqual([exit, ""]);
    expect(err).toContain(part);
    expect(err).not.toContain("    at ");
  });
});
