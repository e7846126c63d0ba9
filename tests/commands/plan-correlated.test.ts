import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { fit } from "../../src/commands/fit.ts";
import { type PlanRequest, plan } from "../../src/commands/plan.ts";
import { invert, normalEquations, solveLinear } from "../analysis/normal-equations.ts";

/** H35Cl, Rank, Rao & Wiggins 1965 (from memory). */
const hcl = [2885.9775, 5667.9841];
const common = { terms: 2, excess: "none", upTo: 6 } as const;

const listed = (labels: readonly string[], at: readonly number[]) => labels.map((l, i) => `${l} ${at[i]}`).join(", ");
const named = (at: readonly number[]) =>
  listed(
    at.map((_, i) => `${i + 1}-0`),
    at,
  );

/** Uncertainty of the aim in a real fit of these bands. */
async function uncertaintyOf(request: PlanRequest, bands: string, aim: string): Promise<number> {
  const { aim: _, window: __, sigmaNew: ___, hot: ____, ...rest } = request;
  const series = (await fit({ ...rest, bands })).series[0]!;
  return aim === "d0" ? series.dissociation[0]!.d0!.standardUncertainty! : series.constants[aim]!.standardUncertainty!;
}

describe("errors that bands have in common act on a new band as a refit has them", () => {
  it.each<[string, Partial<PlanRequest>]>([
    ["a wavelength offset, which grows with the square of the position", { sharedSigma: "0.01 nm" }],
    ["the same in air of a given density", { sharedSigma: "0.01 nm", medium: "air", air: "25 C, 90 kPa" }],
    ["the pull of a natural mixture, which grows with v", { bond: "1H Cl" }],
    ["the pull and an offset", { bond: "1H Cl", sharedSigma: 0.05 }],
    ["an offset, with hot bands", { sharedSigma: 0.05, hot: 1 }],
    ["a further constant known to ±0.1 and an offset", { terms: 3, fix: "weye=0.0(1)", sharedSigma: 0.05 }],
  ])("%s", async (_, more) => {
    for (const aim of ["we", "wexe", "d0"]) {
      const request: PlanRequest = { ...common, ...more, sigma: 0.02, sigmaNew: 0.02, bands: named(hcl), aim };
      const { candidates } = await plan(request);
      let compared = 0;
      for (const { label, position, uncertaintyAfter, observed } of candidates) {
        if (observed) continue;
        const again = await uncertaintyOf(request, `${request.bands}, ${label} ${position.value}`, aim);
        // the bound of the issue; with two bands the pull is that of the fit exactly
        expect(Math.abs(uncertaintyAfter / again - 1)).toBeLessThan(1e-9);
        compared += 1;
      }
      expect(compared).toBeGreaterThanOrEqual(4);
    }
  });

  it.each<[string, Partial<PlanRequest>]>([
    ["a calibration offset in nm", { sharedSigma: "0.01 nm" }],
    ["a calibration offset in cm-1, of the other sign in a shift", { sharedSigma: 0.05 }],
    ["an uncertain exciting line", { laser: "532.0(1)" }],
    ["both", { laser: "532.0(1)", sharedSigma: "0.01 nm" }],
  ])("Raman bands given as scattered wavelengths: %s", async (_, more) => {
    const line = 1e7 / 532;
    const bands = named(hcl.map((shift) => 1e7 / (line - shift)));
    const request: PlanRequest = {
      ...common,
      laser: "532",
      ...more,
      unit: "nm",
      sigma: "0.005 nm",
      bands,
      aim: "wexe",
    };
    const document = await plan({ ...request, sigmaNew: "0.005 nm" });
    expect(document.series[0]!.scattered).toBe(true);
    for (const { label, position, vacuumWavelength, uncertaintyAfter, observed } of document.candidates) {
      // where to look is the scattered light
      expect(Math.abs(1e7 / vacuumWavelength - (line - position.value))).toBeLessThan(1e-8);
      if (observed) continue;
      const again = await uncertaintyOf(request, `${bands}, ${label} ${vacuumWavelength}`, "wexe");
      expect(Math.abs(uncertaintyAfter / again - 1)).toBeLessThan(1e-9);
    }
  });

  it("Raman: windows in nm are for the scattered light, windows in cm-1 for the shift", async () => {
    const bands = named(hcl.map((shift) => 1e7 / (1e7 / 532 - shift)));
    const at = async (window: string) =>
      (await plan({ ...common, laser: "532", unit: "nm", sigma: 0.005, bands, aim: "wexe", window })).candidates
        .map(({ label }) => label)
        .sort();
    // 532 nm less 2886 and 5668 cm-1 lies at 628 and 762 nm
    expect(await at("600..800 nm")).toEqual(["1-0", "2-0"]);
    expect(await at("5000..9000")).toEqual(["2-0", "3-0"]);
  });
});

