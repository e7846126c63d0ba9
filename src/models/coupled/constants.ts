import type { Parameter } from "../../fitting/index.ts";
import type { ConstantInfo, ModelOptions } from "../model.ts";

const info = (key: string, symbol: string, positive?: true): ConstantInfo => ({
  key,
  unit: "cm-1",
  symbol: { equilibrium: symbol, local: symbol },
  ...(positive === undefined ? {} : { positive }),
});

/** Constants of equivalent bonds (the first four) and of two unlike ones (the last four, with lambda). */
export const constants: readonly ConstantInfo[] = [
  info("w", "ω̃"),
  info("wx", "ω̃x"),
  info("lambda", "λ"),
  info("wxcross", "ω̃x′"),
  info("w1", "ω̃1"),
  info("wx1", "ω̃x1"),
  info("w2", "ω̃2"),
  info("wx2", "ω̃x2"),
];

const TYPICAL: Readonly<Record<string, number>> = { w: 3000, wx: 60, lambda: 10, wxcross: 5 };

/** Keys in play, in the order of the constants of a fit. */
export function keysOf({ bonds, cross, fixed }: ModelOptions): readonly string[] {
  if (bonds === "unlike") return ["w1", "wx1", "w2", "wx2", "lambda"];
  return cross === true || fixed.wxcross !== undefined ? ["w", "wx", "lambda", "wxcross"] : ["w", "wx", "lambda"];
}

export function parametersOf(options: ModelOptions): Parameter[] {
  return keysOf(options).map((key) => {
    const { symbol, unit } = constants.find((constant) => constant.key === key)!;
    const fixed = options.fixed[key];
    const base = { key, unit, symbol: symbol.local, start: 0, typical: TYPICAL[key.replace(/\d$/, "")]! };
    if (fixed === undefined) return base;
    return fixed.sigma === null
      ? { ...base, held: fixed.value }
      : { ...base, prior: { value: fixed.value, sigma: fixed.sigma } };
  });
}
