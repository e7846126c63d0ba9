import { describe, expect, it } from "vitest";
import { fit } from "../../src/commands/fit.ts";
import type { FitRequest } from "../../src/commands/request.ts";
import { InputError } from "../../src/messages/index.ts";

/** ω̃ 3700, ω̃x 87: positions v·3700 - v(v+1)·87; 3-0 pushed down by 4. */
const position = (v: number) => v * 3700 - v * (v + 1) * 87;
const typed = (v: number, shift = 0) => `${v}-0 ${(position(v) + shift).toFixed(2)}(10)`;
const bands = [1, 2, 3, 4, 5].map((v) => typed(v, v === 3 ? -4 : 0)).join(", ");
const smooth = [1, 2, 3, 4, 5].map((v) => typed(v)).join(", ");
const series = async (request: FitRequest) => (await fit({ bands, terms: 2, ...request })).series[0]!;
const resonances = async (more: FitRequest) => (await series(more)).resonances!;

/** The demo's bond b, invented: truth 3-0 at 10061.40 and a dark state 21.0 above it, W 9.5, bright 10057.74, dark 10086.06, ratio 6.7. */
const demo: FitRequest = {
  bands: "1-0 3527.37(3), 2-0 6881.26(5), 3-0 993.985(10) nm air, 4-0 764.998(10) nm air, 5-0 628.716(10) nm air",
};

