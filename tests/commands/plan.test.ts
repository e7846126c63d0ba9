import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { fit } from "../../src/commands/fit.ts";
import { type PlanRequest, plan } from "../../src/commands/plan.ts";
import { InputError } from "../../src/messages/index.ts";

/** H35Cl, Rank, Rao & Wiggins 1965 (from memory). */
const hcl = ["1-0 2885.9775", "2-0 5667.9841"];
const base = { sigma: 0.02, terms: 2, excess: "none" } as const;

/** The aim after a real fit with the band added where it was predicted. */
async function refitted(
  request: PlanRequest,
  bands: readonly string[],
  label: string,
  position: number,
  of: "wexe" | "d0" | string,
) {
  const added = [...bands, `${label} ${position}`].join(", ");
  const { aim: _, window: __, sigmaNew: ___, ...rest } = request;
  const series = (await fit({ ...rest, bands: added, upTo: 8 })).series[0]!;
  if (of === "d0") return series.dissociation[0]!.d0!.standardUncertainty!;
  const prediction = series.predictions.find((line) => line.label === of);
  return prediction?.position.standardUncertainty ?? series.constants[of]!.standardUncertainty!;
}

describe("the uncertainty after each candidate is that of a refit with the band added", () => {
  it.each<[string, Partial<PlanRequest>, string]>([
    ["wexe from HCl 1-0 and 2-0", {}, "wexe"],
    ["ωe", {}, "we"],
    ["D0", {}, "d0"],
    ["the prediction of 7-0", {}, "7-0"],
    ["wexe with a calibration error common to all", { sharedSigma: 0.05 }, "wexe"],
    ["D0 with an error that grows with v", { perQuantumSigma: 0.03 }, "d0"],
    ["ωe with a prior of weye", { fix: "weye=0.22(1)", terms: 3 }, "we"],
    ["wexe with an added scatter", { excess: "scatter", scatter: 0.3 }, "wexe"],
  ])("%s", async (_, more, of) => {
    const aim = /^\d/.test(of) ? `prediction:${of}` : of;
    const request: PlanRequest = { ...base, ...more, bands: hcl.join(", "), aim, upTo: 6 };
    const { candidates, now } = await plan(request);
    expect(candidates.length).toBeGreaterThanOrEqual(5);
    for (const { label, position, uncertaintyAfter, gain, observed } of candidates) {
      if (observed) continue;
      const expected = await refitted(request, hcl, label, position.value, of);
      // the bound of the issue; both are exact up to rounding
      expect(Math.abs(uncertaintyAfter / expected - 1)).toBeLessThan(1e-9);
      expect(Math.abs(gain * uncertaintyAfter - now.standardUncertainty!)).toBeLessThan(
        1e-9 * now.standardUncertainty!,
      );
    }
  });

  it("with another σ of its own", async () => {
    const request: PlanRequest = {
      ...base,
      bands: hcl.map((band) => `${band}(200)`).join(", "),
      aim: "wexe",
      sigmaNew: "0.01 nm",
    };
    const { candidates } = await plan(request);
    const best = candidates.find(({ label }) => label === "4-0")!;
    // dν̃ = ν̃²·dλ/1e7
    expect(Math.abs(best.sigmaNew / ((best.position.value ** 2 * 0.01) / 1e7) - 1)).toBeLessThan(1e-12);
    const digits = `${best.position.value}±${best.sigmaNew}`;
    const after = (
      await fit({ terms: 2, excess: "none", bands: [...hcl.map((band) => `${band}±0.02`), `4-0 ${digits}`].join(", ") })
    ).series[0]!;
    // 200 in the last digits of 2885.9775 is 0.02
    expect(Math.abs(best.uncertaintyAfter / after.constants.wexe!.standardUncertainty! - 1)).toBeLessThan(1e-9);
  });
});

