import {
  type InputFormat,
  mergeSettings,
  type RawRow,
  readInput,
  rowsFromBands,
  rowsFromSeries,
  type Settings,
  toSeries,
  type Understood,
} from "../../src/bands/index.ts";
import { InputError } from "../../src/messages/index.ts";

/** Flags as settings. */
export const flags = (values: Readonly<Record<string, string>>): Settings =>
  new Map(Object.entries(values).map(([name, value]) => [name, { value, place: { source: `--${name}` } }]));

/** Text of a file and flags to series, as a command does it. */
export async function understand(
  text: string,
  options: Readonly<Record<string, string>> = {},
  format: InputFormat = "csv",
): Promise<Understood> {
  const { rows, settings } = await readInput(text, `bands.${format}`, format);
  return toSeries(rows, mergeSettings(flags(options), settings));
}

export const ofSeries = (text: string, options: Readonly<Record<string, string>> = {}): RawRow[] =>
  rowsFromSeries(text, options.from ?? null, options.unit ?? null, { source: "--series" });
export const ofBands = (text: string): RawRow[] => rowsFromBands(text, { source: "--bands" });

/** Code and text of everything wrong, in order; none when nothing is. */
export async function faultsOf(work: () => unknown): Promise<{ code: string; text: string }[]> {
  try {
    await work();
    return [];
  } catch (error) {
    if (!(error instanceof InputError)) throw error;
    const lines = error.message.split("\n");
    return error.faults.map(({ code }, i) => ({ code, text: lines[i]! }));
  }
}
