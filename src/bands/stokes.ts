import { isWavelength, type UnitName } from "../quantity/index.ts";
import type { Placed, Wrong } from "./conversion.ts";
import type { Laser } from "./read-shared.ts";

/** With an exciting line positions are scattered wavelengths, to the red of it; null when they are. */
export function stokesFault(unit: UnitName, { wavenumber }: Placed, laser: Laser): Wrong | null {
  if (!isWavelength(unit))
    return {
      code: "laser-without-wavelength",
      what: `a laser is given, but the position is in ${unit}`,
      mend: "write scattered wavelengths with --unit nm, or leave --laser out for shifts in cm-1",
    };
  if (wavenumber < laser.wavenumber) return null;
  return {
    code: "not-stokes",
    what: `the scattered light does not lie to the red of the laser at ${(1e7 / laser.wavenumber).toFixed(2)} nm (vacuum)`,
    mend: "give Stokes lines, at longer wavelengths than the laser, or mend --laser",
  };
}
