import type { Warning } from "../../messages/index.ts";
import type { Quantity, UnitName } from "../../quantity/index.ts";

/** What a plan is to make better known. */
export type Aim =
  | { readonly kind: "constant"; readonly key: string }
  | { readonly kind: "d0" }
  | { readonly kind: "prediction"; readonly label: string }
  | { readonly kind: "model" };

/** Where the user can look, in cm-1 of vacuum. */
export interface Window {
  readonly low: number;
  readonly high: number;
  /** a wavelength is that of the light, which of a Raman band is the scattered one; otherwise the band itself is meant */
  readonly ofLight: boolean;
  readonly text: string;
}

export interface PlanOptions {
  readonly aim: Aim;
  /** σ of the new band: in cm-1, or in a unit in which it is constant; null: the median of those stated */
  readonly sigmaNew: { readonly value: number; readonly unit: UnitName } | null;
  /** highest level of a new band; null: three beyond the last */
  readonly upTo: number | null;
  /** highest level hot bands start from */
  readonly hot: number;
  readonly windows: readonly Window[];
}

/** A band that could be measured next. */
export interface PlannedBand {
  readonly label: string;
  /** where to look, cm-1 */
  readonly position: Quantity;
  /** of the light, nm */
  readonly vacuumWavelength: number;
  readonly airWavelength: number | null;
  /** how far the same model misses the highest observed band when that is left out, cm-1 */
  readonly lastBandOut: number | null;
  /** standard uncertainty the new band is given, cm-1 */
  readonly sigmaNew: number;
  /** standard uncertainty of the aim with this band added */
  readonly uncertaintyAfter: number;
  /** uncertainty now over that after */
  readonly gain: number;
  /** aim model: by how many standard uncertainties the band would lie off the smaller model if the larger one is true; otherwise null */
  readonly separation: number | null;
  readonly observed: boolean;
}

/** The plan of one series. */
export interface Plan {
  readonly name: string;
  readonly aim: string;
  /** the aim as it is known now; of the aim model: the last constant of the larger model */
  readonly now: Quantity;
  /** the best first */
  readonly candidates: readonly PlannedBand[];
  /** wavelengths are those of Raman-scattered light */
  readonly scattered: boolean;
  readonly warnings: readonly Warning[];
}
