import type { Fault } from "../messages/index.ts";
import {
  type AirConditions,
  nearestUnit,
  readAir,
  readUnit,
  standardAir,
  type UnitName,
  unitNames,
} from "../quantity/index.ts";
import { type Bond, readBond, reducedMassBond } from "../species/index.ts";
import { readUncertainty, type Wrong } from "./conversion.ts";
import { type GroupSigma, groupSigmasFrom, type Laser, laserFrom, perQuantumFrom } from "./read-shared.ts";
import type { Medium } from "./series.ts";
import type { Setting, Settings } from "./settings.ts";

/** Factors from a stated uncertainty to a standard one (JCGM 100:2008, 4.3). */
const MEANINGS = { standard: 1, "2sigma": 1 / 2, "95": 1 / 1.959963984540054, halfwidth: 1 / Math.sqrt(3) } as const;

/** What the settings say for every row that does not say otherwise. */
export interface Context {
  readonly unit: UnitName;
  readonly medium: Medium;
  readonly air: AirConditions;
  readonly sigma: { readonly value: number; readonly unit: UnitName | null; readonly text: string } | null;
  /** standard uncertainty over stated one; for `sigma` and values after ±, not for parentheses, which are standard ones */
  readonly meaning: number;
  readonly shared: { readonly value: number; readonly unit: UnitName } | null;
  /** calibration errors by name of the group */
  readonly groups: ReadonlyMap<string, GroupSigma> | null;
  /** cm-1 a quantum */
  readonly perQuantum: number | null;
  /** positions are scattered wavelengths, and bands their shifts from this line */
  readonly laser: Laser | null;
  readonly subtracted: boolean;
  readonly bond: Bond | null;
  readonly name: string | null;
  readonly phase: string | null;
}

/** Read the settings about bands; what is wrong is added to `faults`. */
export function readContext(settings: Settings, faults: Fault[]): Context {
  const wrong = (setting: Setting, { code, what, mend }: Wrong) => {
    faults.push({ code, place: setting.place, what, mend });
    return null;
  };
  const read = <T>(name: string, reader: (text: string) => T | Wrong): T | null => {
    const setting = settings.get(name);
    if (setting === undefined) return null;
    const value = reader(setting.value.trim());
    return isWrong(value) ? wrong(setting, value) : value;
  };
  const unit = read("unit", unitFrom) ?? "cm-1";
  const sigma = read("sigma", readUncertainty);
  const shared = read("shared-sigma", readUncertainty);
  const bond = settings.get("bond");
  const mass = settings.get("reduced-mass");
  if (bond !== undefined && mass !== undefined)
    wrong(mass, { code: "bond-twice", what: "stands beside --bond", mend: "give one of them" });
  const medium = read("medium", mediumFrom) ?? "vacuum";
  const air = read("air", airFrom) ?? standardAir;
  return {
    unit,
    medium,
    air,
    groups: read("group-sigma", (text) => groupSigmasFrom(text, unit)),
    perQuantum: read("per-quantum-sigma", perQuantumFrom),
    laser: read("laser", (text) => laserFrom(text, medium, air)),
    sigma: sigma === null ? null : { ...sigma, text: settings.get("sigma")!.value },
    meaning: read("sigma-means", meaningFrom) ?? 1,
    shared: shared === null ? null : { value: shared.value, unit: shared.unit ?? unit },
    subtracted: read("spacings", spacingsFrom) ?? false,
    bond: bond === undefined ? read("reduced-mass", massFrom) : read("bond", bondFrom),
    name: settings.get("name")?.value.trim() || null,
    phase: settings.get("phase")?.value.trim() || null,
  };
}

export function isWrong(x: unknown): x is Wrong {
  return typeof x === "object" && x !== null && "what" in x && "mend" in x;
}

export function unitFrom(text: string): UnitName | Wrong {
  const unit = readUnit(text);
  if (unit !== null) return unit;
  const near = nearestUnit(text);
  const hint = near === null ? "" : ` (did you mean ${near}?)`;
  return {
    code: "unknown-unit",
    what: `"${text}" is not a unit${hint}`,
    mend: `write one of ${unitNames.join(", ")}`,
  };
}

export function mediumFrom(text: string): Medium | Wrong {
  const word = text.toLowerCase();
  if (word === "vacuum" || word === "air") return word;
  return { code: "unknown-medium", what: `"${text}" is not a medium`, mend: "write vacuum or air" };
}

/** A bond or what is wrong with it. */
export function bondFrom(text: string): Bond | Wrong {
  const bond = readBond(text);
  if (!("what" in bond)) return bond;
  // --bond and --bonds are one slip apart.
  const mend = /^([2-9]|unlike)$/i.test(text.trim())
    ? `${bond.mend}; the number of coupled bonds is --bonds ${text.trim()}`
    : bond.mend;
  return { code: "bond", what: bond.what, mend };
}

function massFrom(text: string): Bond | Wrong {
  const bond = reducedMassBond(text);
  return "what" in bond ? { code: "reduced-mass", ...bond } : bond;
}

function airFrom(text: string): AirConditions | Wrong {
  const air = readAir(text);
  return "what" in air ? { code: "air-conditions", ...air } : air;
}

function meaningFrom(text: string): number | Wrong {
  const key = text.toLowerCase().replace(/\s*%$/, "");
  if (Object.hasOwn(MEANINGS, key)) return MEANINGS[key as keyof typeof MEANINGS];
  return {
    code: "sigma-means",
    what: `"${text}" is no meaning of an uncertainty`,
    mend: "write standard, 2sigma, 95 or halfwidth",
  };
}

function spacingsFrom(text: string): boolean | Wrong {
  const word = text.toLowerCase();
  if (word === "measured" || word === "subtracted") return word === "subtracted";
  return { code: "spacings", what: `"${text}" says nothing about spacings`, mend: "write measured or subtracted" };
}
