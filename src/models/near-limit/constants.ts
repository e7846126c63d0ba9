import type { Parameter } from "../../fitting/index.ts";
import type { ConstantInfo, ModelOptions } from "../model.ts";
import { coefficientOf, exponentText, lineSlope } from "./law.ts";

const both = (symbol: string) => ({ equilibrium: symbol, local: symbol });

/** D above v = 0, the (not whole) quantum number at D, and the coefficient of the long-range potential or what stands for it without masses. */
export const constants: readonly ConstantInfo[] = [
  { key: "d", unit: "cm-1", symbol: both("D"), positive: true },
  { key: "vd", unit: "1", symbol: both("vD"), positive: true },
  { key: "cn", unit: "cm-1 Å^n", symbol: both("Cn"), positive: true },
  { key: "hn", unit: "(cm-1)^((n-2)/2n)", symbol: both("Hn"), positive: true },
];

/** Sizes for scaling only. */
const TYPICAL: Readonly<Record<string, number>> = { d: 1e4, vd: 20, cn: 1e5, hn: 1 };

/** The constants in play: with masses C_n is the third, without them H_n, the slope of the line. */
export function parametersOf({ fixed, power, reducedMass }: ModelOptions): Parameter[] {
  const third = reducedMass == null ? "hn" : "cn";
  return constants
    .filter(({ key }) => key === "d" || key === "vd" || key === third)
    .map(({ key, unit, symbol }) => {
      const base = {
        key,
        symbol: symbol.equilibrium,
        unit: unit.replace("(n-2)/2n", exponentText(power!)).replace("^n", `^${power}`),
        start: TYPICAL[key]!,
        typical: TYPICAL[key]!,
      };
      const given = fixed[key];
      if (given === undefined) return base;
      return given.sigma === null
        ? { ...base, start: given.value, held: given.value }
        : { ...base, prior: { value: given.value, sigma: given.sigma } };
    });
}

/** H_n of the third constant, and ∂H_n by it. */
export function slopeOf(third: number, { power, reducedMass }: ModelOptions): { hn: number; derivative: number } {
  if (reducedMass == null) return { hn: third, derivative: 1 };
  const hn = lineSlope(power!, third, reducedMass);
  return { hn, derivative: -hn / (power! * third) };
}

/** The third constant of an H_n. */
export function thirdOf(hn: number, { power, reducedMass }: ModelOptions): number {
  return reducedMass == null ? hn : coefficientOf(power!, hn, reducedMass);
}
