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

/** `--modes "bend 1370, rock 1020(5)"`: names and wavenumbers in cm-1, by commas, semicolons or newlines. */
export function readModes(reader: Reader, model: Model | null): AnalysisOptions["modes"] {
  const setting = reader.settings.get("modes");
  if (setting === undefined) return [];
  if (model !== null && model.well === undefined) {
    reader.fault(
      setting,
      "modes-of-another-model",
      `the model ${model.name} has no overtones to be perturbed`,
      "leave --modes out, or fit --model oscillator",
    );
    return [];
  }
  const names = new Set<string>();
  const modes = setting.value
    .split(/[,;\n]+/)
    .filter((part) => part.trim() !== "")
    .flatMap((part) => {
      const [, name = "", number = ""] = /^\s*(\S.*?)\s+(\S+)\s*$/.exec(part) ?? [];
      const read = readMeasurement(number);
      if (name === "" || !read.ok || !(read.value > 0)) {
        reader.fault(
          setting,
          "modes",
          `"${part.trim()}" is no mode`,
          'write a name and its wavenumber in cm-1, such as "bend 1370, rock 1020(5)"',
        );
        return [];
      }
      if (names.has(name))
        reader.fault(
          setting,
          "mode-twice",
          `the mode "${name}" stands there twice`,
          "give each mode once, by a name of its own",
        );
      names.add(name);
      return [{ name, wavenumber: read.value, sigma: read.sigma }];
    });
  if (modes.length > 12)
    reader.fault(
      setting,
      "too-many-modes",
      `${modes.length} modes are too many to combine`,
      "give the twelve that matter most",
    );
  return modes;
}
