import { spawnSync } from "node:child_process";
import { createHash } from "node:crypto";
import { readFileSync, writeFileSync } from "node:fs";
import { createRequire } from "node:module";
import { join, resolve } from "node:path";
import { describe, expect, it } from "vitest";
import { figuresFor, renderFigures } from "../../../src/reporting/figures/index.ts";
import { emptyFolder, rungwise } from "../../cli/run.ts";
import { overtones, sampleResult } from "./sample-results.ts";

const { createCanvas, loadImage } = createRequire(import.meta.url)("@napi-rs/canvas");
const draw = (widthMm: number, count = 5) =>
  renderFigures(
    figuresFor([sampleResult({ labels: overtones(count) })], { widthMm, notation: "equilibrium" }).slice(0, 2),
  );

/** Pixels of a picture, RGBA. */
async function pixels(png: Uint8Array): Promise<{ width: number; height: number; data: Uint8ClampedArray }> {
  const image = await loadImage(Buffer.from(png));
  const context = createCanvas(image.width, image.height).getContext("2d");
  context.drawImage(image, 0, 0);
  return { width: image.width, height: image.height, data: context.getImageData(0, 0, image.width, image.height).data };
}

describe("drawing", () => {
  it("makes pictures 2008 px wide at 85 mm and 4039 px at 171 mm, 600 dpi written into the file", async () => {
    for (const [mm, px] of [
      [85, 2008],
      [171, 4039],
    ] as const) {
      const [png] = await draw(mm);
      const data = Buffer.from(png!);
      expect(data.readUInt32BE(16)).toBe(px);
      const density = data.indexOf("pHYs", 8, "latin1");
      expect([data.readUInt32BE(density + 4), data.readUInt32BE(density + 8), data[density + 12]]).toEqual([
        23622, 23622, 1,
      ]);
      expect(density).toBeLessThan(data.indexOf("IDAT", 8, "latin1"));
    }
  });

  it("paints every corner white and opaque, also of a larger picture after a smaller one, and something in between", async () => {
    const pictures = [...(await draw(85)), ...(await draw(171))];
    for (const picture of pictures) {
      const { width, height, data } = await pixels(picture);
      for (const at of [0, width - 1, width * (height - 1), width * height - 1])
        expect([...data.slice(4 * at, 4 * at + 4)]).toEqual([255, 255, 255, 255]);
      let dark = 0;
      for (let i = 0; i < data.length; i += 4) if (data[i]! < 128) dark++;
      expect(dark / (width * height)).toBeGreaterThan(0.005);
      expect(dark / (width * height)).toBeLessThan(0.2);
    }
  });

  it("gives the same bytes twice", async () => {
    const [a] = await draw(85);
    const [b] = await draw(85);
    expect(Buffer.from(a!).equals(Buffer.from(b!))).toBe(true);
  });

  it("gives the same picture where there are no system fonts", () => {
    const hash = (cwd: string) =>
      createHash("sha256")
        .update(readFileSync(join(cwd, "r/figures/birge-sponer.png")))
        .digest("hex");
    const words = ["report", "--series", "2885.98 5667.98 8346.78", "--bond", "1H 35Cl", "--out", "r"];
    const [usual, bare] = [emptyFolder(), emptyFolder()];
    writeFileSync(join(bare, "fonts.conf"), '<?xml version="1.0"?><fontconfig></fontconfig>\n');
    expect(rungwise(words, { cwd: usual }).code).toBe(0);
    expect(rungwise(words, { cwd: bare, env: { FONTCONFIG_FILE: join(bare, "fonts.conf") } }).code).toBe(0);
    expect(hash(bare)).toBe(hash(usual));
  });

  it("is loaded only when something is drawn", () => {
    // The command runs in this process and says at its end whether the canvas was loaded.
    const program = `
      const { start } = require(${JSON.stringify(resolve("dist/rungwise.cjs"))});
      process.on("exit", () => process.stderr.write("canvas: " + Object.keys(require.cache).some((file) => file.includes("@napi-rs"))));
      start(null);`;
    const loaded = (...words: string[]) =>
      spawnSync(process.execPath, ["-e", program, "rungwise", ...words], { encoding: "utf8", cwd: emptyFolder() })
        .stderr;
    const bands = ["--series", "1000 1980 2940", "--quiet"];
    expect(loaded("fit", ...bands)).toContain("canvas: false");
    expect(loaded("report", ...bands, "--out", "r")).toContain("canvas: true");
  });
});
