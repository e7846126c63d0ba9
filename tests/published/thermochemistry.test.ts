import { describe, expect, it } from "vitest";
import { atomEnthalpy, diatomicEnthalpy } from "../../src/analysis/thermochemistry/enthalpy.ts";
import { fit } from "../../src/commands/fit.ts";
import { wavenumberInKilojoulePerMole as kilojoule } from "../../src/quantity/index.ts";

/** H°(298.15 K) - H°(0), kJ/mol: CODATA key values for thermodynamics, Cox, Wagman & Medvedev 1989, from memory; printed to 0.001. */
const KEY_ATOMS: readonly (readonly [string, number])[] = [
  ["H", 6.197],
  ["B", 6.316],
  ["C", 6.536],
  ["N", 6.197],
  ["O", 6.725],
  ["F", 6.518],
  ["Al", 6.919],
  ["Si", 7.55],
  ["P", 6.197],
  ["S", 6.657],
  ["Cl", 6.272],
  ["Ge", 7.398],
  ["Br", 6.197],
  ["I", 6.197],
];

/** The same of molecules, with ωe, ωexe and Be of Huber & Herzberg 1979 (from memory) in. */
const KEY_MOLECULES: readonly (readonly [string, number, number, number, number])[] = [
  ["HCl", 8.64, 2990.95, 52.82, 10.59],
  ["HF", 8.599, 4138.3, 89.9, 20.96],
  ["N2", 8.67, 2358.57, 14.32, 1.998],
  ["CO", 8.671, 2169.81, 13.29, 1.931],
  ["Cl2", 9.181, 559.7, 2.68, 0.244],
  ["Br2", 9.725, 325.3, 1.08, 0.082],
  ["I2", 10.116, 214.5, 0.61, 0.037],
];

describe("enthalpies at 298.15 K", () => {
  it.each(KEY_ATOMS)("of the atom %s: %d kJ/mol above 0 K", (element, expected) => {
    // printed to 0.001, and the key values carry ±0.001
    expect(Math.abs(atomEnthalpy(element)! * kilojoule - expected)).toBeLessThan(0.0016);
  });

  it.each(KEY_MOLECULES)("of the molecule %s: %d kJ/mol above 0 K", (_, expected, we, wexe, be) => {
    const levels = Array.from({ length: 40 }, (_, v) => we * v - wexe * v * (v + 1)).filter((e, v) => v === 0 || e > 0);
    // anharmonic rotation and centrifugal stretching are left out: some 0.01 kJ/mol at most for these
    expect(Math.abs(diatomicEnthalpy(levels, be) * kilojoule - expected)).toBeLessThan(0.015);
  });

  it("an atom whose low levels are not known has none", () => {
    expect(atomEnthalpy("Fe")).toBeNull();
  });
});

describe("ΔH°(298.15 K) of dissociation from an accepted D0", () => {
  it.each([
    // formation enthalpies of H, Cl, O, C, N, HCl, CO: CODATA key values (from memory); D0 of HCl and H2: diatomics handbook values (READ)
    ["HCl", "1H 35Cl", "2885.98 5667.98 8346.78", "35759(5)", 217.998 + 121.301 + 92.31, 0.12],
    ["H2", "1H 1H", "4161.166 8086.931 11782.355", "36118.07", 2 * 217.998, 0.02],
  ])("%s agrees with the formation enthalpies", async (_, bond, series, accepted, expected, tolerance) => {
    const { thermochemistry } = (await fit({ series, bond, accepted, diatomic: true })).series[0]!;
    // uncertainty of the formation enthalpies; for H2 the quantised rotation of a light rotor, which RT - B/3 leaves out, and Be not given
    expect(Math.abs(thermochemistry!.accepted!.value - expected)).toBeLessThan(
      tolerance + (bond === "1H 1H" ? 0.25 : 0.05),
    );
  });

  it("carries the uncertainty of D0, unit and all, and compares with an accepted enthalpy", async () => {
    const request = { series: "2885.98 5667.98 8346.78", sigma: 0.02, bond: "1H 35Cl", diatomic: true } as const;
    const { thermochemistry, dissociation } = (await fit({ ...request, acceptedEnthalpy: "431.6(1)" })).series[0]!;
    const [row] = thermochemistry!.rows;
    const u = dissociation[0]!.d0!.standardUncertainty! * kilojoule;
    expect(Math.abs(row!.enthalpy!.standardUncertainty! / u - 1)).toBeLessThan(1e-12);
    expect(Math.abs(row!.lessAccepted!.value - (row!.enthalpy!.value - 431.6))).toBeLessThan(1e-9);
    expect(Math.abs(row!.lessAccepted!.standardUncertainty! - Math.hypot(u, 0.1))).toBeLessThan(1e-9);
    // the same accepted value in eV: 1 kJ/mol is 0.0103642697 eV (CODATA 2022)
    const inElectronvolt = (await fit({ ...request, acceptedEnthalpy: `${431.6 * 0.010364269656} eV` })).series[0]!;
    expect(Math.abs(inElectronvolt.thermochemistry!.accepted!.value - 431.6)).toBeLessThan(1e-4);
  });

  it("is not made up: without atoms, or for an atom not in the table, a warning says why", async () => {
    const codes = async (more: object) =>
      (await fit({ series: "2885.98 5667.98 8346.78", diatomic: true, ...more })).series[0]!;
    for (const more of [{}, { bond: "Fe H" }, { reducedMass: 0.98 }]) {
      const { thermochemistry, warnings } = await codes(more);
      expect(thermochemistry).toBeNull();
      expect(warnings.map(({ code }) => code)).toContain("no-enthalpy");
    }
    await expect(fit({ series: "2885.98 5667.98", acceptedEnthalpy: 431 })).rejects.toMatchObject({
      faults: [{ code: "enthalpy-without-diatomic" }],
    });
  });
});