/** HDO, O-H (IUPAC task group 2010, from memory). */
const hdo = [3707.467, 7250.519, 10631.683, 13853.629, 16920.02];
const row = (v: number, terms: number) =>
  Array.from({ length: terms }, (_, k) => (k % 2 === 0 ? 1 : -1) * ((v + 0.5) ** (k + 1) - 0.5 ** (k + 1)));

/** Fit of `terms` constants by normal equations with the covariance V of the data, and the forecast of one further datum with covariances `tie` and variance. */
function forecast(terms: number, v: readonly number[][], tie: readonly number[], variance: number, level: number) {
  const rows = hdo.map((_, i) => row(i + 1, terms));
  const w = invert(v);
  const weighted = rows.map((_, i) => rows[0]!.map((__, k) => rows.reduce((s, x, j) => s + w[i]![j]! * x[k]!, 0)));
  const gram = rows[0]!.map((_, k) =>
    rows[0]!.map((__, l) => rows.reduce((s, x, i) => s + x[k]! * weighted[i]![l]!, 0)),
  );
  const onto = rows[0]!.map((_, k) => hdo.reduce((s, y, i) => s + weighted[i]![k]! * y, 0));
  const p = solveLinear(gram, onto);
  const far = row(level, terms);
  const pull = solveLinear(v, tie);
  const own = far.map((x, k) => x - rows.reduce((s, other, i) => s + pull[i]! * other[k]!, 0));
  const spread = own.reduce((s, x, k) => s + x * solveLinear(gram, own)[k]!, 0);
  const residuals = hdo.map((y, i) => y - rows[i]!.reduce((s, x, k) => s + x * p[k]!, 0));
  return {
    value: far.reduce((s, x, k) => s + x * p[k]!, 0) + residuals.reduce((s, r, i) => s + r * pull[i]!, 0),
    variance: variance - tie.reduce((s, t, i) => s + t * pull[i]!, 0) + spread,
  };
}

