import fc from "fast-check";
import { describe, expect, test } from "vitest";
import {
  fromWavenumber,
  isWavelength,
  nearestUnit,
  readUnit,
  splitUnit,
  standardAir,
  toWavenumber,
  unitNames,
  wavenumberPerUnit,
} from "../../src/quantity/index.ts";

const seeded = { seed: 20261203, numRuns: 300 };

describe("reading a unit", () => {
  test.each<[text: string, unit: string]>([
    ...unitNames.map((name): [string, string] => [name, name]),
    ["cm^-1", "cm-1"],
    ["cm⁻¹", "cm-1"],
    ["cm−1", "cm-1"],
    ["1/cm", "cm-1"],
    ["CM-1", "cm-1"],
    ["µm", "um"], // U+00B5
    ["μm", "um"], // U+03BC
    ["NM", "nm"],
    ["ghz", "GHz"],
    ["EV", "eV"],
    ["mev", "meV"],
    ["KJ/MOL", "kJ/mol"],
    ["kJ mol-1", "kJ/mol"],
    ["kcal mol⁻¹", "kcal/mol"],
    [" nm ", "nm"],
  ])("%j is %s", (text, unit) => {
    expect(readUnit(text)).toBe(unit);
  });

  test.each(["", "cm", "m", "MeV", "MHz", "hartree", "toString"])("%j is none of them", (text) => {
    expect(readUnit(text)).toBeNull();
  });

  test.each([
    ["cm-2", "cm-1"],
    ["cm", "cm-1"],
    ["wavenumbers", "cm-1"],
    ["nmm", "nm"],
    ["micron", "um"],
    ["kJmol", "kJ/mol"],
    ["MeV", "meV"],
    ["THzz", "THz"],
    ["hartree", null],
    ["", null],
  ])("near %j lies %s", (text, unit) => {
    expect(nearestUnit(text)).toBe(unit);
  });
});

describe("a unit behind a value", () => {
  test.each([
    ["970.056(10) nm", "970.056(10)", "nm"],
    ["970.056nm", "970.056", "nm"],
    ["2885 1/cm", "2885", "cm-1"],
    ["2885.98 ± 0.02 cm⁻¹", "2885.98 ± 0.02", "cm-1"],
    ["35 kJ mol-1", "35", "kJ/mol"],
    ["0.1 eV", "0.1", "eV"],
    ["1e3 meV", "1e3", "meV"],
    ["1.2 µm", "1.2", "um"],
    ["2885.98(2)", "2885.98(2)", null],
    ["1e4", "1e4", null],
    ["5 foo", "5 foo", null],
    ["nm", "nm", null],
  ])("%j is %j and %s", (text, number, unit) => {
    expect(splitUnit(text)).toEqual({ number, unit });
  });
});

const unit = fc.constantFrom(...unitNames);
const medium = fc.constantFrom("vacuum" as const, "air" as const);
/** from the far infrared to 250 nm, in any air that is accepted */
const wavenumber = fc.double({ min: 20, max: 40000, noNaN: true });
const air = fc.record({
  temperatureC: fc.double({ min: -40, max: 100, noNaN: true }),
  pressurePa: fc.double({ min: 100, max: 120e3, noNaN: true }),
});

test("a wavenumber comes back from any unit, medium and air", () => {
  fc.assert(
    fc.property(wavenumber, unit, medium, air, (nu, name, inMedium, conditions) => {
      const there = fromWavenumber(nu, name, inMedium, conditions);
      // a few roundings of 1e-16; the iteration for air stops far below that
      expect(Math.abs(toWavenumber(there, name, inMedium, conditions) / nu - 1)).toBeLessThan(2e-15);
    }),
    seeded,
  );
});

test("the derivative is the slope of the conversion, with its sign", () => {
  fc.assert(
    fc.property(wavenumber, unit, medium, air, (nu, name, inMedium, conditions) => {
      const x = fromWavenumber(nu, name, inMedium, conditions);
      const step = x * 1e-4;
      const up = toWavenumber(x + step, name, inMedium, conditions);
      const down = toWavenumber(x - step, name, inMedium, conditions);
      const slope = wavenumberPerUnit(nu, name, inMedium, conditions);
      expect(Math.sign(slope)).toBe(isWavelength(name) ? -1 : 1);
      // central difference: third derivative 1e-8, rounding 1e-16/1e-4; dispersion itself enters with 1e-5
      expect(Math.abs((up - down) / (2 * step) / slope - 1)).toBeLessThan(2e-8);
    }),
    seeded,
  );
});

test("the medium and the air matter for wavelengths and for nothing else", () => {
  const hot = { temperatureC: 60, pressurePa: 90e3 };
  for (const name of unitNames) {
    const value = fromWavenumber(20000, name);
    const same = toWavenumber(value, name, "air", hot) === toWavenumber(value, name, "vacuum", standardAir);
    expect(same).toBe(!isWavelength(name));
  }
});

test("a wavelength that is not positive and one in air below 230 nm are refused", () => {
  expect(() => toWavenumber(0, "nm")).toThrow(RangeError);
  expect(() => toWavenumber(-500, "nm")).toThrow(RangeError);
  expect(() => fromWavenumber(0, "um")).toThrow(RangeError);
  expect(() => wavenumberPerUnit(0, "nm")).toThrow(RangeError);
  expect(() => toWavenumber(200, "nm", "air")).toThrow(/below 230 nm/);
  expect(() => fromWavenumber(50000, "nm", "air")).toThrow(/below 230 nm/);
  // the shortest wavelength that is accepted is not lost to the start of the iteration
  expect(toWavenumber(fromWavenumber(1e7 / 230.0001, "nm", "air"), "nm", "air")).toBeCloseTo(1e7 / 230.0001, 9); // rounding
});
