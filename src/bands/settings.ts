import type { Place } from "../messages/index.ts";

/** A setting as it was written, and where. */
export interface Setting {
  readonly value: string;
  readonly place: Place;
}

/** Settings by their long names (those of the flags, without dashes). */
export type Settings = ReadonlyMap<string, Setting>;

/** The long names that a file may set as well as a flag. */
export const settingNames: readonly string[] = [
  "series",
  "from",
  "bands",
  "spacings",
  "unit",
  "medium",
  "air",
  "sigma",
  "sigma-means",
  "shared-sigma",
  "bond",
  "reduced-mass",
  "name",
  "phase",
  "model",
  "terms",
  "fix",
  "constants",
  "be",
  "alpha-e",
  "re",
  "excess",
  "scatter",
  "coverage",
  "notation",
  "up-to",
];

/** Flags beat the file. */
export function mergeSettings(flags: Settings, file: Settings): Settings {
  return new Map([...file, ...flags]);
}
