import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { check } from "../../src/commands/check.ts";
import { fit } from "../../src/commands/fit.ts";
import { plan } from "../../src/commands/plan.ts";
import type { FitRequest } from "../../src/commands/request.ts";
import type { InputError } from "../../src/messages/index.ts";
import { generator } from "./ladders.ts";
import { invert } from "./normal-equations.ts";

type Bands = Readonly<Record<string, readonly (readonly [number, number])[]>>;
const SIGMA = 0.1;
const file = (text: string) => ({ text, source: "bands.csv", format: "csv" as const });
const table = (bands: Bands, sigma = SIGMA) =>
  [
    "series,band,position,sigma",
    ...Object.entries(bands).flatMap(([name, all]) => all.map(([v, at]) => `${name},${v}-0,${at},${sigma}`)),
  ].join("\n");
/** ±[(v+½)^k - (½)^k] */
const powers = (v: number, terms: number) =>
  Array.from({ length: terms }, (_, k) => (k === 1 ? -1 : 1) * ((v + 0.5) ** (k + 1) - 0.5 ** (k + 1)));

/** COMPUTED by an independent calculation: C = (XᵀV⁻¹X + D)⁻¹ and p = C·XᵀV⁻¹y with V of all bands written out and inverted. */
function written(
  bands: Bands,
  terms: number,
  shared: readonly number[],
  common: (v: number) => readonly number[],
  spread: ReadonlyMap<number, number> = new Map(),
) {
  const names = Object.keys(bands);
  const tight = shared.filter((k) => !spread.has(k));
  const own = names.length * terms;
  const column = (i: number, k: number) => (tight.includes(k) ? own + shared.indexOf(k) : i * terms + k);
  const rows: number[][] = [];
  const y: number[] = [];
  const causes: (readonly number[])[] = [];
  names.forEach((name, i) => {
    for (const [v, position] of bands[name]!) {
      const row = new Array<number>(own + shared.length).fill(0);
      powers(v, terms).forEach((x, k) => {
        row[column(i, k)] = x;
      });
      rows.push(row);
      y.push(position);
      causes.push(common(v));
    }
  });
  const weight = invert(
    rows.map((_, a) =>
      rows.map((__, b) => (a === b ? SIGMA ** 2 : 0) + causes[a]!.reduce((sum, c, m) => sum + c * causes[b]![m]!, 0)),
    ),
  );
  const used = Array.from({ length: own + shared.length }, (_, j) => j).filter(
    (j) => j >= own || !tight.includes(j % terms),
  );
  const times = (row: readonly number[], j: number) => row.reduce((sum, w, b) => sum + w * rows[b]![j]!, 0);
  const weighted = weight.map((row) => used.map((j) => times(row, j)));
  const gram = used.map((j) => used.map((_, m) => rows.reduce((sum, row, a) => sum + row[j]! * weighted[a]![m]!, 0)));
  for (const [k, within] of spread)
    names.forEach((_, i) => {
      const [a, b] = [used.indexOf(i * terms + k), used.indexOf(own + shared.indexOf(k))];
      for (const [p, q, sign] of [
        [a, a, 1],
        [b, b, 1],
        [a, b, -1],
        [b, a, -1],
      ] as const)
        gram[p]![q]! += sign / within ** 2;
    });
  const covariance = invert(gram);
  const onto = used.map((_, m) => y.reduce((sum, at, a) => sum + at * weighted[a]![m]!, 0));
  const p = covariance.map((row) => row.reduce((sum, c, m) => sum + c * onto[m]!, 0));
  const at = (i: number, k: number) => used.indexOf(column(i, k));
  const residuals = y.map((value, a) => value - used.reduce((sum, j, m) => sum + rows[a]![j]! * p[m]!, 0));
  return {
    value: (i: number, k: number) => p[at(i, k)]!,
    covariance: (i: number, k: number, j: number, l: number) => covariance[at(i, k)]![at(j, l)]!,
    chiSquare: residuals.reduce((sum, r, a) => sum + r * residuals.reduce((s, q, b) => s + weight[a]![b]! * q, 0), 0),
    degreesOfFreedom: y.length - used.length,
  };
}

const KEYS = ["we", "wexe", "weye"];

