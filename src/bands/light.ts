import { type Fault, InputError } from "../messages/index.ts";
import type { AirConditions, UnitName } from "../quantity/index.ts";
import { readContext } from "./context.ts";
import { rate } from "./conversion.ts";
import type { Medium } from "./series.ts";
import type { Settings } from "./settings.ts";

/** The light that bands are seen in. */
export interface Light {
  /** of wavelengths */
  readonly medium: Medium;
  readonly air: AirConditions;
  /** the exciting line in cm-1 that Raman shifts count from; null: the bands absorb or emit the light themselves */
  readonly exciting: number | null;
}

/** Vacuum wavenumber of the light of a band: scattered light where there is an exciting line. */
export const lightOf = (position: number, { exciting }: Light): number =>
  exciting === null ? position : exciting - position;

/**
 * What an offset of the scale does to a band, cm-1, signed, at a wavenumber of its light. A wavelength offset acts with the sign of dν̃/dλ; with
 * an exciting line the position is a difference to it, and the sign turns.
 */
export function offsetEffect(value: number, unit: UnitName, wavenumber: number, light: Light): number {
  return (light.exciting === null ? 1 : -1) * value * rate(wavenumber, unit, { unit, ...light });
}

/** The light that settings tell of. Throws InputError. */
export function readLight(settings: Settings): Light {
  const faults: Fault[] = [];
  const asked = new Map([...settings].filter(([name]) => ["medium", "air", "laser"].includes(name)));
  const { medium, air, laser } = readContext(asked, faults);
  if (faults.length > 0) throw new InputError(faults);
  return { medium, air, exciting: laser?.wavenumber ?? null };
}
