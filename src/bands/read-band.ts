import type { Fault } from "../messages/index.ts";
import { isWavelength } from "../quantity/index.ts";
import type { Bond } from "../species/index.ts";
import { bondFrom, type Context, isWrong, mediumFrom, unitFrom } from "./context.ts";
import { type Footing, type Placed, placePosition, rate, readUncertainty, type Wrong } from "./conversion.ts";
import { canonicalLabel } from "./label.ts";
import type { ColumnName, RawRow } from "./raw.ts";
import { readCompanion } from "./read-companion.ts";
import type { Band } from "./series.ts";
import { stokesFault } from "./stokes.ts";

/** A band, and whether its air wavelength lies beyond the dispersion formula. */
export interface ReadBand {
  readonly band: Band;
  readonly extrapolated: boolean;
  /** wavenumber in vacuum of what was measured: the position, or the scattered light where there is an exciting line */
  readonly absolute: number;
}

const YES = ["yes", "y", "true", "1"];
const NO = ["no", "n", "false", "0"];

/** Understand one row; null after its faults were added. `bonds` remembers the bonds already read. */
export function readBand(
  row: RawRow,
  context: Context,
  bonds: Map<string, Bond | Wrong>,
  faults: Fault[],
): ReadBand | null {
  const { cells, place } = row;
  const before = faults.length;
  const named = cells.series === undefined ? "" : `series "${cells.series}": `;
  const wrong = (column: ColumnName, { code, what, mend }: Wrong): null => {
    faults.push({ code, place: { ...place, column: place.column ?? column }, what: `${named}${what}`, mend });
    return null;
  };
  const read = <T>(column: ColumnName, reader: (text: string) => T | Wrong): T | null => {
    const text = cells[column];
    if (text === undefined) return null;
    const value = reader(text);
    return isWrong(value) ? wrong(column, value) : value;
  };

  const unit = read("unit", unitFrom) ?? context.unit;
  const ownMedium = read("medium", mediumFrom);
  // air asked for all bands matters to wavelengths only; a row that says so of another unit contradicts itself
  if (ownMedium === "air" && !isWavelength(unit))
    wrong("medium", {
      code: "air-without-wavelength",
      what: `air stands beside a position in ${unit}, which is the same in air and vacuum`,
      mend: "write unit nm if it is a wavelength, or medium vacuum",
    });
  const medium = isWavelength(unit) ? (ownMedium ?? context.medium) : "vacuum";
  // uncertainties may be in nm beside a position in cm-1: those keep the medium asked for
  const footing: Footing = { unit, medium: ownMedium ?? context.medium, air: context.air };
  const label = labelOf(cells, wrong);
  const position: Placed | null =
    cells.position === undefined
      ? wrong("position", { code: "no-position", what: "has no position", mend: "write a value such as 2885.98" })
      : read("position", (text) => placePosition(text, footing));
  const sigma = position === null ? null : sigmaOf(cells, position, footing, context, wrong);
  const use = read("use", useFrom) ?? true;
  const isotopologue = read("isotopologue", (text) => {
    const known = bonds.get(text) ?? bondFrom(text);
    bonds.set(text, known);
    return known;
  });
  if (context.laser !== null && position !== null) {
    const stokes = stokesFault(unit, position, context.laser);
    if (stokes !== null) wrong(isWavelength(unit) ? "position" : "unit", stokes);
  }
  const twoLevels =
    position === null ? null : readCompanion(cells, position, sigma?.value ?? null, footing, context, wrong);
  if (position === null || faults.length > before) return null;
  const measured = context.laser === null ? position.wavenumber : context.laser.wavenumber - position.wavenumber;
  return {
    extrapolated: position.extrapolated,
    absolute: position.wavenumber,
    band: {
      label,
      position: twoLevels?.corrected ?? measured,
      sigma: twoLevels === null ? (sigma?.value ?? null) : twoLevels.sigma,
      isotopologue,
      use,
      phase: cells.phase ?? context.phase,
      group: cells.group ?? null,
      twoLevels,
      note: cells.note ?? null,
      place,
      asRead: { text: cells.position!, unit, medium, sigmaText: sigma?.text ?? null },
    },
  };
}

function labelOf({ band, upper, lower }: RawRow["cells"], wrong: (column: ColumnName, wrong: Wrong) => null): string {
  const whole = band === undefined ? null : canonicalLabel(band);
  const made = upper === undefined || lower === undefined ? null : canonicalLabel(`${upper}-${lower}`);
  if (whole !== null && made !== null && whole !== made)
    wrong("band", {
      code: "labels-differ",
      what: `"${band}" and the levels ${upper} and ${lower} differ`,
      mend: "give the label once",
    });
  if (whole === null && made === null) {
    const missing = upper === undefined ? "upper" : "lower";
    if (upper === lower)
      wrong("band", { code: "no-label", what: "has no label", mend: 'write one such as 1-0 in the column "band"' });
    else
      wrong(missing, { code: "no-label", what: `has no ${missing} level`, mend: "write both levels, such as 1 and 0" });
  }
  return whole ?? made ?? "";
}

/** Standard uncertainty in cm-1: written beside the position, else in its own column, else from the settings. */
function sigmaOf(
  cells: RawRow["cells"],
  { wavenumber, stated }: Placed,
  footing: Footing,
  context: Context,
  wrong: (column: ColumnName, wrong: Wrong) => null,
): { value: number; text: string } | null {
  const inWavenumbers = (value: number, unit = footing.unit) => value * Math.abs(rate(wavenumber, unit, footing));
  if (stated !== null && cells.sigma !== undefined)
    return wrong("sigma", {
      code: "sigma-twice",
      what: "the uncertainty stands beside the position and in its own column",
      mend: "give it once",
    });
  if (stated !== null) {
    const factor = stated.expanded ? context.meaning : 1;
    return { value: inWavenumbers(stated.value) * factor, text: `${stated.value}` };
  }
  if (cells.sigma !== undefined) {
    const sigma = readUncertainty(cells.sigma);
    if (isWrong(sigma)) return wrong("sigma", sigma);
    const unit = cells.sigma_unit === undefined ? sigma.unit : unitFrom(cells.sigma_unit);
    if (isWrong(unit)) return wrong("sigma_unit", unit);
    if (sigma.unit !== null && sigma.unit !== unit)
      return wrong("sigma_unit", {
        code: "sigma-units-differ",
        what: `the uncertainty is in ${sigma.unit} and in ${unit}`,
        mend: "give its unit once",
      });
    const text = cells.sigma_unit === undefined ? cells.sigma : `${cells.sigma} ${cells.sigma_unit}`;
    return { value: inWavenumbers(sigma.value, unit ?? undefined) * context.meaning, text };
  }
  if (context.sigma === null) return null;
  return {
    value: inWavenumbers(context.sigma.value, context.sigma.unit ?? undefined) * context.meaning,
    text: context.sigma.text,
  };
}

function useFrom(text: string): boolean | Wrong {
  const word = text.toLowerCase();
  if (YES.includes(word)) return true;
  if (NO.includes(word)) return false;
  return { code: "use", what: `"${text}" is neither yes nor no`, mend: "write yes or no" };
}
