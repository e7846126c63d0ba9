import { expect, test } from "vitest";
import { airIndex, airRange, airWavelength, toWavenumber, wavenumberPerUnit } from "../../src/quantity/index.ts";

/** Ciddor, Appl. Opt. 35, 1566 (1996), eq. 1, COMPUTED apart from this code with 30 digits: vacuum nm, air nm, decimals. */
const standard: readonly (readonly [number, number, number])[] = [
  [633, 632.8250047682625, 11],
  [550, 549.84723175, 8],
  [400, 399.88692724, 8],
  [500, 499.860552, 6],
  [800, 799.780022, 6],
  [1000, 999.725909, 6],
  [1550, 1549.576562, 6],
];

test.each(standard)("a vacuum wavelength of %d nm is %d nm in standard air", (vacuum, air, decimals) => {
  // half a unit of the last decimal given
  const tolerance = 0.5 * 10 ** -decimals;
  expect(Math.abs(airWavelength(1e7 / vacuum) - air)).toBeLessThan(tolerance);
  // back again: the same tolerance, in the same nm
  expect(Math.abs(1e7 / toWavenumber(air, "nm", "air") - vacuum)).toBeLessThan(tolerance * 1.001);
});

test.each([
  [500, 5.58],
  [1000, 2.74],
  [1550, 1.76],
])("reading air as vacuum at %d nm shifts a band by %d cm-1 (Ciddor 1996)", (nm, shift) => {
  // printed to two decimals
  expect(Math.abs(1e7 / nm - toWavenumber(nm, "nm", "air") - shift)).toBeLessThan(0.005);
});

test.each([
  [1763.7, 5668.35],
  [1197.7, 8347.051],
])("overtones of HCl read in air at %d nm lie at %d cm-1", (nm, wavenumber) => {
  // COMPUTED with Ciddor 1996, printed to three decimals; the first lies beyond 1690 nm
  expect(Math.abs(toWavenumber(nm, "nm", "air") - wavenumber)).toBeLessThan(0.001);
});

/** n of dry air at 15 °C, 101 325 Pa by Peck & Reeder, J. Opt. Soc. Am. 62, 958 (1972), from memory; s in 1/µm. */
function peckReeder(vacuumMicrometre: number): number {
  const s2 = vacuumMicrometre ** -2;
  return 1 + 1e-8 * (8060.51 + 2480990 / (132.274 - s2) + 17455.7 / (39.32957 - s2));
}

test.each([0.3, 0.5, 0.7, 1, 1.5, 2, 3])("at %d µm Ciddor's index agrees with that of Peck & Reeder (1972)", (um) => {
  // both claim some 1e-8; the newer one is for 450 instead of 330 ppm CO2, 1.7e-8 more
  expect(Math.abs(airIndex(1e4 / um) - peckReeder(um))).toBeLessThan(5e-8);
});

test("air at 25 °C instead of 15 °C moves a band near 700 nm by 0.13 cm-1", () => {
  const warm = { temperatureC: 25, pressurePa: 101325 };
  // printed to two decimals
  expect(Math.abs(toWavenumber(700, "nm", "air", warm) - toWavenumber(700, "nm", "air") - 0.13)).toBeLessThan(0.005);
});

test("one degree changes the index of air by 1e-6, one hundredth of a cm-1 at 10 000 cm-1", () => {
  const warmer = { temperatureC: 16, pressurePa: 101325 };
  const change = airIndex(10000) - airIndex(10000, warmer);
  // "1e-6" and "0.01" are one-digit statements
  expect(Math.abs(change - 1e-6)).toBeLessThan(0.5e-6);
  expect(Math.abs(toWavenumber(1000, "nm", "air", warmer) - toWavenumber(1000, "nm", "air") - 0.01)).toBeLessThan(
    0.005,
  );
});

test("the density of dry air follows Ciddor's compressibility, not the ideal gas alone", () => {
  // Z = 0.9995922 at 15 °C, 1 atm (Ciddor 1996, from memory); a thin gas is ideal, so n−1 per pressure is Z times smaller
  const thin = { temperatureC: 15, pressurePa: 1 };
  const compressibility = ((airIndex(15000, thin) - 1) * 101325) / (airIndex(15000) - 1);
  // n − 1 of the thin air is 3e-9 and carries the rounding of 1 + 3e-9, 1e-16: 4e-8 of it
  expect(Math.abs(compressibility - 0.9995922)).toBeLessThan(1.5e-7);
});

test("an uncertainty of 0.1 nm is 0.09 cm-1 at 3400 nm and 2.04 cm-1 at 700 nm", () => {
  // printed to two decimals
  expect(Math.abs(wavenumberPerUnit(1e7 / 3400, "nm") * 0.1 + 0.09)).toBeLessThan(0.005);
  expect(Math.abs(wavenumberPerUnit(1e7 / 700, "nm") * 0.1 + 2.04)).toBeLessThan(0.005);
});

test("the formula holds from 230 to 1690 nm (Ciddor 1996), is extended beyond and refused below", () => {
  expect([229.999, 230, 1690, 1690.001, 3000].map(airRange)).toEqual([
    "refused",
    "inside",
    "inside",
    "extrapolated",
    "extrapolated",
  ]);
});
