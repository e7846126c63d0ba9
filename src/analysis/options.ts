import type { RobustKind, Treatment } from "../fitting/index.ts";
import type { ModelOptions } from "../models/index.ts";
import type { AirConditions } from "../quantity/index.ts";

export type IntervalKind = "linear" | "profile" | "resample";
export type ExcessKind = "scatter" | "birge" | "none";

/** Another mode of the molecule, cm-1. */
export interface Mode {
  readonly name: string;
  readonly wavenumber: number;
  readonly sigma: number | null;
}

/** One constant in common with other series: `value` ± `sigma` is what they say of it, which `fixed` holds as an observation. */
export interface SharedConstant {
  readonly key: string;
  readonly value: number;
  readonly sigma: number;
  readonly spread: number;
  readonly from: readonly string[];
  /** of the residuals of the joint fit */
  readonly treatment: Treatment;
  readonly excess: { readonly kind: ExcessKind; readonly value: number | null; readonly applied: boolean };
  /** of the joint fit, where its treatment was estimated; otherwise null */
  readonly degreesOfFreedom: number | null;
}

/** Everything `analyse` may be told beside the series and the model; nothing is optional here. */
export interface AnalysisOptions extends ModelOptions {
  /** choose the number of terms by what the bands support; `terms` then counts for nothing */
  readonly autoTerms: boolean;
  readonly excess: ExcessKind;
  /** a given τ in cm-1, used whatever χ² says; null: estimated where needed */
  readonly scatter: number | null;
  /** a further level of intervals, printed beside the 95 % ones */
  readonly coverage: number | null;
  /** whether the shift of each group of bands is shown, or only carried in the covariance */
  readonly groups: "carried" | "fitted";
  readonly robust: RobustKind | null;
  readonly intervals: IntervalKind;
  readonly resamples: number;
  readonly seed: number;
  /** highest level to predict; null: three beyond the last band */
  readonly upTo: number | null;
  readonly air: AirConditions;
  /** an accepted D0 in cm-1 to compare with, with its standard uncertainty if known; null: none */
  readonly accepted: { readonly value: number; readonly sigma: number | null } | null;
  /** other modes of the molecule, to look for resonances with; empty: none are looked for */
  readonly modes: readonly Mode[];
  /** a combination within this many cm-1 of an overtone is a candidate */
  readonly window: number;
  /** the bond is the whole molecule: enthalpies at 298.15 K follow */
  readonly diatomic: boolean;
  /** an accepted ΔH°(298.15 K) in kJ/mol to compare with; null: none */
  readonly acceptedEnthalpy: { readonly value: number; readonly sigma: number | null } | null;
  /** a constant that other series have a say in, and how the residuals of all of them are treated; null: none */
  readonly shared: SharedConstant | null;
  /** rotational constants in cm-1, bond length in Å */
  readonly be: number | null;
  readonly alphaE: number | null;
  readonly re: number | null;
}
