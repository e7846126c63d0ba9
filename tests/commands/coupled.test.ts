import { describe, expect, it } from "vitest";
import { fit } from "../../src/commands/fit.ts";
import { predict } from "../../src/commands/predict.ts";
import type { FitRequest } from "../../src/commands/request.ts";
import { InputError } from "../../src/messages/index.ts";

const fault = async (request: FitRequest) => {
  const error = await fit({ model: "coupled", ...request }).catch((wrong: unknown) => wrong);
  expect(error).toBeInstanceOf(InputError);
  const { faults, exit } = error as InputError;
  return { code: faults[0]!.code, exit, mend: faults[0]!.mend, what: faults[0]!.what };
};

/** H2O (IUPAC task group 2013, from memory). */
const water = "10+ 3657.053, 10- 3755.929, 20+ 7201.540, 20- 7249.817, 11 7445.056, 30+ 10599.687";

describe("coupled bonds refuse", () => {
  it("labels that do not exist, with those that do", async () => {
    expect((await fault({ bonds: 3, bands: "210E#3 6282" })).mend).toContain("210A1, 210A2, 210E, 210E#2");
    expect((await fault({ bonds: 3, bands: "100B2 2126" })).mend).toContain("100A1, 100E");
    expect((await fault({ bonds: 4, bands: "2100 4300" })).mend).toMatch(/2100A1.*2100F2/);
    expect((await fault({ bonds: 2, bands: "1-0 3657" })).code).toBe("label");
    expect((await fault({ bonds: 2, bands: "00 3657" })).what).toContain("ground state");
    expect((await fault({ bonds: "unlike", bands: "10+ 3657" })).code).toBe("label");
    expect((await fault({ bonds: 2, bands: "20+ from 20+ 3657" })).what).toContain("twice");
  });

  it("only V = 1: w and wx cannot be told apart, exit 3, and the direction is named", async () => {
    const { exit, mend } = await fault({ bonds: 2, bands: "10+ 3657.05, 10- 3755.93, 10- from 10+ 98.88", sigma: 0.1 });
    expect(exit).toBe(3);
    expect(mend).toContain("ω̃ : ω̃x = 2 : 1");
  });

  it("more constants than bands: exit 3", async () => {
    expect((await fault({ bonds: 2, bands: "10+ 3657.05, 10- 3755.93" })).exit).toBe(3);
  });

  it("--bond for --bonds and the other way round, with the hint", async () => {
    expect((await fault({ bands: water })).mend).toContain("equivalent bonds");
    expect((await fault({ bonds: 2, bands: water, bond: "2" })).mend).toContain("--bonds 2");
    expect((await fault({ model: "oscillator", bands: "1-0 2886, 2-0 5668", bonds: "1H 35Cl" })).mend).toContain(
      '--bond "1H 35Cl"',
    );
    expect((await fault({ bonds: 5, bands: water })).code).toBe("unknown-choice");
  });
});

