import { type AirConditions, airIndex, airIndexSlope, airWavelength, standardAir, vacuumWavenumber } from "./air.ts";
import {
  wavenumberInElectronvolt,
  wavenumberInGigahertz,
  wavenumberInKilocaloriePerMole,
  wavenumberInKilojoulePerMole,
  wavenumberInTerahertz,
} from "./constants.ts";

/** What a wavelength was measured in; wavenumbers, frequencies and energies are the same in both. */
export type Medium = "vacuum" | "air";

/** Units of a position, written the way the tool prints them. */
export const unitNames = ["cm-1", "nm", "um", "Hz", "GHz", "THz", "meV", "eV", "kJ/mol", "kcal/mol"] as const;

export type UnitName = (typeof unitNames)[number];

/** Size of 1 cm-1 in each unit that is proportional to it. */
const perWavenumber = {
  "cm-1": 1,
  Hz: wavenumberInGigahertz * 1e9,
  GHz: wavenumberInGigahertz,
  THz: wavenumberInTerahertz,
  meV: wavenumberInElectronvolt * 1000,
  eV: wavenumberInElectronvolt,
  "kJ/mol": wavenumberInKilojoulePerMole,
  "kcal/mol": wavenumberInKilocaloriePerMole,
} as const;

/** Nanometres in each unit of wavelength. */
const nanometres = { nm: 1, um: 1000 } as const;

/** Whether positions in this unit are wavelengths, for which the medium matters and σ changes along the spectrum. */
export function isWavelength(unit: UnitName): unit is keyof typeof nanometres {
  return unit in nanometres;
}

/**
 * Vacuum wavenumber in cm-1 of a position.
 * @throws RangeError for a wavelength that is not positive, or one in air below 230 nm (ask `airRange` first).
 */
export function toWavenumber(
  value: number,
  unit: UnitName,
  medium: Medium = "vacuum",
  air: AirConditions = standardAir,
): number {
  if (!isWavelength(unit)) return value / perWavenumber[unit];
  const nm = value * nanometres[unit];
  requirePositive(nm, "wavelength");
  return medium === "air" ? vacuumWavenumber(nm, air) : 1e7 / nm;
}

/**
 * A vacuum wavenumber in cm-1 expressed in another unit (wavelengths in the medium given).
 * @throws RangeError for a wavelength of a wavenumber that is not positive, or one in air below 230 nm.
 */
export function fromWavenumber(
  wavenumber: number,
  unit: UnitName,
  medium: Medium = "vacuum",
  air: AirConditions = standardAir,
): number {
  if (!isWavelength(unit)) return wavenumber * perWavenumber[unit];
  requirePositive(wavenumber, "wavenumber");
  return (medium === "air" ? airWavelength(wavenumber, air) : 1e7 / wavenumber) / nanometres[unit];
}

/**
 * dν̃/d(unit) at a vacuum wavenumber in cm-1, with its sign: negative for wavelengths. A standard uncertainty s in `unit`
 * is |dν̃/d(unit)|·s in cm-1; an offset common to all bands keeps the sign.
 * @throws RangeError as `fromWavenumber`.
 */
export function wavenumberPerUnit(
  wavenumber: number,
  unit: UnitName,
  medium: Medium = "vacuum",
  air: AirConditions = standardAir,
): number {
  if (!isWavelength(unit)) return 1 / perWavenumber[unit];
  requirePositive(wavenumber, "wavenumber");
  const vacuum = (-(wavenumber ** 2) / 1e7) * nanometres[unit];
  if (medium === "vacuum") return vacuum;
  // λ_air = 1/(ν̃·n): dλ/dν̃ = −(1 + ν̃·n′/n)/(ν̃²·n)
  const n = airIndex(wavenumber, air);
  return (vacuum * n) / (1 + (wavenumber * airIndexSlope(wavenumber, air)) / n);
}

function requirePositive(value: number, name: string): void {
  if (!(value > 0 && value < Number.POSITIVE_INFINITY))
    throw new RangeError(`a ${name} must be positive, not ${value}`);
}
