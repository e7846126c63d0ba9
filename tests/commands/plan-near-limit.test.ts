import { readFileSync } from "node:fs";
import { describe, expect, it } from "vitest";
import { fit } from "../../src/commands/fit.ts";
import { type PlanRequest, plan } from "../../src/commands/plan.ts";
import { InputError } from "../../src/messages/index.ts";

/** Exact levels of the law for n = 5: D 5000 cm-1, v_D 45, H 0.6 (invented). */
const level = (v: number) => 5000 - (0.6 * (45 - v)) ** (10 / 3);
const bands = [36, 37, 38, 39, 40].map((v) => `${v}-0 ${level(v)}`);
const request: PlanRequest = { bands: bands.join(", "), model: "near-limit", power: 5, sigma: 0.05, aim: "d0" };

describe("plans close under a limit", () => {
  it("look between the lowest level and the limit only, overtones and hot bands", async () => {
    const { candidates } = await plan({ ...request, upTo: 60, hot: 38 });
    const levels = candidates.map(({ label }) => label.split("-").map(Number) as [number, number]);
    for (const [upper, lower] of levels) {
      expect(upper).toBeGreaterThanOrEqual(36);
      expect(upper).toBeLessThan(45);
      expect(lower === 0 || lower >= 36).toBe(true);
    }
    expect(levels.some(([, lower]) => lower > 0)).toBe(true);
  });

  it("give the uncertainty of a refit with the band added where it is predicted", async () => {
    const { candidates, aim, now } = await plan({ ...request, excess: "none" });
    expect(aim).toBe("d0");
    // the invented limit
    expect(Math.abs(now.value - 5000)).toBeLessThan(1e-3);
    for (const { label, position, uncertaintyAfter, observed } of candidates) {
      if (observed) continue;
      const { aim: _, ...rest } = request;
      const again = (await fit({ ...rest, excess: "none", bands: `${request.bands}, ${label} ${position.value}` }))
        .series[0]!;
      // the fit stops when constants move by less than about 1e-8 of u; derivatives at the limit are steep
      expect(Math.abs(uncertaintyAfter / again.constants.d!.standardUncertainty! - 1)).toBeLessThan(1e-6);
    }
  });

  it.each<[string, PlanRequest, string, 2 | 3]>([
    ["a level above the limit", { ...request, aim: "prediction:47-0" }, "aim", 2],
    ["a level below those the law was fitted to", { ...request, aim: "prediction:2-0" }, "aim", 2],
    ["telling models apart", { ...request, aim: "model" }, "no-two-models", 2],
    [
      "levels that do not reach the limiting region: H2 (Komasa et al. 2011, READ), n = 6",
      {
        input: { text: readFileSync("datasets/h2.csv", "utf8"), source: "h2.csv", format: "csv" },
        model: "near-limit",
        power: 6,
        sigma: 0.001,
        aim: "d",
      },
      "not-near-limit",
      3,
    ],
  ])("refuse %s", async (_, asked, code, exit) => {
    const error = await plan(asked).catch((wrong: unknown) => wrong);
    expect(error).toBeInstanceOf(InputError);
    expect([(error as InputError).faults.map((fault) => fault.code), (error as InputError).exit]).toEqual([
      [code],
      exit,
    ]);
  });

  it("refuse a stored result that says no levels follow from it", async () => {
    const input = { text: readFileSync("datasets/h2.csv", "utf8"), source: "h2.csv", format: "csv" } as const;
    const text = JSON.stringify(await fit({ input, model: "near-limit", power: 6, sigma: 0.001 }));
    const asked = plan({ stored: { text, source: "result.json" }, aim: "d", sigmaNew: 0.001 });
    await expect(asked).rejects.toMatchObject({ exit: 3, faults: [{ code: "not-near-limit" }] });
  });
});
