import {
  type AirConditions,
  airRange,
  isWavelength,
  readMeasurement,
  splitUnit,
  toWavenumber,
  type UnitName,
  wavenumberPerUnit,
} from "../quantity/index.ts";
import type { Medium } from "./series.ts";

/** What a row is measured in. */
export interface Footing {
  readonly unit: UnitName;
  readonly medium: Medium;
  readonly air: AirConditions;
}

/** What is wrong with a cell: code, what, and the mend. */
export interface Wrong {
  readonly code: string;
  readonly what: string;
  readonly mend: string;
}

/** A position on the common footing, cm-1 in vacuum. */
export interface Placed {
  readonly wavenumber: number;
  /** uncertainty written beside the value, in its own unit; `expanded` when after ± */
  readonly stated: { readonly value: number; readonly expanded: boolean } | null;
  /** an air wavelength beyond the range of the dispersion formula */
  readonly extrapolated: boolean;
}

const POSITION = "write a value such as 2885.9 or 2885.98(2)";

/** Read and convert a position; what is wrong comes back as Wrong. */
export function placePosition(text: string, { unit, medium, air }: Footing): Placed | Wrong {
  const read = readMeasurement(text);
  if (!read.ok) return { code: "position", what: read.what, mend: unitInside(text) ?? read.mend };
  if (!(read.value > 0))
    return { code: "position-not-positive", what: `"${text}" is not a positive position`, mend: POSITION };
  const inAir = medium === "air" && isWavelength(unit);
  const wavenumber = guarded(() => toWavenumber(read.value, unit, medium, air));
  if (wavenumber === null)
    return {
      code: "air-below-230-nm",
      what: `${text} ${unit} in air lies below 230 nm, where the dispersion of air is not known`,
      mend: "give the vacuum wavelength or the wavenumber",
    };
  return {
    wavenumber,
    stated: read.sigma === null ? null : { value: read.sigma, expanded: !text.includes("(") },
    extrapolated: inAir && airRange(1e7 / wavenumber) === "extrapolated",
  };
}

/** The mend for a value that is one but for the unit inside. */
function unitInside(text: string): string | null {
  const { number, unit } = splitUnit(text);
  return unit !== null && readMeasurement(number).ok ? `write ${number}, and ${unit} in the column unit` : null;
}

/** null where the index of air is not known; toWavenumber says so by a RangeError. */
function guarded(work: () => number): number | null {
  try {
    return work();
  } catch (error) {
    if (error instanceof RangeError) return null;
    throw error;
  }
}

/** An uncertainty as typed, `0.05` or `0.1 nm`: its number and its own unit if it has one. */
export function readUncertainty(text: string): { value: number; unit: UnitName | null } | Wrong {
  const { number, unit } = splitUnit(text.replace(/^\s*(?:±|\+\/?-)\s*/, ""));
  const read = readMeasurement(number);
  const mend = "write a positive number such as 0.05, or with its unit, 0.1 nm";
  if (!read.ok) return { code: "sigma", what: `the uncertainty ${read.what}`, mend };
  if (!(read.value > 0))
    return { code: "sigma-not-positive", what: `an uncertainty of ${number} is not positive`, mend };
  if (read.sigma !== null) return { code: "sigma", what: `the uncertainty ${number} carries one itself`, mend };
  return { value: read.value, unit };
}

/** cm-1 per unit at a wavenumber, with its sign (negative for wavelengths). */
export function rate(wavenumber: number, unit: UnitName, { medium, air }: Footing): number {
  const usable = medium === "air" && isWavelength(unit) && airRange(1e7 / wavenumber) !== "refused" ? "air" : "vacuum";
  return wavenumberPerUnit(wavenumber, unit, usable, air);
}
