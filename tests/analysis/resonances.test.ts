import { describe, expect, it } from "vitest";
import { fit } from "../../src/commands/fit.ts";
import type { FitRequest } from "../../src/commands/request.ts";
import { InputError } from "../../src/messages/index.ts";

/** ω̃ 3700, ω̃x 87: positions v·3700 - v(v+1)·87; 3-0 pushed down by 4. */
const position = (v: number) => v * 3700 - v * (v + 1) * 87;
const bands = [1, 2, 3, 4, 5]
  .map((v) => `${v}-0 ${position(v) - (v === 3 ? 4 : 0)}(10)`.replace(/(\d+)\(10\)/, "$1.00(10)"))
  .join(", ");
const resonances = async (more: FitRequest) => (await fit({ bands, terms: 2, ...more })).series[0]!.resonances!;

describe("near-degeneracies", () => {
  it("finds the combinations by hand: 3-0 at 10056 against 2 stretch + bend + rock", async () => {
    // G(2) = 6878; bend 2000 + rock 1190 = 3190: 10068, 12 above 3-0 (10056)
    const { candidates, standsOut } = await resonances({ modes: "bend 2000(3), rock 1190(4)", window: 30 });
    const found = candidates.find(({ state }) => state === "2 stretch + bend + rock")!;
    expect(found).toMatchObject({ band: "3-0", stretch: 2, modes: { bend: 1, rock: 1 }, order: 3, matched: true });
    // the fit stands 4 off at 3-0 and moves its curve by a good half of that
    expect(Math.abs(found.gap - 12)).toBeLessThan(3);
    expect(Math.abs(found.gapUncertainty! - 5)).toBeLessThan(1e-9);
    expect(standsOut).toBe("3-0");
    expect(candidates[0]).toBe(found);
  });

  it("a level on the other side does not match: it would push the band up", async () => {
    const { candidates } = await resonances({ modes: "bend 1980, rock 1180", window: 40 });
    const below = candidates.filter(({ band, gap }) => band === "3-0" && gap < 0);
    expect(below.length).toBeGreaterThan(0);
    expect(below.every(({ matched }) => !matched)).toBe(true);
  });

  it("every candidate lies within the window, in the order of closeness and order, matched ones first", async () => {
    const { candidates } = await resonances({ modes: "bend 1370, rock 1020(5), torsion 280", window: 60 });
    const weight = candidates.map(({ gap, order, matched }) => (matched ? -1e9 : 0) + Math.abs(gap) * 5 ** (order - 3));
    expect(weight).toEqual([...weight].sort((a, b) => a - b));
    for (const { gap, position: at, stretch, modes } of candidates) {
      expect(Math.abs(gap)).toBeLessThanOrEqual(60);
      const quanta = Object.values(modes).reduce((sum, n) => sum + n, 0);
      expect(quanta).toBeGreaterThan(0);
      expect(at).toBeGreaterThan(0);
      expect(stretch).toBeGreaterThanOrEqual(0);
    }
  });

  it("names one band that would test the first: an overtone where the trade is closer, or the companion", async () => {
    const { test, candidates } = await resonances({ modes: "bend 2000, rock 1190", window: 30 });
    if (test!.kind === "companion") expect(test!.position).toBe(candidates[0]!.position);
    else expect(Math.abs(test!.gap)).toBeLessThan(Math.abs(candidates[0]!.gap));
  });

  it("says so when there is none", async () => {
    const { candidates, test } = await resonances({ modes: "far 50000" });
    expect([candidates, test]).toEqual([[], null]);
  });

  it.each<[string, FitRequest, string]>([
    ["a mode without a number", { modes: "bend" }, "modes"],
    ["a mode of no wavenumber", { modes: "bend -3" }, "modes"],
    ["a mode twice", { modes: "bend 1370, bend 1400" }, "mode-twice"],
    ["a window without modes", { window: 20 }, "window-without-modes"],
    ["a window that is not positive", { modes: "bend 1370", window: 0 }, "out-of-range"],
    [
      "modes beside a model of coupled bonds",
      { model: "coupled", bonds: 2, modes: "bend 1370" },
      "modes-of-another-model",
    ],
  ])("refuses %s", async (_, more, code) => {
    const error = await fit({ bands, ...more }).catch((wrong: unknown) => wrong);
    expect(error).toBeInstanceOf(InputError);
    expect((error as InputError).faults[0]!.code).toBe(code);
  });
});
