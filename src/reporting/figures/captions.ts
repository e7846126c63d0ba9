import type { SeriesResult } from "../../analysis/index.ts";
import type { FigureOptions } from "./options.ts";

const SYMBOLS = {
  equilibrium: ["ωe", "ωexe", "ωeye", "ωeze", "Y50", "Y60"],
  local: ["ω̃", "ω̃x", "ω̃y", "ω̃z", "Y50", "Y60"],
} as const;

/** "a, b and c". */
export function listed(items: readonly string[]): string {
  if (items.length < 2) return items[0] ?? "";
  return `${items.slice(0, -1).join(", ")} and ${items.at(-1)}`;
}

/** "1 band", "2 bands". */
export function counted(count: number, noun: string): string {
  return `${count} ${noun}${count === 1 ? "" : "s"}`;
}

/** "HCl (6 bands)", all series. */
export function seriesPhrase(series: readonly SeriesResult[]): string {
  return listed(series.map(({ name, quality }) => `${name} (n = ${quality.bands})`));
}

/** What was fitted, once for all series that share it. */
export function modelPhrase(series: readonly SeriesResult[], { notation }: FigureOptions): string {
  const phrases = series.map(({ terms, constants, model }) => {
    const count = terms ?? Object.keys(constants).length;
    const symbols = listed(SYMBOLS[notation].slice(0, count));
    if (constants.we === undefined) return `the ${model} model`;
    return count === 2 ? `a Morse oscillator (${symbols})` : `a series of ${count} terms in v + ½ (${symbols})`;
  });
  const distinct = [...new Set(phrases)];
  if (distinct.length === 1) return distinct[0]!;
  return listed(series.map(({ name }, i) => `${phrases[i]} for ${name}`));
}

/** The names of all series. */
export function namesOf(series: readonly SeriesResult[]): string {
  return listed(series.map(({ name }) => name));
}

/** A sentence on bands that stand as corrected for a companion; empty without any. */
export function correctedPhrase(series: readonly SeriesResult[]): string {
  const several = series.length > 1;
  const labels = series.flatMap(({ name, bands }) =>
    bands.flatMap(({ label, twoLevels }) => (twoLevels === null ? [] : [several ? `${label} of ${name}` : label])),
  );
  return labels.length === 0 ? "" : ` Corrected for a companion: ${listed([...new Set(labels)])}.`;
}
