import type { ConstantInfo, Notation } from "../models/index.ts";

/** What text calls each constant, by its key. */
export type Symbols = Readonly<Record<string, string>>;

/** The symbols of a model's constants in a notation, as every renderer takes them. */
export function constantSymbols(constants: readonly ConstantInfo[], notation: Notation): Symbols {
  return Object.fromEntries(constants.map(({ key, symbol }) => [key, symbol[notation]]));
}

/** The symbol of a constant; its key where the model names none. */
export const symbolOf = (symbols: Symbols, key: string): string => (Object.hasOwn(symbols, key) ? symbols[key]! : key);