/** Constants, covariance and differences of the document against the written fit. */
async function expectWritten(request: FitRequest, expected: ReturnType<typeof written>, terms: number): Promise<void> {
  const { series, comparisons } = await fit({ ...request, excess: "none", terms });
  series.forEach(({ constants, covariance }, i) => {
    for (let k = 0; k < terms; k++) {
      const u = Math.sqrt(expected.covariance(i, k, i, k));
      // the written normal equations keep about nine digits of the largest constant
      expect(Math.abs(constants[KEYS[k]!]!.value - expected.value(i, k))).toBeLessThan(1e-5);
      for (let l = 0; l < terms; l++) {
        const scale = u * Math.sqrt(expected.covariance(i, l, i, l));
        expect(Math.abs(covariance![k]![l]! - expected.covariance(i, k, i, l)) / scale).toBeLessThan(1e-5);
      }
    }
  });
  let pair = 0;
  for (let i = 0; i < series.length; i++)
    for (let j = i + 1; j < series.length; j++)
      for (const { key, difference } of comparisons[pair++]!.differences) {
        const k = KEYS.indexOf(key);
        if (k < 0) continue;
        const variance =
          expected.covariance(i, k, i, k) + expected.covariance(j, k, j, k) - 2 * expected.covariance(i, k, j, k);
        expect(Math.abs(difference.standardUncertainty! / Math.sqrt(variance) - 1)).toBeLessThan(1e-4);
      }
}

/** Three bonds of one ωexe (and ωeye); the second and third are short. */
function bonds(seed: number, terms: number, lengths: readonly number[], offset = 0): Bands {
  const { normal } = generator(seed);
  return Object.fromEntries(
    lengths.map((n, i) => [
      "abc"[i]!,
      Array.from({ length: n }, (_, b) => {
        const p = [3700 - 50 * i, 80, 0.3].slice(0, terms);
        const at = powers(b + 1, terms).reduce((sum, x, k) => sum + x * p[k]!, 0);
        return [b + 1, at + offset + SIGMA * normal()] as const;
      }),
    ]),
  );
}