describe("near-degeneracies", () => {
  it("finds the combinations by hand: 3-0 at 10056 against 2 stretch + bend + rock", async () => {
    // G(2) = 6878; bend 2000 + rock 1190 = 3190: 10068, 12 above 3-0 (10056)
    const { candidates, standsOut, without } = await resonances({ modes: "bend 2000(3), rock 1190 ± 4", window: 30 });
    const found = candidates.find(({ state }) => state === "2 stretch + bend + rock")!;
    expect(found).toMatchObject({ band: "3-0", stretch: 2, modes: { bend: 1, rock: 1 }, order: 3, matched: true });
    // the other bands lie on the law exactly, so the fit without 3-0 is the law to rounding
    expect(Math.abs(found.gap - 12)).toBeLessThan(1e-6);
    expect(Math.abs(found.residual! + 4)).toBeLessThan(1e-6);
    expect(Math.abs(found.gapUncertainty! - 5)).toBeLessThan(1e-9);
    // two levels 12 apart by themselves, each moved by 4: (20/2)² = (12/2)² + W²
    expect(Math.abs(found.coupling! - 8)).toBeLessThan(1e-6);
    expect([standsOut, without]).toEqual(["3-0", "3-0"]);
    expect(candidates[0]).toBe(found);
  });

  it("lists every combination that a plain search over all quanta finds, and no other", async () => {
    const modes = { bend: 1370, rock: 1020, wag: 940 };
    const window = 14;
    const expected: string[] = [];
    for (let v = 1; v <= 6; v++)
      for (const left of [v - 1, v - 2].filter((n) => n >= 0))
        for (let b = 0; b <= 6; b++)
          for (let r = 0; r <= 6 - b; r++)
            for (let w = 0; w <= 6 - b - r; w++) {
              const at = position(left) + b * modes.bend + r * modes.rock + w * modes.wag;
              if (Math.abs(at - position(v)) <= window) expected.push([v, left, b, r, w].join());
            }
    const { candidates } = await resonances({ bands: smooth, modes: "bend 1370, rock 1020, wag 940", window });
    // few enough that none is cut off, and some
    expect(expected.length).toBeGreaterThan(1);
    expect(expected.length).toBeLessThanOrEqual(12);
    const found = candidates.map((c) =>
      [Number.parseInt(c.band, 10), c.stretch, c.modes.bend ?? 0, c.modes.rock ?? 0, c.modes.wag ?? 0].join(),
    );
    expect(found.sort()).toEqual(expected.sort());
  });

  it("a level on the other side does not match: it would push the band up", async () => {
    const { candidates } = await resonances({ modes: "bend 1980, rock 1180", window: 40 });
    const below = candidates.filter(({ band, gap }) => band === "3-0" && gap < 0);
    expect(below.length).toBeGreaterThan(0);
    expect(below.every(({ matched, coupling }) => !matched && coupling === null)).toBe(true);
  });

  it("every candidate lies within the window, in the order of closeness and order, matched ones first", async () => {
    const { candidates } = await resonances({ modes: "bend 1370, rock 1020(5), torsion 280", window: 60 });
    const weight = candidates.map(
      ({ gap, order, matched }) => (matched ? -1e9 : 0) + Math.hypot(gap, 10) * 5 ** (order - 3),
    );
    expect(weight).toEqual([...weight].sort((a, b) => a - b));
    for (const { gap, position: at, stretch, modes } of candidates) {
      expect(Math.abs(gap)).toBeLessThanOrEqual(60);
      const quanta = Object.values(modes).reduce((sum, n) => sum + n, 0);
      expect(quanta).toBeGreaterThan(0);
      expect(at).toBeGreaterThan(0);
      expect(stretch).toBeGreaterThanOrEqual(0);
    }
  });

  it("names the companion beside its band as the test, pushed away as far as the band, and its share of intensity", async () => {
    const { test } = await resonances({ modes: "bend 2000, rock 1190", window: 30 });
    // 10068 by itself, pushed up by the 4 that 3-0 is pushed down; R = Δ/s - 1 = 20/4 - 1
    expect(test).toMatchObject({ kind: "companion", label: "3-0" });
    expect(Math.abs(test!.position - 10072)).toBeLessThan(1e-6);
    expect(Math.abs(test!.ratio! - 4)).toBeLessThan(1e-6);
  });

  it("names an overtone not measured yet where the same trade comes closer", async () => {
    // two bends of 1495 (2990) for a stretch: 4-0 lies 3004 above 3-0, gap -14; 5-0 lies 2830 above 4-0, gap 160; 4-0 is not measured
    const given = (shift: number) => [1, 2, 3, 5, 6].map((v) => typed(v, v === 5 ? shift : 0)).join(", ");
    const more = { modes: "bend 1495", window: 170 };
    const { candidates, test } = await resonances({ ...more, bands: given(-3) });
    expect(candidates[0]).toMatchObject({ band: "5-0", state: "4 stretch + 2 bend", matched: true });
    expect(test).toMatchObject({ kind: "overtone", label: "4-0", ratio: null });
    expect(Math.abs(test!.position - position(4))).toBeLessThan(1e-6);
    expect(Math.abs(test!.gap + 14)).toBeLessThan(1e-6);
    // nothing stands out: 4-0 itself is the first, nothing is closer, and the dark level stands beside it
    const calm = await resonances({ ...more, bands: given(0) });
    expect(calm.candidates[0]).toMatchObject({ band: "4-0", residual: null, matched: false, coupling: null });
    expect(calm.test).toMatchObject({ kind: "companion", label: "4-0", ratio: null });
    expect(Math.abs(calm.test!.position - (position(4) - 14))).toBeLessThan(1e-6);
  });

  it("says so when there is none", async () => {
    const { candidates, test } = await resonances({ modes: "far 50000" });
    expect([candidates, test]).toEqual([[], null]);
  });

  it("no band stands out: nothing is matched and the curve is that of all bands", async () => {
    const { standsOut, without, candidates } = await resonances({ bands: smooth, modes: "bend 2000, rock 1190" });
    expect([standsOut, without]).toEqual([null, null]);
    expect(candidates.some(({ matched }) => matched)).toBe(false);
  });

  it("the warning about the band that stands out names the candidate, and only where one is matched", async () => {
    const warned = async (modes: string) =>
      (await series({ modes })).warnings.find(({ code }) => code === "band-stands-out")!.message;
    expect(await warned("bend 2000, rock 1190")).toContain(
      "2 stretch + bend + rock, 12.0 cm-1 above it as a harmonic sum, would push it that way with a coupling of 8.0 cm-1",
    );
    expect(await warned("bend 1980, rock 1180")).not.toContain("of the modes given");
  });

  it("finds the demo's dark state when a mode makes it: coupling 9.5, a companion where one was seen, a seventh as strong", async () => {
    // 10082.40 - G(2) 6881.20 = 3201.2 = 2·1600.6
    const { standsOut, candidates, test } = await resonances({ ...demo, modes: "bend 1600.6(10), torsion 310" });
    expect(standsOut).toBe("3-0");
    expect(candidates[0]).toMatchObject({ band: "3-0", state: "2 stretch + 2 bend", matched: true });
    // the fit without 3-0 knows it to 0.1, and W and R follow by W = √(s(δ+s)), R = (δ+s)/s: 0.1·(δ+2s)/2W and 0.1·(δ+s)/s²
    expect(Math.abs(candidates[0]!.gap - 21)).toBeLessThan(0.2);
    expect(Math.abs(candidates[0]!.coupling! - 9.5)).toBeLessThan(0.3);
    expect(Math.abs(test!.position - 10086.06)).toBeLessThan(0.3);
    expect(Math.abs(test!.ratio! - 6.7)).toBeLessThan(0.3);
  });

  it.each<[string, FitRequest, string[]]>([
    ["a mode without a number", { modes: "bend" }, ["modes"]],
    ["a number without a mode", { modes: "1370" }, ["modes"]],
    ["two numbers", { modes: "1370 1020" }, ["modes"]],
    ["an assignment", { modes: "bend=1370" }, ["modes"]],
    ["another unit", { modes: "bend 170 meV" }, ["modes"]],
    ["a mode of no wavenumber", { modes: "bend -3" }, ["mode-not-positive"]],
    ["a mode of zero", { modes: "bend 0" }, ["mode-not-positive"]],
    ["a mode twice, in any case", { modes: "bend 1370, Bend 1400" }, ["mode-twice"]],
    ["the stretch as another mode", { modes: "stretch 3600" }, ["mode-is-stretch"]],
    ["no modes", { modes: " , " }, ["no-modes"]],
    ["thirteen modes", { modes: "abcdefghijklm".split("").join(" 900, ").concat(" 900") }, ["too-many-modes"]],
    ["two faults at once", { modes: "bend, rock x" }, ["modes", "modes"]],
    ["a window without modes", { window: 20 }, ["window-without-modes"]],
    ["a window that is not positive", { modes: "bend 1370", window: 0 }, ["out-of-range"]],
    ["a window that is no number", { modes: "bend 1370", window: "wide" }, ["not-a-number"]],
    [
      "modes beside a model of coupled bonds",
      { model: "coupled", bonds: 2, modes: "bend 1370" },
      ["modes-of-another-model"],
    ],
  ])("refuses %s", async (_, more, codes) => {
    const error = await fit({ bands, ...more }).catch((wrong: unknown) => wrong);
    expect(error).toBeInstanceOf(InputError);
    const faults = (error as InputError).faults.filter(({ place }) => /modes|window/.test(place.source));
    expect(faults.map(({ code }) => code)).toEqual(codes);
    for (const { mend } of faults) expect(mend).not.toBe("");
  });
});