describe("plans", () => {
  it("never make anything less known with σ given, and rank by gain", async () => {
    await fc.assert(
      fc.asyncProperty(
        fc.double({ min: 1000, max: 4000, noNaN: true }),
        fc.double({ min: 0.005, max: 0.02, noNaN: true }),
        fc.constantFrom("we", "wexe", "d0", "prediction:6-0"),
        async (w, ratio, aim) => {
          const series = [1, 2, 3].map((v) => v * w - v * (v + 1) * w * ratio).join(" ");
          const { candidates } = await plan({ series, sigma: 0.1, excess: "none", terms: 2, aim, hot: 1 });
          for (const { gain } of candidates) expect(gain).toBeGreaterThanOrEqual(1 - 1e-12);
          const gains = candidates.map(({ gain }) => gain);
          expect(gains).toEqual([...gains].sort((a, b) => b - a));
        },
      ),
      { seed: 5, numRuns: 40 },
    );
  });

  it("keep to the windows of lasers and detectors", async () => {
    const { candidates } = await plan({
      ...base,
      bands: hcl.join(", "),
      aim: "d0",
      window: "600..1000 nm, 2800..2900",
    });
    expect(candidates.map(({ label }) => label).sort()).toEqual(["1-0", "4-0", "5-0"]);
  });

  it("aim model: the band where two and three terms differ most for their uncertainty; for a ladder that is a high one", async () => {
    // HDO, O-H (IUPAC task group 2010, from memory): its weye is well determined
    const { candidates, aim } = await plan({
      series: "3707.467 7250.519 10631.683 13853.629 16920.020",
      sigma: 1,
      terms: 2,
      excess: "none",
      aim: "model",
      upTo: 8,
    });
    expect(aim).toBe("model");
    expect(candidates[0]!.label).toBe("8-0");
    expect(candidates[0]!.separation!).toBeGreaterThan(candidates.at(-1)!.separation!);
  });

  it("from constants with their correlation, or a stored result, as from the bands behind them", async () => {
    const request: PlanRequest = { ...base, bands: hcl.join(", "), aim: "wexe", sigmaNew: 0.02, upTo: 5 };
    const direct = await plan(request);
    const document = await fit({ ...base, bands: hcl.join(", ") });
    const stored = { text: JSON.stringify(document), source: "result.json" };
    const again = await plan({ stored, aim: "wexe", sigmaNew: 0.02, upTo: 5 });
    expect(again.candidates.map(({ label }) => label)).toEqual(direct.candidates.map(({ label }) => label));
    again.candidates.forEach(({ uncertaintyAfter }, i) => {
      // the same covariance, through JSON
      expect(Math.abs(uncertaintyAfter / direct.candidates[i]!.uncertaintyAfter - 1)).toBeLessThan(1e-9);
    });
    const { constants, correlation } = document.series[0]!;
    const text = ["we", "wexe"]
      .map((key) => `${key}=${constants[key]!.value}±${constants[key]!.standardUncertainty}`)
      .join(" ");
    const typed = await plan({ constants: text, correlation: correlation!.matrix[0]![1]!, aim: "d0", sigmaNew: 0.02 });
    expect(typed.candidates[0]!.gain).toBeGreaterThan(1);
  });

  it("say that constants without correlation are rough, where bands end, and that σ below the scatter does not count", async () => {
    const codes = async (request: PlanRequest) => {
      const { series } = await plan({ aim: "we", sigmaNew: 0.001, ...request });
      return series[0]!.warnings.map(({ code }) => code);
    };
    expect(await codes({ constants: "we=2990(1) wexe=52(1)" })).toEqual(["constants-uncorrelated"]);
    expect(await codes({ ...base, bands: hcl.join(", "), upTo: 60 })).toEqual(["above-highest-level"]);
    const unstated: PlanRequest = { series: "2885.98 5667.98 8346.78 10922.8", terms: 2 };
    expect(await codes(unstated)).toEqual(["sigma-new-not-reached"]);
    const { candidates } = await plan({ ...unstated, aim: "we", sigmaNew: 0.001 });
    const { quality } = (await fit(unstated)).series[0]!;
    // residuals of 0.3 are differences of numbers of 1e4: eleven digits are left
    for (const { sigmaNew } of candidates)
      expect(Math.abs(sigmaNew / quality.standardDeviation! - 1)).toBeLessThan(1e-10);
  });

  it("take the median of the stated σ where none is given for the new band", async () => {
    const sigmaOf = async (bands: string) => (await plan({ bands, terms: 2, aim: "we" })).candidates[0]!.sigmaNew;
    // mean of the two in the middle, to rounding
    expect(await sigmaOf("1-0 2885.98±0.02, 2-0 5667.98±0.04")).toBeCloseTo(0.03, 12);
    expect(await sigmaOf("1-0 2885.98±0.02, 2-0 5667.98±0.04, 3-0 8346.78±0.5")).toBe(0.04);
  });

  it("say how far to look on both sides, and which σ was assumed", async () => {
    const document = await plan({ series: "2885.98 5667.98 8346.78 10922.8", sigma: 0.05, terms: 2, aim: "wexe" });
    expect(document.candidates[0]!.lastBandOut).toBeGreaterThan(0);
    expect(document.warnings.map(({ code }) => code)).toEqual(["sigma-new-assumed"]);
  });

  it.each<[string, PlanRequest, string, 2 | 3]>([
    ["no aim", {}, "aim", 2],
    ["an aim that is none", { aim: "prediction:0-3" }, "aim", 2],
    ["a constant the model does not have", { aim: "weye" }, "aim", 2],
    ["a constant that is held", { aim: "wexe", fix: "wexe=52" }, "aim", 2],
    ["D0 of spacings that do not shrink", { aim: "d0", bands: "1-0 2885.98(2), 2-0 5800(1)", terms: 2 }, "aim", 2],
    ["a prediction above the highest bound level", { aim: "prediction:60-0" }, "aim", 2],
    ["a prediction that is no label", { aim: "prediction:seven" }, "aim", 2],
    ["an empty window", { aim: "we", window: " " }, "window", 2],
    ["a window in two units", { aim: "we", window: "600 nm..1 um" }, "window", 2],
    ["a window of no width", { aim: "we", window: "600..600 nm" }, "window", 2],
    ["a window without any band", { aim: "we", window: "200..210 nm" }, "no-candidates", 2],
    ["a window that is none", { aim: "we", window: "600-900 nm" }, "window", 2],
    ["a σ that is none", { aim: "we", sigmaNew: "small" }, "sigma-new", 2],
    ["a σ of zero", { aim: "we", sigmaNew: 0 }, "sigma-new", 2],
    ["two models that two bands cannot hold", { aim: "model" }, "larger-model-undetermined", 3],
    ["no uncertainty at all", { aim: "we", bands: "1-0 2885.98, 2-0 5667.98" }, "no-uncertainty", 3],
    [
      "constants without uncertainties",
      { aim: "we", constants: "we=2990 wexe=52", sigmaNew: 0.1 },
      "no-uncertainty",
      3,
    ],
    ["constants without a σ for new bands", { aim: "we", constants: "we=2990(1) wexe=52(1)" }, "sigma-new-missing", 2],
    ["two models from constants", { aim: "model", constants: "we=2990(1) wexe=52(1)" }, "no-two-models", 2],
    [
      "coupled bonds",
      { aim: "w", model: "coupled", bonds: 2, bands: "10+ 3657, 10- 3756, 20+ 7201.5, 11 7445", sigma: 1 },
      "no-plan",
      2,
    ],
    ["hot bands from nowhere", { aim: "we", hot: "x" }, "not-a-level", 2],
  ])("refuse %s", async (_, request, code, exit) => {
    const { bands, ...other } = request;
    const all: PlanRequest =
      bands !== undefined
        ? request
        : request.constants !== undefined
          ? other
          : { ...base, bands: hcl.join(", "), ...other };
    const error = await plan(all).catch((wrong: unknown) => wrong);
    expect(error).toBeInstanceOf(InputError);
    expect([(error as InputError).faults.map((fault) => fault.code), (error as InputError).exit]).toEqual([
      [code],
      exit,
    ]);
  });
});
