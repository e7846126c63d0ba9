import type { Place, Warning } from "../messages/index.ts";
import type { Bond } from "../species/index.ts";
import type { Light } from "./light.ts";
import type { TwoLevels } from "./two-levels.ts";

export type Medium = "vacuum" | "air";

/** What stood in the input before any conversion. */
export interface AsRead {
  /** The position as typed, for example `970.056(10)`. */
  readonly text: string;
  readonly unit: string;
  readonly medium: Medium;
  /** The uncertainty as typed (with its own unit if it had one), or null. */
  readonly sigmaText: string | null;
}

/** One observed band: `position` and `sigma` (standard uncertainty, k = 1) in cm-1, vacuum. */
export interface Band {
  readonly label: string;
  readonly position: number;
  readonly sigma: number | null;
  readonly isotopologue: Bond | null;
  /** false: kept and shown, not fitted. */
  readonly use: boolean;
  readonly phase: string | null;
  readonly group: string | null;
  /** Where a companion and the ratio of intensities were given: `position` is corrected by them. */
  readonly twoLevels: TwoLevels | null;
  readonly note: string | null;
  readonly place: Place;
  readonly asRead: AsRead;
}

/** One cause of error that bands have in common. */
export interface Shared {
  readonly kind: "calibration" | "group" | "per-quantum" | "laser" | "mixture";
  /** of `group`: its name, and otherwise null */
  readonly group: string | null;
  /** its standard uncertainty in its own unit: cm-1, nm … or ppm */
  readonly sigma: { readonly value: number; readonly unit: string };
  /** what one standard uncertainty of it does to each band of the series, signed, cm-1 */
  readonly parts: readonly number[];
}

/** The bands of one oscillator, on a common footing: cm-1 in vacuum. */
export interface Series {
  readonly name: string;
  readonly bond: Bond | null;
  readonly bands: readonly Band[];
  /** Fully correlated parts of the uncertainty; independent of each other. */
  readonly shared: readonly Shared[];
  /** true: spacings (v+1 - v) were subtracted from measured positions, so neighbours share errors. */
  readonly subtracted: boolean;
  readonly light: Light;
  readonly warnings: readonly Warning[];
}