describe("aim model: the expected difference of the two forecasts over its uncertainty", () => {
  it.each([
    ["independent bands", 0, 0],
    ["an offset of 1 cm-1 common to all, the new one too", 1, 0],
    ["an added scatter", 0, 0.5],
    ["both", 1, 0.5],
  ])("%s: as COMPUTED by normal equations with the full covariance", async (_, shared, scatter) => {
    const { candidates } = await plan({
      bands: named(hdo),
      sigma: 1,
      sigmaNew: 0.7,
      terms: 2,
      excess: "none",
      ...(shared > 0 ? { sharedSigma: shared } : {}),
      ...(scatter > 0 ? { scatter } : {}),
      aim: "model",
      upTo: 8,
    });
    const v = hdo.map((_, i) => hdo.map((__, j) => shared ** 2 + (i === j ? 1 + scatter ** 2 : 0)));
    const tie = hdo.map(() => shared ** 2);
    const alone = 0.7 ** 2 + scatter ** 2 + shared ** 2;
    for (const { label, separation } of candidates) {
      const level = Number(label.split("-")[0]);
      const [two, three] = [2, 3].map((terms) => forecast(terms, v, tie, alone, level));
      const expected = Math.abs(three!.value - two!.value) / Math.sqrt(two!.variance);
      // normal equations lose the square of the condition (about 1e3): differences of 1e4 cm-1 are good to about 1e-8
      expect(Math.abs(separation! - expected)).toBeLessThan(1e-6);
    }
    // equal but for rounding: a low band tells as much as the high one it is balanced by
    const apart = candidates.map(({ separation }) => Number(separation!.toPrecision(9)));
    expect(apart).toEqual([...apart].sort((a, b) => b - a));
  });

  it("the normal equations of this test agree with those of others", () => {
    const rows = hdo.map((_, i) => row(i + 1, 2));
    const v = hdo.map((_, i) => hdo.map((__, j) => Number(i === j)));
    const { solution } = normalEquations(rows, hdo);
    const far = row(8, 2);
    const expected = far.reduce((s, x, k) => s + x * solution[k]!, 0);
    expect(Math.abs(forecast(2, v, [0, 0, 0, 0, 0], 1, 8).value - expected)).toBeLessThan(1e-6);
  });
});

describe("laws of plans", () => {
  const ladder = fc.record({
    w: fc.double({ min: 1000, max: 4000, noNaN: true }),
    ratio: fc.double({ min: 0.005, max: 0.02, noNaN: true }),
    aim: fc.constantFrom("we", "wexe", "d0", "prediction:6-0"),
    more: fc.constantFrom<Partial<PlanRequest>>(
      {},
      { sharedSigma: 0.3 },
      { sharedSigma: "0.02 nm", perQuantumSigma: 0.05 },
      { bond: "1H Cl" },
      { scatter: 0.4 },
      { sigmaNew: "0.05 nm" },
    ),
  });
  const positions = (w: number, ratio: number) => [1, 2, 3, 4].map((v) => v * w - v * (v + 1) * w * ratio);

  it("a further band never makes anything less known, correlated errors included; the best comes first", async () => {
    await fc.assert(
      fc.asyncProperty(ladder, async ({ w, ratio, aim, more }) => {
        const bands = named(positions(w, ratio));
        const { candidates } = await plan({ ...common, sigma: 0.1, bands, aim, hot: 1, ...more });
        // rounding of a difference of variances
        for (const { gain } of candidates) expect(gain).toBeGreaterThanOrEqual(1 - 1e-9);
        const gains = candidates.map(({ gain }) => Number(gain.toPrecision(9)));
        expect(gains).toEqual([...gains].sort((a, b) => b - a));
      }),
      { seed: 5, numRuns: 60 },
    );
  });

  it("the order of the bands does not matter", async () => {
    await fc.assert(
      fc.asyncProperty(
        ladder,
        fc.shuffledSubarray([0, 1, 2, 3], { minLength: 4, maxLength: 4 }),
        async ({ w, ratio, aim, more }, order) => {
          const at = positions(w, ratio);
          const labels = at.map((_, i) => `${i + 1}-0`);
          const request = { ...common, sigma: 0.1, aim, hot: 1, ...more };
          const once = await plan({ ...request, bands: listed(labels, at) });
          const shuffled = listed(
            order.map((i) => labels[i]!),
            order.map((i) => at[i]!),
          );
          const again = await plan({ ...request, bands: shuffled });
          expect(again.candidates.map(({ label }) => label)).toEqual(once.candidates.map(({ label }) => label));
          again.candidates.forEach(({ gain }, i) => {
            // rounding of another order of sums
            expect(Math.abs(gain / once.candidates[i]!.gain - 1)).toBeLessThan(1e-8);
          });
        },
      ),
      { seed: 6, numRuns: 40 },
    );
  });
});
