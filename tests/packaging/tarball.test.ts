import { execFileSync, spawnSync } from "node:child_process";
import { existsSync, readFileSync, writeFileSync } from "node:fs";
import { join, resolve } from "node:path";
import { beforeAll, describe, expect, it } from "vitest";
import { emptyFolder } from "../cli/run.ts";

const npm = (words: readonly string[], cwd: string) =>
  execFileSync("npm", [...words, "--no-audit", "--no-fund", "--loglevel=error"], { cwd, encoding: "utf8" });

const local = emptyFolder();
const everywhere = emptyFolder();
const bands = ["--series", "2885.98 5667.98 8346.78", "--bond", "1H 35Cl"];

describe("the tarball", () => {
  beforeAll(() => {
    const packed = JSON.parse(npm(["pack", "--json", "--ignore-scripts", "--pack-destination", local], process.cwd()));
    const tarball = join(local, (Array.isArray(packed) ? packed[0] : Object.values(packed)[0]).filename);
    writeFileSync(join(local, "package.json"), '{ "name": "user", "private": true, "type": "module" }\n');
    npm(["install", tarball], local);
    npm(["install", "--global", "--prefix", everywhere, tarball], everywhere);
  }, 180_000);

  it("carries the notices of what it contains, the fonts and the datasets", () => {
    const root = join(local, "node_modules/rungwise");
    for (const file of [
      "dist/THIRD-PARTY-NOTICES.md",
      "dist/fonts/Arimo-Italic.ttf",
      "dist/fonts/LICENSE",
      "LICENSE",
      "datasets/hcl-h35cl.csv",
    ])
      expect(existsSync(join(root, file))).toBe(true);
    expect(readFileSync(join(root, "dist/THIRD-PARTY-NOTICES.md"), "utf8")).toContain("## chart.js");
  });

  it.each([
    ["locally", join(local, "node_modules/.bin/rungwise")],
    ["globally", join(everywhere, "bin/rungwise")],
  ])("installed %s, fits and draws a report", (_, command) => {
    const cwd = emptyFolder();
    const run = (words: readonly string[]) => spawnSync(command, words, { cwd, encoding: "utf8" });
    expect(run(["fit", ...bands]).stdout).toContain("2989.4");
    const report = run(["report", ...bands, "--out", "r"]);
    expect(report.status).toBe(0);
    expect(readFileSync(join(cwd, "r/figures/potential.png")).length).toBeGreaterThan(10_000);
    expect(run(["datasets"]).stdout).toContain("hcl-h35cl");
  });

  it("imports as a library", () => {
    const program = `
      import { fit, fitNonlinear, report } from "rungwise";
      const { series } = await fit({ series: "2885.9775 5667.9841 8346.7821" });
      const line = fitNonlinear({ y: [1, 2, 3], model: (p) => [p[0], 2 * p[0], 3 * p[0]], jacobian: () => [[1], [2], [3]], start: [5] });
      const { files } = await report({ series: "2885.98 5667.98 8346.78", bond: "1H 35Cl" });
      console.log(series[0].constants.we.value.toFixed(3), line.values[0], files.length);`;
    const { stdout, stderr } = spawnSync(process.execPath, ["--input-type=module", "-e", program], {
      cwd: local,
      encoding: "utf8",
    });
    expect(stderr).toBe("");
    expect(stdout.trim()).toBe("2989.467 1 11");
  });

  it("has types that a strict program compiles against", () => {
    writeFileSync(
      join(local, "user.ts"),
      `import { fit, fitNonlinear, InputError, type FitDocument, type Quantity } from "rungwise";
       const document: FitDocument = await fit({ series: "1 2 3", terms: 2, bond: "1H 35Cl" });
       const we: Quantity | undefined = document.series[0]?.constants.we;
       const { values }: { values: number[] } = fitNonlinear({ y: [1], model: (p) => [p[0]!], jacobian: () => [[1]], start: [0] });
       console.log(we?.value, values, InputError);
       // @ts-expect-error a bond is text
       await fit({ bond: 5 });\n`,
    );
    const flags = [
      "--strict",
      "--noEmit",
      "--module",
      "nodenext",
      "--target",
      "es2022",
      "--skipLibCheck",
      "false",
      "--types",
      "",
    ];
    const tsc = resolve("node_modules/typescript/bin/tsc");
    const { status, stdout } = spawnSync(process.execPath, [tsc, ...flags, "user.ts"], {
      cwd: local,
      encoding: "utf8",
    });
    expect(stdout).toBe("");
    expect(status).toBe(0);
  });
});
