import type { AnalysisOptions } from "../analysis/index.ts";
import type { Model } from "../models/index.ts";
import { fromWavenumber, isWavelength, readMeasurement, splitUnit, toWavenumber } from "../quantity/index.ts";
import type { Reader } from "./setting-reader.ts";

/** `--accepted "35759(5)"` or `--accepted-enthalpy 431.6`, in `unit` or with a unit of energy; comes back in `unit`. */
export function readAccepted(
  reader: Reader,
  name: string,
  what: string,
  example: string,
  unit: "cm-1" | "kJ/mol",
): AnalysisOptions["accepted"] {
  const setting = reader.settings.get(name);
  if (setting === undefined) return null;
  const mend = `write an accepted ${what} such as ${example}`;
  const { number, unit: own } = splitUnit(setting.value);
  const read = readMeasurement(number);
  if (!read.ok) return reader.fault(setting, "not-a-number", read.what, mend);
  if (!(read.value > 0)) return reader.fault(setting, "out-of-range", `an accepted ${what} must be positive`, mend);
  if (own !== null && isWavelength(own))
    return reader.fault(setting, "unknown-unit", `${own} is no unit of a dissociation energy`, mend);
  const convert = (x: number) => (own === null ? x : fromWavenumber(toWavenumber(x, own), unit));
  return { value: convert(read.value), sigma: read.sigma === null ? null : convert(read.sigma) };
}

/** More would make more combinations than anyone can judge. */
const MOST = 12;
const FORM = 'write a name and its wavenumber in cm-1, such as "bend 1370, rock 1020(5)"';

/** `--modes "bend 1370, rock 1020(5)"`: split by commas, semicolons or newlines; the last word of each is the wavenumber in cm-1, the words before it the name. */
export function readModes(reader: Reader, model: Model | null): AnalysisOptions["modes"] {
  const setting = reader.settings.get("modes");
  if (setting === undefined) return [];
  const refuse = (code: string, what: string, mend: string): [] => {
    reader.fault(setting, code, what, mend);
    return [];
  };
  if (model !== null && model.well === undefined)
    return refuse(
      "modes-of-another-model",
      `the model ${model.name} has no overtones to be perturbed`,
      "leave --modes out, or fit --model oscillator",
    );
  const names = new Set<string>();
  const parts = setting.value
    .replace(/\s*(±|\+\/?-)\s*(?=[\d.])/g, "$1")
    .replace(/(?<=\d)\s+(?=\([\d.]+\))/g, "")
    .split(/[,;\n]+/)
    .map((part) => part.trim())
    .filter((part) => part !== "");
  const modes = parts.flatMap((part) => {
    const [, name = "", number = ""] = /^(\S.*?)\s+(\S+)$/.exec(part.replace(/\s+cm-1$/i, "")) ?? [];
    const read = readMeasurement(number);
    if (name === "" || !read.ok) return refuse("modes", `"${part}" is no mode`, FORM);
    if (!/^\p{L}/u.test(name))
      return refuse("modes", `"${name}" in "${part}" is no name: it does not begin with a letter`, FORM);
    if (!(read.value > 0))
      return refuse("mode-not-positive", `the mode "${name}" is not at a positive wavenumber`, FORM);
    if (name.toLowerCase() === "stretch")
      return refuse(
        "mode-is-stretch",
        '"stretch" is the oscillator that is fitted',
        "give the other modes, by other names",
      );
    if (names.has(name.toLowerCase()))
      return refuse("mode-twice", `the mode "${name}" stands there twice`, "give each mode once, by a name of its own");
    names.add(name.toLowerCase());
    return [{ name, wavenumber: read.value, sigma: read.sigma }];
  });
  if (parts.length === 0) refuse("no-modes", "names no modes", FORM);
  if (modes.length > MOST)
    refuse("too-many-modes", `${modes.length} modes are too many to combine`, `give the ${MOST} that matter most`);
  return modes;
}