describe("the joint fit behind --share", () => {
  const seeds = fc.integer({ min: 1, max: 1e6 });

  it("with an error common to all series: one and the same error, in constants, covariance and differences", () =>
    fc.assert(
      fc.asyncProperty(
        seeds,
        fc.double({ min: 0.02, max: 2, noNaN: true }),
        fc.boolean(),
        async (seed, size, perQuantum) => {
          const bands = bonds(seed, 2, [3, 2, 1]);
          const more = perQuantum ? { perQuantumSigma: size } : { sharedSigma: size };
          const expected = written(bands, 2, [1], (v) => [perQuantum ? size * v : size]);
          await expectWritten({ input: file(table(bands)), share: "wexe", ...more }, expected, 2);
        },
      ),
      { seed: 31, numRuns: 25 },
    ));

  it("with several constants in common, and with one of them alike within a spread", () =>
    fc.assert(
      fc.asyncProperty(seeds, async (seed) => {
        const bands = bonds(seed, 3, [5, 2, 1]);
        const request = { input: file(table(bands)), sharedSigma: 0.2 };
        const common = () => [0.2];
        await expectWritten({ ...request, share: "wexe weye" }, written(bands, 3, [1, 2], common), 3);
        const spread = new Map([[1, 0.5]]);
        await expectWritten({ ...request, share: "wexe±0.5, weye" }, written(bands, 3, [1, 2], common, spread), 3);
      }),
      { seed: 32, numRuns: 15 },
    ));

  it("gives its χ² and its degrees of freedom to every series", async () => {
    const bands = bonds(7, 2, [4, 3, 2]);
    const expected = written(bands, 2, [1], () => [0.3]);
    const { series } = await fit({ input: file(table(bands)), share: "wexe", sharedSigma: 0.3, excess: "none" });
    for (const { quality } of series) {
      expect(quality.degreesOfFreedom).toBe(expected.degreesOfFreedom);
      // the written inverse keeps about eight digits
      expect(Math.abs(quality.chiSquare! / expected.chiSquare - 1)).toBeLessThan(1e-6);
    }
  });

  it("leaves a held constant as it is in all series", async () => {
    const bands = bonds(8, 3, [4, 3, 2]);
    const request: FitRequest = { share: "wexe", terms: 3, fix: "weye=0.3", excess: "none" };
    const { series } = await fit({ input: file(table(bands)), ...request });
    // the same as sharing it where its part was subtracted beforehand
    const less = Object.fromEntries(
      Object.entries(bands).map(([name, all]) => [
        name,
        all.map(([v, at]) => [v, at - 0.3 * powers(v, 3)[2]!] as const),
      ]),
    );
    const two = await fit({ input: file(table(less)), share: "wexe", terms: 2, excess: "none" });
    series.forEach(({ constants, held }, i) => {
      expect(held).toEqual(["weye"]);
      // rounding of positions near 1e4
      for (const key of ["we", "wexe"])
        expect(Math.abs(constants[key]!.value - two.series[i]!.constants[key]!.value)).toBeLessThan(1e-8);
    });
  });

  it("is bounded by profiles as by its covariance, for constants are normal in a linear fit", async () => {
    const request: FitRequest = { input: file(table(bonds(9, 2, [4, 3, 1]))), share: "wexe", sharedSigma: 0.2 };
    const [linear, profile] = [await fit(request), await fit({ ...request, intervals: "profile" })];
    linear.series.forEach(({ constants }, i) => {
      for (const key of ["we", "wexe"]) {
        const { interval95, standardUncertainty } = constants[key]!;
        const found = profile.series[i]!.constants[key]!.interval95!;
        // where the search along the profile stops
        interval95!.forEach((bound, end) => {
          expect(Math.abs(bound - found[end]!) / standardUncertainty!).toBeLessThan(1e-4);
        });
      }
    });
  });

  it("finds no difference where there is none as often as it says, under a calibration error common to both: 400 pairs, Kolmogorov–Smirnov", async () => {
    const p: Record<string, number[]> = { we: [], d0: [] };
    for (let seed = 1; seed <= 400; seed++) {
      const { normal } = generator(seed * 104729);
      const offset = normal();
      const make = (n: number) =>
        Array.from({ length: n }, (_, b) => {
          const x = powers(b + 1, 2);
          return [b + 1, 3700 * x[0]! + 80 * x[1]! + offset + SIGMA * normal()] as const;
        });
      const input = file(table({ a: make(4), b: make(2) }));
      const { comparisons } = await fit({ input, share: "wexe", sharedSigma: 1, excess: "none" });
      for (const { key, probability } of comparisons[0]!.differences) p[key]!.push(probability!);
    }
    for (const all of Object.values(p)) {
      all.sort((a, b) => a - b);
      const distance = Math.max(
        ...all.map((x, i) => Math.max(Math.abs(x - i / all.length), Math.abs(x - (i + 1) / all.length))),
      );
      // 1.63/√400: the 1 % point of Kolmogorov–Smirnov
      expect(distance).toBeLessThan(1.63 / 20);
    }
  });

  it("is what a plan improves: the uncertainty after a band is that of a refit with it", async () => {
    const bands = bonds(1, 2, [4, 3, 1]);
    const request = { share: "wexe", terms: 2, excess: "none" };
    const { series } = await plan({ input: file(table(bands)), ...request, aim: "we", sigmaNew: SIGMA });
    const next = series[2]!.candidates.find(({ label }) => label === "2-0")!;
    const more = { ...bands, c: [...bands.c!, [2, 6900] as const] };
    const after = (await fit({ input: file(table(more)), ...request })).series[2]!.constants.we!.standardUncertainty!;
    // the bound of the issue
    expect(Math.abs(next.uncertaintyAfter / after - 1)).toBeLessThan(1e-9);
  });

  it("with errors common to all series has no place in a plan", async () => {
    const input = file(table(bonds(1, 2, [4, 3, 2])));
    const wrong = await plan({ input, share: "wexe", sharedSigma: 0.1, aim: "we" }).catch((error: unknown) => error);
    expect((wrong as InputError).faults[0]!.code).toBe("share-not-possible");
  });
});

describe("comparisons of the document", () => {
  it("are made again by check", async () => {
    const input = file(table(bonds(3, 2, [4, 3])));
    const document = await fit({ input });
    expect((await check({ stored: { text: JSON.stringify(document), source: "result.json" }, input })).ok).toBe(true);
    const text = JSON.stringify(document, (key, value) => (key === "probability" && value !== null ? 0.5 : value));
    const { differences } = await check({ stored: { text, source: "result.json" }, input });
    expect(differences.some(({ where }) => where.startsWith("comparisons[0]"))).toBe(true);
  });

  it("of more than twelve series are those with the constants given, and no pairs", async () => {
    const many = Object.fromEntries(Array.from({ length: 13 }, (_, i) => [`s${i}`, bonds(i + 1, 2, [4]).a!] as const));
    const { comparisons } = await fit({ input: file(table(many)), terms: 2, compare: "we=3700(1) wexe=80(1)" });
    expect(comparisons.map(({ first }) => first)).toEqual(new Array(13).fill("given constants"));
  });

  it("warn where the numbers of constants are unlike", async () => {
    const input = file(table({ a: bonds(4, 3, [6]).a!, b: bonds(5, 2, [2]).a! }));
    const codes = async (more: FitRequest) => (await fit({ input, ...more })).warnings.map(({ code }) => code);
    expect(await codes({})).toContain("terms-unlike");
    expect(await codes({ terms: 2 })).not.toContain("terms-unlike");
  });
});
