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
  "group-sigma",
  "groups",
  "per-quantum-sigma",
  "laser",
  "bond",
  "reduced-mass",
  "name",
  "phase",
  "model",
  "terms",
  "power",
  "cn",
  "limit",
  "bonds",
  "cross",
  "bend",
  "fix",
  "constants",
  "be",
  "alpha-e",
  "accepted",
  "accepted-enthalpy",
  "diatomic",
  "re",
  "excess",
  "scatter",
  "coverage",
  "intervals",
  "resamples",
  "seed",
  "peaks",
  "ladders",
  "limits",
  "expect",
  "robust",
  "modes",
  "window",
  "share",
  "compare",
  "correlation",
  "notation",
  "up-to",
];

/** Settings that say the same thing in two ways: one as a flag beats the other in the file. */
const ALTERNATIVES = [
  ["bond", "reduced-mass"],
  ["series", "bands"],
];

/** Flags beat the file, also where they say the same thing in another way (`--reduced-mass` beats `bond` in a file). */
export function mergeSettings(flags: Settings, file: Settings): Settings {
  const beaten = ALTERNATIVES.filter((names) => names.some((name) => flags.has(name))).flat();
  return new Map([...[...file].filter(([name]) => !beaten.includes(name)), ...flags]);
}
