import type { ErrorModel, Outside, RobustKind, Treatment } from "../fitting/index.ts";
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

/** A constant that series have in common, or (spread > 0, cm-1) that is scattered about a common mean with that standard deviation. */
export interface SharedConstant {
  readonly key: string;
  readonly spread: number;
}

/** The bands of one series as a fit sees them. */
export interface OwnBands {
  readonly jacobian: readonly (readonly number[])[];
  readonly observed: readonly number[];
  readonly errors: ErrorModel;
}

/** The fit of all series in which constants are shared, seen from one of them. */
export interface Sharing {
  readonly constants: readonly SharedConstant[];
  /** of all series */
  readonly names: readonly string[];
  /** of this one among them */
  readonly place: number;
  /** of the residuals of all bands */
  readonly treatment: Treatment;
  readonly excess: { readonly kind: ExcessKind; readonly value: number | null; readonly applied: boolean };
  /** of the joint fit, where its treatment was estimated; otherwise null */
  readonly degreesOfFreedom: number | null;
  /** bands of all series, and constants fitted to them */
  readonly bands: number;
  readonly fitted: number;
  /** what the bands of the other series say of the constants of this one, given its own */
  outside(own: OwnBands, treatment: Treatment): Outside;
  /** between the constants of two series, by their places */
  covariance(a: number, b: number): readonly (readonly number[])[];
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
  /** constants in common with other series; null: none */
  readonly sharing: Sharing | null;
  /** rotational constants in cm-1, bond length in Å */
  readonly be: number | null;
  readonly alphaE: number | null;
  readonly re: number | null;
}
