import type { Parameter } from "../../fitting/index.ts";
import type { ConstantInfo, ModelOptions } from "../model.ts";

const info = (key: string, symbol: string): ConstantInfo => ({
  key,
  unit: "cm-1",
  symbol: { equilibrium: symbol, local: symbol },
});

/** ν̃_s·v_s + ν̃_b·v_b + x_ss·v_s² + x_bb·v_b² + x_sb·v_s·v_b + g_bb·l² above the ground state, and the coupling k_sbb. */
export const constants: readonly ConstantInfo[] = [
  info("ws", "ν̃s"),
  info("wb", "ν̃b"),
  info("xss", "xss"),
  info("xbb", "xbb"),
  info("xsb", "xsb"),
  { ...info("gbb", "gbb"), seenIn: "levels with l above 0, such as 1.5_1:1" },
  info("ksbb", "ksbb"),
];

const TYPICAL = [3000, 1400, 60, 5, 20, 5, 50];

/** Keys in play: a single bend has no angular momentum, and no gbb. */
export const keysOf = ({ bend }: ModelOptions) =>
  constants.map(({ key }) => key).filter((key) => bend !== "single" || key !== "gbb");

export function parametersOf(options: ModelOptions): Parameter[] {
  return keysOf(options).map((key) => {
    const at = constants.findIndex((constant) => constant.key === key);
    const { symbol, unit } = constants[at]!;
    const fixed = options.fixed[key];
    const even = key === "ksbb" ? ({ even: true } as const) : {};
    const base = { key, unit, symbol: symbol.local, start: 0, typical: TYPICAL[at]!, ...even };
    if (fixed === undefined) return base;
    return fixed.sigma === null
      ? { ...base, held: fixed.value }
      : { ...base, prior: { value: fixed.value, sigma: fixed.sigma } };
  });
}
