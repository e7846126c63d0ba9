import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { type Band, toSeries } from "../../src/bands/index.ts";
import { flags, ofBands, understand } from "./read.ts";

const parameters = { seed: 20240611, numRuns: 60 };

/** Bands with distinct labels, positions to 0.001, every second one with σ in its last digits. */
const bands = fc.uniqueArray(fc.integer({ min: 1, max: 30 }), { minLength: 1, maxLength: 8 }).chain((uppers) =>
  fc.tuple(
    ...uppers.map((upper) =>
      fc.record({
        label: fc.constant(`${upper}-0`),
        text: fc
          .tuple(fc.integer({ min: 300_000, max: 30_000_000 }), fc.integer({ min: 0, max: 99 }))
          .map(([thousandths, digits]) => `${(thousandths / 1000).toFixed(3)}${digits === 0 ? "" : `(${digits})`}`),
        unit: fc.constantFrom("cm-1", "nm", "THz"),
      }),
    ),
  ),
);

const essence = ({ label, position, sigma, asRead }: Band) => ({ label, position, sigma, asRead });
const read = (rows: readonly { label: string; text: string; unit: string }[]) =>
  toSeries(ofBands(rows.map(({ label, text, unit }) => `${label} ${text} ${unit}`).join(", ")), new Map());

describe("laws of reading", () => {
  it("the order of rows changes nothing but the order of bands", () => {
    fc.assert(
      fc.property(
        bands.chain((rows) => fc.tuple(fc.constant(rows), fc.shuffledSubarray(rows, { minLength: rows.length }))),
        ([rows, shuffled]) => {
          const sorted = (list: typeof rows) =>
            read(list)
              .series[0]!.bands.map(essence)
              .sort((a, b) => (a.label < b.label ? -1 : 1));
          expect(sorted(shuffled as typeof rows)).toEqual(sorted(rows));
        },
      ),
      parameters,
    );
  });

  it("CSV, TSV, TOML and --bands say the same", async () => {
    await fc.assert(
      fc.asyncProperty(bands, async (rows) => {
        const table = (separator: string) =>
          ["band,position,unit", ...rows.map(({ label, text, unit }) => `${label},${text},${unit}`)]
            .join("\n")
            .replaceAll(",", separator);
        const tables = rows.map(
          ({ label, text, unit }) => `[[bands]]\nband = "${label}"\nposition = "${text}"\nunit = "${unit}"\n`,
        );
        const flagged = read(rows).series[0]!.bands.map(essence);
        for (const { series } of [
          await understand(table(",")),
          await understand(table("\t"), {}, "tsv"),
          await understand(tables.join("\n"), {}, "toml"),
        ])
          expect(series[0]!.bands.map(essence)).toEqual(flagged);
      }),
      parameters,
    );
  });

  it("the unit of the request and the unit of each row say the same", () => {
    fc.assert(
      fc.property(bands, (rows) => {
        const bare = rows.map(({ label, text }) => `${label} ${text}`).join("; ");
        const own = read(rows.map((row) => ({ ...row, unit: "nm" })));
        expect(toSeries(ofBands(bare), flags({ unit: "nm" })).series[0]!.bands).toEqual(own.series[0]!.bands);
      }),
      parameters,
    );
  });

  it("scaling every position and σ in cm-1 scales the bands alike", () => {
    fc.assert(
      fc.property(bands, (rows) => {
        // times ten by moving the exponent, so that both texts are exact decimals
        const scaled = rows.map((row) => ({ ...row, unit: "cm-1", text: `${row.text}e1` }));
        const plain = read(rows.map((row) => ({ ...row, unit: "cm-1" }))).series[0]!.bands;
        read(scaled).series[0]!.bands.forEach((band, i) => {
          // two correctly rounded decimals differ from the exact ratio by some 2 units of 1.1e-16
          expect(Math.abs(band.position / plain[i]!.position / 10 - 1)).toBeLessThan(1e-15);
          if (plain[i]!.sigma !== null) expect(Math.abs(band.sigma! / plain[i]!.sigma! / 10 - 1)).toBeLessThan(1e-14);
          else expect(band.sigma).toBeNull();
        });
      }),
      parameters,
    );
  });

  it("no text makes the readers fail in any other way than by saying what is wrong", async () => {
    const piece = fc.constantFrom(
      "band",
      "position",
      "unit",
      ",",
      "\n",
      "#",
      '"',
      "1-0",
      "2885.98",
      "(2)",
      "±",
      "nm",
      " ",
      ":",
      "[[bands]]",
      "=",
      "x",
      "-",
      ";",
    );
    const text = fc.array(piece, { maxLength: 40 }).map((pieces) => pieces.join(""));
    await fc.assert(
      fc.asyncProperty(text, fc.constantFrom("csv", "tsv", "toml" as const), async (input, format) => {
        try {
          await understand(input, {}, format as "csv");
        } catch (error) {
          expect((error as Error).name).toBe("InputError");
        }
      }),
      { ...parameters, numRuns: 500 },
    );
  });
});
