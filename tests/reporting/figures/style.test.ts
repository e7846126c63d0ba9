import { readFileSync } from "node:fs";
import { createRequire } from "node:module";
import { describe, expect, it } from "vitest";
import { figuresFor } from "../../../src/reporting/figures/index.ts";
import { extrapolatedDash, SIZE, seriesStyle } from "../../../src/reporting/figures/style.ts";
import { quotient, SYMBOL, UNIT } from "../../../src/reporting/figures/symbols.ts";
import { overtones, sampleResult } from "./sample-results.ts";

/** Contrast of a colour to white (WCAG 2: relative luminance). */
function contrast(colour: string): number {
  const [r, g, b] = [1, 3, 5].map((at) => {
    const c = Number.parseInt(colour.slice(at, at + 2), 16) / 255;
    return c <= 0.04045 ? c / 12.92 : ((c + 0.055) / 1.055) ** 2.4;
  }) as [number, number, number];
  return 1.05 / (0.2126 * r + 0.7152 * g + 0.0722 * b + 0.05);
}

/** The characters a TrueType font has glyphs for (cmap formats 4 and 12). */
function characters(path: string): (code: number) => boolean {
  const font = readFileSync(path);
  const tables = font.readUInt16BE(4);
  let cmap = 0;
  for (let i = 0; i < tables; i++)
    if (font.toString("latin1", 12 + 16 * i, 16 + 16 * i) === "cmap") cmap = font.readUInt32BE(20 + 16 * i);
  const ranges: [number, number][] = [];
  for (let i = 0; i < font.readUInt16BE(cmap + 2); i++) {
    const at = cmap + font.readUInt32BE(cmap + 8 + 8 * i);
    const format = font.readUInt16BE(at);
    if (format === 4) {
      const count = font.readUInt16BE(at + 6) / 2;
      for (let s = 0; s < count; s++)
        ranges.push([font.readUInt16BE(at + 16 + 2 * count + 2 * s), font.readUInt16BE(at + 14 + 2 * s)]);
    } else if (format === 12)
      for (let g = 0; g < font.readUInt32BE(at + 12); g++)
        ranges.push([font.readUInt32BE(at + 16 + 12 * g), font.readUInt32BE(at + 20 + 12 * g)]);
  }
  return (code) => ranges.some(([from, to]) => code >= from && code <= to && code !== 0xffff);
}

const arimo = (file: string) => createRequire(import.meta.url).resolve(`@expo-google-fonts/arimo/${file}`);

describe("the look of series", () => {
  const six = Array.from({ length: 6 }, (_, i) => seriesStyle(i));

  it("has colours with a contrast to white of at least 3", () => {
    for (const { colour } of six) expect(contrast(colour)).toBeGreaterThanOrEqual(3);
  });

  it("tells any two of six apart by marker and by dash, not by colour alone", () => {
    six.forEach((a, i) =>
      six.slice(i + 1).forEach((b) => {
        expect(a.marker).not.toBe(b.marker);
        expect(a.dashPt).not.toEqual(b.dashPt);
      }),
    );
  });

  it("breaks an extrapolated line in another way than the line itself", () => {
    for (const { dashPt } of six) expect(extrapolatedDash(dashPt)).not.toEqual(dashPt);
  });

  it("keeps to the sizes journals ask for: text 7 to 9 pt, scripts from 6 pt, lines from 0.5 pt, marks 3 to 5 pt", () => {
    for (const pt of [SIZE.text, SIZE.small]) {
      expect(pt).toBeGreaterThanOrEqual(7);
      expect(pt).toBeLessThanOrEqual(9);
    }
    expect(SIZE.script).toBeGreaterThanOrEqual(6);
    for (const pt of [SIZE.frame, SIZE.thin, SIZE.bar, SIZE.line]) expect(pt).toBeGreaterThanOrEqual(0.5);
    expect(SIZE.marker).toBeGreaterThanOrEqual(3);
    expect(SIZE.marker).toBeLessThanOrEqual(5);
  });
});

describe("labels", () => {
  it("are quantity over unit, quantities italic, units and descriptive subscripts roman", () => {
    const label = quotient(SYMBOL.wavenumber, UNIT.wavenumber);
    expect(label.map(({ text }) => text).join("")).toBe("ν\u0303 / cm−1");
    expect(label[0]!.italic).toBe(true);
    expect(label.slice(1).some(({ italic }) => italic)).toBe(false);
    const depth = SYMBOL.wellDepth;
    expect(depth).toEqual([
      { text: "D", italic: true },
      { text: "e", script: "sub" },
    ]);
  });

  it("put a difference in parentheses before the solidus", () => {
    const text = quotient(SYMBOL.observedMinusCalculated, UNIT.wavenumber)
      .map(({ text: part }) => part)
      .join("");
    expect(text).toMatch(/^\(.* − .*\) \/ cm/);
  });

  it("use only characters that the shipped fonts have", () => {
    const has = {
      roman: characters(arimo("400Regular/Arimo_400Regular.ttf")),
      italic: characters(arimo("400Regular_Italic/Arimo_400Regular_Italic.ttf")),
    };
    const figures = (["equilibrium", "local"] as const).flatMap((notation) =>
      figuresFor([sampleResult(), sampleResult({ name: "b", we: 3800, wexe: 80, labels: overtones(4) })], {
        widthMm: 85,
        notation,
      }),
    );
    const runs = figures.flatMap(({ panels }) =>
      panels.flatMap(({ x, y, x2, texts }) => [
        ...x.label,
        ...y.label,
        ...(x2?.label ?? []),
        ...texts.flatMap((text) => text.runs),
      ]),
    );
    const missing = runs.flatMap(({ text, italic }) =>
      [...text].filter((c) => !has[italic ? "italic" : "roman"](c.codePointAt(0)!)),
    );
    expect(runs.length).toBeGreaterThan(20);
    expect(missing).toEqual([]);
  });
});
