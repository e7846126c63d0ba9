import { describe, expect, it } from "vitest";
import { findModel, type Model } from "../../src/models/index.ts";

const model = (await findModel("coupled")) as Model;
const levels = (bonds: number, p: readonly number[], upTo: number) =>
  model.manifold!({ terms: null, fixed: {}, bonds }).levels(p, upTo);

/** Exact levels (COMPUTED with numpy/scipy from the definition; see the reference values of the project): V, orbit, species, energy, weight. */
const EXACT = [
  {
    bonds: 2,
    p: [3870, 83, -49.5],
    upTo: 5,
    rows: `1,10,A1,3654.500000,1.0000;1,10,B2,3753.500000,1.0000;2,20,A1,7195.810217,0.8212;2,20,B2,7242.000000,1.0000;2,11,A1,7454.189783,0.8212;
3,30,A1,10585.852152,0.9027;3,30,B2,10597.571132,0.9646;3,21,A1,10875.147848,0.9027;3,21,B2,11061.428868,0.9646;
4,40,A1,13799.394789,0.9560;4,40,B2,13801.041048,0.9646;4,31,A1,14227.446844,0.6641;4,31,B2,14336.958952,0.9646;4,22,A1,14595.158368,0.7007;
5,50,A1,16841.435560,0.9719;5,50,B2,16841.592337,0.9727;5,41,A1,17463.840539,0.7333;5,41,B2,17503.872578,0.9027;5,32,A1,17786.223901,0.7572;5,32,B2,18043.035084,0.9290`,
  },
  {
    bonds: 3,
    p: [2200, 38.5, -3.7],
    upTo: 4,
    rows: `1,100,A1,2115.600000,1.0000;1,100,E,2126.700000,1.0000;2,200,A1,4167.460490,0.9788;2,200,E,4168.662133,0.9958;2,110,A1,4240.139510,0.9788;2,110,E,4250.037867,0.9958;
3,300,A1,6137.424653,0.9960;3,300,E,6137.467545,0.9966;3,210,A1,6279.641478,0.9759;3,210,E,6285.863152,0.9982;3,210,E,6298.669302,0.9983;3,210,A2,6303.100000,1.0000;3,111,A1,6370.833869,0.9799;
4,400,A1,8029.517546,0.9979;4,400,E,8029.518454,0.9979;4,310,A1,8255.014346,0.9666;4,310,E,8256.608780,0.9848;4,310,E,8263.200908,0.9824;4,310,A2,8264.700000,1.0000;4,220,A1,8338.721027,0.9512;4,220,E,8339.892644,0.9692;4,211,A1,8402.247080,0.9748;4,211,E,8423.179215,0.9939`,
  },
  {
    bonds: 4,
    p: [2256, 34, -0.55],
    upTo: 3,
    rows: `1,1000,A1,2186.350000,1.0000;1,1000,F2,2188.550000,1.0000;2,2000,A1,4307.944879,0.9992;2,2000,F2,4307.982211,0.9997;2,1100,A1,4373.855121,0.9992;2,1100,F2,4376.017789,0.9997;2,1100,E,4377.100000,1.0000;
3,3000,A1,6359.979650,0.9998;3,3000,F2,6359.979874,0.9999;3,2100,A1,6493.714584,0.9983;3,2100,F2,6494.575281,0.9995;3,2100,E,6495.450000,1.0000;3,2100,F2,6496.860110,0.9999;3,2100,F1,6497.650000,1.0000;3,1110,A1,6562.455766,0.9985;3,1110,F2,6564.584734,0.9995`,
  },
] as const;

describe("levels of equivalent bonds, exact sets", () => {
  for (const { bonds, p, upTo, rows } of EXACT)
    it(`${bonds} bonds up to V = ${upTo}, by V, orbit, species and order from below`, () => {
      const all = levels(bonds, p, upTo);
      const expected = rows.split(";").map((row) => row.trim().split(","));
      expect(all).toHaveLength(expected.length);
      const seen = new Map<string, number>();
      for (const [total, orbit, species, energy, weight] of expected) {
        const nth = (seen.get(`${orbit}${species}`) ?? 0) + 1;
        seen.set(`${orbit}${species}`, nth);
        const ending = bonds === 2 ? (orbit![0] === orbit![1] ? "" : species === "A1" ? "+" : "-") : species!;
        const label = `${orbit}${ending}${nth > 1 ? `#${nth}` : ""}`;
        const level = all.find((one) => one.label === label)!;
        expect([label, level?.numbers]).toEqual([label, { V: Number(total), species }]);
        // half a unit of the last printed digits
        expect(Math.abs(level.energy - Number(energy))).toBeLessThan(5.1e-7);
        expect(Math.abs(level.share - Number(weight))).toBeLessThan(5.1e-5);
      }
    });
});
