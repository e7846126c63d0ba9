import { stripVTControlCharacters } from "node:util";
import { describe, expect, it } from "vitest";
import type { FitDocument } from "../../src/analysis/index.ts";
import { type FitTextOptions, renderFit, renderPredictions, renderWarnings } from "../../src/reporting/index.ts";
import { displayWidth } from "../../src/reporting/text/display-width.ts";
import { bare, compared, growing, local, sideBySide, symbols, threeBands } from "./documents.ts";

const plain: FitTextOptions = { colour: false, notation: "equilibrium", quiet: false, symbols: symbols() };
const all = { sideBySide, compared, threeBands, bare, growing, local };
const cases = Object.entries(all);

describe("a fit in the terminal", () => {
  it.each(cases)("keeps within 80 columns, without trailing spaces, one newline at the end (%s)", async (_, make) => {
    const document = await make();
    const text = renderFit(document, plain) + renderWarnings(document.series[0]!.warnings, plain);
    for (const line of text.split("\n")) {
      expect(displayWidth(line), line).toBeLessThanOrEqual(80);
      expect(line).toBe(line.trimEnd());
    }
    expect(text).toMatch(/[^\n]\n$/);
  });

  it.each(cases)("never shows NaN, undefined, null or a bare infinity (%s)", async (_, make) => {
    expect(renderFit(await make(), plain)).not.toMatch(/NaN|undefined|null|Infinity/);
  });

  it.each(cases)("reads the same without colour (%s)", async (_, make) => {
    const document = await make();
    const coloured = renderFit(document, { ...plain, colour: true });
    expect(coloured).not.toBe(renderFit(document, plain));
    expect(stripVTControlCharacters(coloured)).toBe(renderFit(document, plain));
  });

  // Two constants on three overtones leave (3ν1 − 3ν2 + ν3)/√19 = 0.175 cm-1, so rms 0.175/√3 = 0.10.
  it("prints quality in a fixed order", async () => {
    const text = renderFit(await threeBands(), plain).replace(/\n {2}/g, " ");
    expect(text).toMatch(
      /bands 3, constants 2, degrees of freedom 1, χ² —, reduced χ² —, probability —, rms 0\.10 cm⁻¹/,
    );
  });

  // Invented demo, fitted independently with numpy: 3765.96(11), 83.383(55), 0.197(7); χ² 4.96 on 4; 7-0 at 21775.5(8) and 459.103 nm in air.
  it("shows the constants of an independent fit, and its prediction", async () => {
    const text = renderFit(await sideBySide(), plain);
    expect(text).toMatch(/ωe +3765\.96\(11\)/);
    expect(text).toMatch(/ωexe +83\.383\(55\)/);
    expect(text).toMatch(/χ² 4\.96, reduced χ² 1\.24/);
    expect(text).toMatch(/7-0 +21775\.\d\d\(79\).* 459\.103\(17\)/);
  });

  it("sets several series side by side before each in full", async () => {
    const text = renderFit(await sideBySide(), plain);
    expect(text.startsWith("Side by side\n")).toBe(true);
    expect(text.indexOf("\na\n")).toBeLessThan(text.indexOf("\nb\n"));
    expect(renderFit(await threeBands(), plain)).not.toContain("Side by side");
  });

  it("adds another level of intervals and the comparison of terms when there are any", async () => {
    const text = renderFit(await compared(), plain);
    expect(text).toMatch(/95 % interval \/ +99 % interval \//);
    expect(text).toMatch(/^ {2}3, chosen +4 +4\.96 +0\.29 /m);
  });

  it("marks excluded bands in words and says why", async () => {
    const text = renderFit(await sideBySide(), plain);
    expect(text).toMatch(/3-0 .* — +not used/);
    expect(text).toContain("3-0 is not used: meets a dark state");
  });

  it("leaves observed bands out of the predictions", async () => {
    const section = /^Predictions\n([\s\S]*?)\n\n/m.exec(renderFit(await threeBands(), plain))![1]!;
    expect(section.match(/^ {2}\d-0/gm)).toEqual(["  4-0", "  5-0", "  6-0"]);
  });

  it("gives a dash and the reason for what is not determined", async () => {
    const text = renderFit(await bare(), plain);
    expect(text).toContain("No uncertainty can be had");
    expect(text).toMatch(/force constant \/ \(N m⁻¹\) +—/);
    expect(text).toContain("Force constant —: no masses are known.");
    expect(text).toContain("spacing sum —: fewer than three observed spacings");
    expect(renderFit(await growing(), plain)).toContain("Morse —: ωexe is not positive");
  });

  it("uses the local-mode symbols when asked", async () => {
    const text = renderFit(await local(), { ...plain, notation: "local", symbols: symbols("local") });
    expect(text).toMatch(/^ {2}ω̃x +\d/m);
    expect(text).toMatch(/^ {2}ω̃y +0\.22 \(held\)/m);
    expect(text).not.toContain("ωexe ");
  });

  it("says only constants and D0 when quiet", async () => {
    const lines = renderFit(await threeBands(), { ...plain, quiet: true }).split("\n");
    expect(lines.map((line) => line.replace(/=.*/, "="))).toEqual(["HCl", "  ωe =", "  ωexe =", "  D0 =", ""]);
    expect(lines[1]).toMatch(/^ {2}ωe = \d{4}\.\d+\(\d+\) cm⁻¹$/);
  });

  it("puts the safety lines beside dissociation energies and wavelengths", async () => {
    const text = renderFit(await threeBands(), plain).replace(/\s+/g, " ");
    expect(text).toContain("not for safety-critical use without an independent value");
    expect(text).toContain("local laser-safety rules and licensed practice");
  });
});

describe("warnings and predictions in the terminal", () => {
  it("begins each warning with the word and wraps it", () => {
    const text = renderWarnings([{ code: "x", message: "a ".repeat(60) }], { colour: false });
    expect(text.startsWith("warning: a a")).toBe(true);
    expect(text.split("\n")).toHaveLength(3);
    expect(renderWarnings([], { colour: false })).toBe("");
  });

  it("lists observed bands too, and says which they are", async () => {
    const { series }: FitDocument = await threeBands();
    const text = renderPredictions({ series }, { colour: false });
    expect(text).toMatch(/3-0 .* observed$/m);
    expect(text).toMatch(/4-0 .*\)$/m);
  });
});
