import {
  type AirConditions,
  isWavelength,
  readMeasurement,
  readUnit,
  splitUnit,
  toWavenumber,
  type UnitName,
} from "../quantity/index.ts";
import { rate, readUncertainty, type Wrong } from "./conversion.ts";
import type { Medium } from "./series.ts";

/** Calibration error of one group of bands: an offset in a unit of position, or a scale error in ppm. */
export interface GroupSigma {
  readonly value: number;
  readonly unit: UnitName | "ppm";
}

const GROUP = 'write groups with their uncertainty, such as "fts=0.01, dye=0.02 nm, diode=2 ppm"';

/** `fts=0.01, dye=0.02 nm, diode=2 ppm`: one standard uncertainty a group; a bare number is in `unit`. */
export function groupSigmasFrom(text: string, unit: UnitName): ReadonlyMap<string, GroupSigma> | Wrong {
  const groups = new Map<string, GroupSigma>();
  for (const entry of text.split(/[,;\n]+/)) {
    if (entry.trim() === "") continue;
    const at = entry.indexOf("=");
    const name = entry.slice(0, at).trim();
    if (at < 0 || name === "") return { code: "group-sigma", what: `"${entry.trim()}" names no group`, mend: GROUP };
    if (groups.has(name))
      return { code: "group-twice", what: `"${name}" stands there twice`, mend: "name each group once" };
    const written = entry.slice(at + 1).trim();
    const [, share] = /^(.*?)\s*ppm$/i.exec(written) ?? [];
    const read = readUncertainty(share ?? written);
    if ("what" in read) return { ...read, what: `group "${name}": ${read.what}` };
    groups.set(name, { value: read.value, unit: share === undefined ? (read.unit ?? unit) : "ppm" });
  }
  return groups.size > 0 ? groups : { code: "group-sigma", what: "names no group", mend: GROUP };
}

/** Standard uncertainty in cm-1 of a position for every quantum it spans, such as the thermal shift of a band maximum. */
export function perQuantumFrom(text: string): number | Wrong {
  const read = readUncertainty(text);
  if ("what" in read) return read;
  if (read.unit !== null && isWavelength(read.unit))
    return {
      code: "per-quantum-sigma",
      what: `${read.unit} is no unit of an energy per quantum`,
      mend: "write it in cm-1, such as 0.5",
    };
  return toWavenumber(read.value, read.unit ?? "cm-1");
}

/** The exciting line of a Raman spectrum: its wavenumber in vacuum, and its standard uncertainty in cm-1 if it has one. */
export interface Laser {
  readonly wavenumber: number;
  readonly sigma: number | null;
  readonly stated: { readonly value: number; readonly unit: string } | null;
}

const LASER = "write the wavelength of the exciting line, such as 532.0 or 532.045(2) nm";

/** `532.045(2)`, in nm unless another unit of wavelength stands there; in the medium of the bands. */
export function laserFrom(text: string, medium: Medium, air: AirConditions): Laser | Wrong {
  const { number, unit } = splitUnit(text);
  const own = unit ?? "nm";
  const read = readMeasurement(number);
  if (!read.ok) return { code: "laser", what: read.what, mend: LASER };
  if (!(read.value > 0)) return { code: "laser", what: `"${text}" is not a positive wavelength`, mend: LASER };
  if (readUnit(own) === null || !isWavelength(own))
    return { code: "laser", what: `${own} is no unit of a wavelength`, mend: LASER };
  let wavenumber: number;
  try {
    wavenumber = toWavenumber(read.value, own, medium, air);
  } catch (error) {
    if (!(error instanceof RangeError)) throw error;
    return {
      code: "laser",
      what: "lies below 230 nm, where the dispersion of air is not known",
      mend: "give it in vacuum",
    };
  }
  const stated = read.sigma === null ? null : { value: read.sigma, unit: own };
  const sigma = read.sigma === null ? null : read.sigma * Math.abs(rate(wavenumber, own, { unit: own, medium, air }));
  return { wavenumber, sigma, stated };
}