describe("coupled bonds", () => {
  it("a band from another level counts as the difference: the same constants", async () => {
    const first = (await fit({ model: "coupled", bonds: 2, bands: water, sigma: 1 })).series[0]!;
    const difference = (7201.54 - 3755.929).toFixed(3);
    const second = (await fit({ model: "coupled", bonds: 2, bands: `${water}, 20+ from 10- ${difference}`, sigma: 1 }))
      .series[0]!;
    const calculated = (label: string) => second.bands.find((band) => band.label === label)!.calculated!;
    expect(Math.abs(calculated("20+ from 10-") - (calculated("20+") - calculated("10-")))).toBeLessThan(1e-9);
    expect(Math.abs(second.constants.w!.value / first.constants.w!.value - 1)).toBeLessThan(1e-3);
  });

  it("holds constants, fits the cross anharmonicity on request, and treats residuals like any other model", async () => {
    const held = (await fit({ model: "coupled", bonds: 2, bands: water, fix: "lambda=-49.4", sigma: 1 })).series[0]!;
    expect(held.held).toEqual(["lambda"]);
    expect(held.quality.excess.applied).toBe(true);
    const crossed = (await fit({ model: "coupled", bonds: 2, bands: water, cross: true, sigma: 1 })).series[0]!;
    expect(Object.keys(crossed.constants)).toEqual(["w", "wx", "lambda", "wxcross"]);
    expect(crossed.quality.chiSquare!).toBeLessThan(held.quality.chiSquare!);
  });

  it("warns where experimental precision is taken at face value, and where the sign of λ is open", async () => {
    const exact = "20+ 7195.810217, 20- 7242.0, 11 7454.189783, 22 14595.158368";
    const { warnings } = (await fit({ model: "coupled", bonds: 2, bands: exact, sigma: 0.01 })).series[0]!;
    expect(warnings.map(({ code }) => code)).toEqual(expect.arrayContaining(["model-error-left-out", "lambda-sign"]));
  });

  it("labels without + and - mean the lower and the upper level of the pair", async () => {
    const bands = "10 3654.5, 10#2 3753.5, 20 7195.810217, 20#2 7242.0, 11 7454.189783";
    const { constants, warnings } = (await fit({ model: "coupled", bonds: 2, bands, sigma: 1 })).series[0]!;
    // exact levels to 1e-6 (COMPUTED)
    expect(Math.abs(Math.abs(constants.lambda!.value) - 49.5)).toBeLessThan(1e-4);
    expect(warnings.map(({ code }) => code)).toContain("lambda-sign");
  });

  it("predicts levels from constants alone, and of deuterated bonds by mass scaling", async () => {
    const constants = "w=3853.6 wx=78.72 lambda=-41.88";
    const { levels } = await predict({ model: "coupled", bonds: 2, constants, upTo: 2 });
    expect(levels!.map(({ label }) => label)).toEqual(["10+", "10-", "20+", "20-", "11"]);
    const document = await predict({
      model: "coupled",
      bonds: 2,
      bands: water,
      bond: "16O 1H",
      predictBond: "16O 2H",
      upTo: 1,
    });
    const { constants: own } = (await fit({ model: "coupled", bonds: 2, bands: water, bond: "16O 1H" })).series[0]!;
    // ρ(OH → OD) 0.72801011 (COMPUTED from AME masses)
    const rho = 0.72801011;
    const expected = own.w!.value * rho - 2 * own.wx!.value * rho ** 2 + own.lambda!.value;
    expect(Math.abs(document.levels![0]!.energy - expected)).toBeLessThan(1e-3);
    expect(document.series[0]!.warnings.map(({ code }) => code)).toContain("mass-scaled");
    await expect(predict({ series: "2886 5668", predictBond: "16O 2H" })).rejects.toBeInstanceOf(InputError);
  });
});

describe("levels from constants and from a stored result", () => {
  it("two unlike bonds: each constant goes where its name says", async () => {
    const constants = "w1=3800 wx1=80 w2=3700 wx2=85 lambda=0";
    const { levels } = await predict({ model: "coupled", bonds: "unlike", constants, upTo: 1 });
    const energies = Object.fromEntries(levels!.map(({ label, energy }) => [label, energy]));
    // w - 2·wx of each
    expect(energies).toEqual({ "1.0": 3640, "0.1": 3530 });
  });

  it("a stored result keeps the number of bonds: the levels of the fit", async () => {
    const request: FitRequest = {
      model: "coupled",
      bonds: 3,
      bands: "100A1 2115.16, 100E 2126.43, 200A1 4166.77, 200E 4167.94",
      upTo: 2,
    };
    const document = await fit(request);
    const { levels } = await predict({ stored: { text: JSON.stringify(document), source: "result.json" }, upTo: 2 });
    expect(levels!.map(({ label, energy }) => [label, energy])).toEqual(
      document.series[0]!.levels!.map(({ label, energy }) => [label, energy]),
    );
  });

  it("with --bond, constants too are scaled to another isotope", async () => {
    const request = {
      model: "coupled",
      bonds: 2,
      constants: "w=3853.6 wx=78.72 lambda=-41.88",
      bond: "16O 1H",
      predictBond: "16O 2H",
      upTo: 1,
    };
    const { levels } = await predict(request);
    expect(levels![0]!.energy).toBeLessThan(2800);
  });
});
