import { type Fault, InputError, type Warning } from "../messages/index.ts";
import {
  type AirConditions,
  airRange,
  fromWavenumber,
  isWavelength,
  nearestUnit,
  readAir,
  readMeasurement,
  readUnit,
  splitUnit,
  standardAir,
  toWavenumber,
  type UnitName,
  unitNames,
  wavenumberPerUnit,
} from "../quantity/index.ts";
import { tool } from "./tool.ts";

/** What `convert` may be told. */
export interface ConvertRequest {
  /** positions as typed, each with its own unit or in `unit` */
  readonly values: readonly string[];
  readonly to: string;
  /** @default "cm-1" */
  readonly unit?: string;
  /** @default "vacuum" */
  readonly medium?: string;
  /** @default "vacuum" */
  readonly toMedium?: string;
  readonly air?: string;
  /** standard uncertainty of values that carry none, in their unit */
  readonly sigma?: string;
}

/** The document of `convert`. */
export interface ConvertDocument {
  readonly schemaVersion: 1;
  readonly tool: { readonly name: string; readonly version: string };
  readonly results: readonly {
    readonly input: string;
    readonly value: number;
    readonly standardUncertainty: number | null;
    readonly unit: string;
    readonly medium: "vacuum" | "air";
  }[];
  readonly warnings: readonly Warning[];
}

/**
 * Convert positions between units and media, with their uncertainty to first order.
 * @throws InputError exit 2 with every fault of the request
 */
export function convert(request: ConvertRequest): ConvertDocument {
  const faults: Fault[] = [];
  const fault = (source: string, code: string, what: string, mend: string) => {
    faults.push({ code, place: { source }, what, mend });
    return null;
  };
  const unitOf = (text: string, flag: string): UnitName | null => {
    const near = nearestUnit(text);
    const hint = near === null ? "" : ` (did you mean ${near}?)`;
    return (
      readUnit(text) ??
      fault(flag, "unknown-unit", `"${text}" is not a unit${hint}`, `write one of ${unitNames.join(", ")}`)
    );
  };
  const mediumOf = (text: string, flag: string): "vacuum" | "air" | null =>
    text === "vacuum" || text === "air"
      ? text
      : fault(flag, "unknown-medium", `"${text}" is not a medium`, "write vacuum or air");
  const to =
    request.to === undefined
      ? fault("--to", "no-target", "no unit to convert to", "write --to nm, for example")
      : unitOf(request.to, "--to");
  const from = unitOf(request.unit ?? "cm-1", "--unit");
  const medium = mediumOf(request.medium ?? "vacuum", "--medium");
  const toMedium = mediumOf(request.toMedium ?? "vacuum", "--to-medium");
  const air = readAir(request.air ?? "15 C, 101325 Pa");
  if ("what" in air) fault("--air", "air-conditions", air.what, air.mend);
  const sigma = request.sigma === undefined ? null : readMeasurement(request.sigma);
  if (sigma !== null && !(sigma.ok && sigma.value > 0))
    fault("--sigma", "sigma", sigma.ok ? "must be positive" : sigma.what, "write a standard uncertainty such as 0.02");
  if (to === null || from === null || medium === null || toMedium === null || faults.length > 0)
    throw new InputError(faults);

  const conditions: AirConditions = "what" in air ? standardAir : air;
  const extended: string[] = [];
  const results = request.values.flatMap((input) => {
    const { number, unit } = splitUnit(input);
    const own = unit ?? from;
    const read = readMeasurement(number);
    if (!read.ok) return fault(`"${input}"`, "not-a-number", read.what, read.mend) ?? [];
    if (!(read.value > 0))
      return fault(`"${input}"`, "not-positive", "a position must be positive", "write a value such as 2885.98") ?? [];
    const wavenumber = guarded(() => toWavenumber(read.value, own, isWavelength(own) ? medium : "vacuum", conditions));
    if (wavenumber === null || (isWavelength(to) && toMedium === "air" && airRange(1e7 / wavenumber) === "refused"))
      return (
        fault(
          `"${input}"`,
          "air-below-230-nm",
          "the dispersion of air is not known below 230 nm",
          "convert the vacuum wavelength, or use cm-1",
        ) ?? []
      );
    const usesAir = (isWavelength(own) && medium === "air") || (isWavelength(to) && toMedium === "air");
    if (usesAir && airRange(1e7 / wavenumber) === "extrapolated") extended.push(input);
    const u = read.sigma ?? (sigma?.ok ? sigma.value : null);
    const inWavenumbers =
      u === null
        ? null
        : u * Math.abs(wavenumberPerUnit(wavenumber, own, isWavelength(own) ? medium : "vacuum", conditions));
    return [
      {
        input,
        value: fromWavenumber(wavenumber, to, toMedium, conditions),
        standardUncertainty:
          inWavenumbers === null
            ? null
            : inWavenumbers / Math.abs(wavenumberPerUnit(wavenumber, to, toMedium, conditions)),
        unit: to,
        medium: isWavelength(to) ? toMedium : ("vacuum" as const),
      },
    ];
  });
  if (faults.length > 0) throw new InputError(faults);
  return { schemaVersion: 1, tool, results, warnings: extended.length === 0 ? [] : [extendedWarning(extended)] };
}

function guarded(work: () => number): number | null {
  try {
    return work();
  } catch (error) {
    if (error instanceof RangeError) return null;
    throw error;
  }
}

const extendedWarning = (inputs: readonly string[]): Warning => ({
  code: "air-range-extended",
  message: `${inputs.join(", ")}: beyond 1690 nm Ciddor's dispersion formula is extrapolated (error about 1e-4 cm-1); use vacuum values where that matters`,
});
