import { expect, test } from "vitest";
import {
  atomicMass,
  avogadro,
  bohr,
  bohrInAngstrom,
  boltzmann,
  electronMass,
  electronMassInU,
  elementaryCharge,
  forceConstantFactor,
  fromWavenumber,
  hartree,
  hartreeInWavenumber,
  kappa,
  planck,
  speedOfLight,
  toWavenumber,
  type UnitName,
  wavenumberInJoule,
  wavenumberInKelvin,
} from "../../src/quantity/index.ts";

/** CODATA 2022, worked out to 16 digits by an independent calculation (COMPUTED from the exact constants). */
const oneWavenumber: readonly (readonly [UnitName, number])[] = [
  ["kJ/mol", 0.011962656563869701],
  ["kcal/mol", 0.002859143538209776],
  ["eV", 1.2398419843320026e-4],
  ["meV", 1.2398419843320026e-1],
  ["THz", 0.0299792458],
  ["GHz", 29.9792458],
  ["Hz", 29979245800],
];

/** Exact constants: a handful of products and quotients, each rounded at 1.1e-16. */
const rounding = 1e-15;

function relative(got: number, expected: number): number {
  return Math.abs(got / expected - 1);
}

test("the constants are those of CODATA 2022, five exact and four measured", () => {
  expect({ planck, speedOfLight, avogadro, boltzmann, elementaryCharge }).toEqual({
    planck: 6.62607015e-34,
    speedOfLight: 299792458,
    avogadro: 6.02214076e23,
    boltzmann: 1.380649e-23,
    elementaryCharge: 1.602176634e-19,
  });
  expect({ atomicMass, electronMass, hartree, bohr }).toEqual({
    atomicMass: 1.66053906892e-27,
    electronMass: 9.1093837139e-31,
    hartree: 4.359744722206e-18,
    bohr: 5.29177210544e-11,
  });
});

test.each(oneWavenumber)("1 cm-1 in %s agrees with CODATA 2022 to rounding", (unit, value) => {
  expect(relative(fromWavenumber(1, unit), value)).toBeLessThan(rounding);
  expect(relative(toWavenumber(value, unit), 1)).toBeLessThan(rounding);
});

test("1 cm-1 in J and K agrees with CODATA 2022 to rounding", () => {
  expect(relative(wavenumberInJoule, 1.986445857148929e-23)).toBeLessThan(rounding);
  expect(relative(wavenumberInKelvin, 1.4387768775039338)).toBeLessThan(rounding);
});

test("1 kJ/mol, 1 kcal/mol and 1 eV in cm-1 agree with CODATA 2022 to rounding", () => {
  expect(relative(toWavenumber(1, "kJ/mol"), 83.5934722911178)).toBeLessThan(rounding);
  expect(relative(toWavenumber(1, "kcal/mol"), 349.7550880660368)).toBeLessThan(rounding);
  expect(relative(toWavenumber(1, "eV"), 8065.543937349212)).toBeLessThan(rounding);
});

test("the hartree is 219474.63136314 cm-1 (CODATA 2022)", () => {
  // printed to 14 digits; the value itself is known to 1.1e-12
  expect(relative(hartreeInWavenumber, 219474.63136314)).toBeLessThan(1e-13);
});

test("the bohr is 0.529177210544 Å (CODATA 2022)", () => {
  // printed to 12 digits: half a unit of the last one is 1e-12 of it
  expect(relative(bohrInAngstrom, 0.529177210544)).toBeLessThan(1e-12);
});

test("u is 1822.88848627814 electron masses (CODATA 2022)", () => {
  // recommended u and m_e are printed with 12 and 11 digits, so that their quotient is good to 5e-12 of rounding
  expect(relative(1 / electronMassInU, 1822.88848627814)).toBeLessThan(1e-11);
});

test("h/(8π²cu) is 16.857629168 u Å² cm-1 (CODATA 2022)", () => {
  // the value belonging to the printed u, COMPUTED with 16 digits: a dozen roundings
  expect(relative(kappa, 16.85762916808776)).toBeLessThan(2e-15);
});

test("k = 5.89183045060e-5 N/m for 1 u at 1 cm-1 (CODATA 2022)", () => {
  // printed to 12 digits: half a unit of the last one is 8.5e-13 of it
  expect(relative(forceConstantFactor, 5.8918304506e-5)).toBeLessThan(1e-12);
});

test("the usual shortcuts of the oscillator follow from the same two constants", () => {
  // each COMPUTED independently and printed to 12 digits: half a unit of the last one is at most 5e-12 of it
  const printed = 5e-12;
  expect(relative(1 / Math.sqrt(kappa), 0.243557637057)).toBeLessThan(printed); // a = … √(μ·ωexe)
  expect(relative(2 * Math.sqrt(kappa), 8.21160865314)).toBeLessThan(printed); // ωe = … √(De/μ)
  expect(relative(1 / Math.sqrt(forceConstantFactor), 130.279138994)).toBeLessThan(printed); // ωe = … √(k/μ)
  expect(relative(2 * kappa, 33.7152583362)).toBeLessThan(printed); // ħ/(μω) = …/(μ·ωe)
});
