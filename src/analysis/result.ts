import type { AsRead, TwoLevels } from "../bands/index.ts";
import type { Place, Warning } from "../messages/index.ts";
import type { Quantity } from "../quantity/index.ts";
import type { EmpiricalError } from "./empirical/empirical-error.ts";
import type { ConsequenceResult, Deperturbation, LevelResult, Resonances } from "./mixed-result.ts";

/** One band beside its calculated position; cm-1, vacuum. */
export interface BandResult {
  readonly label: string;
  readonly observed: number;
  readonly calculated: number | null;
  /** observed - calculated */
  readonly residual: number | null;
  /** as stated in the input, before any excess treatment */
  readonly standardUncertainty: number | null;
  readonly studentizedResidual: number | null;
  readonly leverage: number | null;
  /** observed - predicted when this band (and its repeats) is left out */
  readonly leftOutResidual: number | null;
  readonly used: boolean;
  /** weight in a robust fit, 1 = full; null otherwise */
  readonly weight: number | null;
  readonly asRead: AsRead;
  /** where the position is corrected for a companion: both, and the coupling; cm-1 */
  readonly twoLevels: TwoLevels | null;
  readonly note: string | null;
  readonly phase: string | null;
  readonly place: Place;
}

export type DissociationMethod = "morse" | "morse-refit" | "turning-point" | "spacing-sum" | "near-limit";

/** One answer to "where is the dissociation limit?", cm-1. */
export interface DissociationRow {
  readonly method: DissociationMethod;
  readonly de: Quantity | null;
  readonly d0: Quantity | null;
  /** D0 in other units, unrounded, in the order value, standard uncertainty */
  readonly converted: Readonly<Record<"kJ/mol" | "kcal/mol" | "eV", readonly [number, number | null]>> | null;
  /** the caution that belongs to this row; for a null row the reason */
  readonly note: string | null;
  /** on rows of the Morse form: what reference wells say of it; null where none reach this coverage (a warning says why) */
  readonly empirical?: EmpiricalError | null;
}

export interface Prediction {
  readonly label: string;
  /** true position in cm-1, vacuum */
  readonly position: Quantity;
  /** how far the same model misses the highest observed band when that is left out, cm-1 (absolute) */
  readonly lastBandOut: number | null;
  /** nm */
  readonly vacuumWavelength: number;
  /** nm in air; null where the dispersion formula does not hold */
  readonly airWavelength: number | null;
  /** a band with this label was observed and used */
  readonly observed: boolean;
}

/** The fit of the lowest `bands` bands alone. */
export interface StabilityRow {
  readonly bands: number;
  readonly we: number;
  readonly wexe: number;
  /** Morse, cm-1 */
  readonly d0: number | null;
  /** predicted position of the next overtone above those bands, cm-1 */
  readonly next: number;
}

/** One number of terms beside the others, as `--terms auto` compares them; with the uncertainties as stated. */
export interface ComparisonRow {
  readonly terms: number;
  readonly degreesOfFreedom: number;
  readonly chiSquare: number | null;
  readonly probability: number | null;
  readonly rms: number;
  readonly aic: number | null;
  readonly aicc: number | null;
  readonly leaveOneOutRms: number | null;
  /** the test of this number against one fewer */
  readonly step: {
    readonly kind: "χ²-difference" | "F";
    readonly statistic: number;
    readonly probability: number;
  } | null;
  readonly chosen: boolean;
}

/** How the intervals of constants, De, D0 and predictions were found, when not to first order. */
export interface IntervalRecord {
  readonly kind: "profile" | "resample";
  readonly resamples: number | null;
  readonly seed: number | null;
  /** value of a constant or of D0, and the rise of χ² (in units of the variance) when it is held there */
  readonly profiles: readonly { readonly key: string; readonly points: readonly (readonly [number, number])[] }[];
  /** histograms of the draws; `missing`: share of draws in which the quantity does not exist */
  readonly distributions: readonly {
    readonly key: string;
    readonly edges: readonly number[];
    readonly counts: readonly number[];
    readonly missing: number;
  }[];
}

export interface Quality {
  readonly bands: number;
  /** with constants in common (--share) these, χ², its probability and the AIC are those of the one fit of all series */
  readonly degreesOfFreedom: number;
  /** null when no uncertainty was stated */
  readonly chiSquare: number | null;
  readonly reducedChiSquare: number | null;
  /** probability of a larger chi-square; null as above or without degrees of freedom */
  readonly probability: number | null;
  /** root mean square residual, cm-1 */
  readonly rms: number;
  /** sqrt(RSS/degreesOfFreedom), cm-1; null with constants in common */
  readonly standardDeviation: number | null;
  readonly excess: {
    readonly kind: "scatter" | "birge" | "none";
    readonly value: number | null;
    readonly applied: boolean;
  };
  readonly aic: number | null;
  readonly aicc: number | null;
  readonly leaveOneOutRms: number | null;
  /** degrees of freedom of Student's t behind the intervals; null: normal distribution */
  readonly intervalDegreesOfFreedom: number | null;
}

export interface Derived {
  readonly zeroPointEnergy: Quantity;
  readonly forceConstant: Quantity | null;
  readonly morseA: Quantity | null;
  readonly y00: Quantity | null;
  readonly highestLevel: { readonly value: number; readonly range: readonly [number, number] | null } | null;
  readonly positionPlotIntercept: Quantity;
  readonly positionPlotSlope: Quantity;
  readonly spacingPlotIntercept: Quantity;
  readonly spacingPlotSlope: Quantity;
}

/** D0 as an enthalpy of dissociation at 298.15 K, of a bond that is a whole molecule; kJ/mol. */
export interface Thermochemistry {
  /** K */
  readonly temperature: number;
  /** H°(298.15 K) - H°(0) of the atoms and of the molecule */
  readonly atoms: readonly { readonly element: string; readonly enthalpy: number }[];
  readonly molecule: number;
  /** ΔH°(298.15 K) of A-B → A + B from each row of the dissociation table */
  readonly rows: readonly {
    readonly method: DissociationMethod;
    readonly enthalpy: Quantity | null;
    readonly empiricalRange: readonly [number, number] | null;
    /** fitted - accepted */
    readonly lessAccepted: Quantity | null;
  }[];
  /** given by the user, or from an accepted D0 */
  readonly accepted: Quantity | null;
}

/** A cause of error that several bands have in common. */
export interface CommonError {
  readonly kind: "calibration" | "group" | "per-quantum" | "laser" | "mixture";
  /** the name of a group */
  readonly group: string | null;
  /** in `unit`: cm-1, nm …, or ppm of the position; 1 where the effect itself is the uncertainty */
  readonly standardUncertainty: number;
  readonly unit: string;
  /** how many used bands it acts on */
  readonly bands: number;
  /** smallest and largest effect of one standard uncertainty on a band, cm-1, signed */
  readonly effect: readonly [number, number] | null;
  /** with --groups fitted: how far the bands of the group are off, observed - true, in `unit` */
  readonly shift: Quantity | null;
}

/** Everything `fit` says about one series: the object that stands in the JSON document, and the only thing renderers see. */
export interface SeriesResult {
  readonly name: string;
  readonly model: string;
  readonly terms: number | null;
  readonly bond: string | null;
  /** u */
  readonly reducedMass: number | null;
  readonly constants: Readonly<Record<string, Quantity>>;
  /** constants held at a value by --fix, by key */
  readonly held: readonly string[];
  readonly correlation: { readonly order: readonly string[]; readonly matrix: readonly (readonly number[])[] } | null;
  /** covariance of the free constants in the order of `correlation`, for `predict` from a stored result */
  readonly covariance: readonly (readonly number[])[] | null;
  readonly quality: Quality;
  readonly bands: readonly BandResult[];
  readonly dissociation: readonly DissociationRow[];
  /** an accepted D0 given by the user, cm-1; null without one */
  readonly accepted: Quantity | null;
  /** null unless asked for */
  readonly thermochemistry: Thermochemistry | null;
  /** null for models without a well around the minimum */
  readonly derived: Derived | null;
  readonly predictions: readonly Prediction[];
  readonly stability: readonly StabilityRow[];
  /** with --terms auto: the numbers of terms compared; otherwise null */
  readonly comparison: readonly ComparisonRow[] | null;
  readonly commonErrors: readonly CommonError[];
  /** null unless modes were given */
  readonly resonances: Resonances | null;
  /** of models whose states mix; null for others */
  readonly levels: readonly LevelResult[] | null;
  readonly consequences: readonly ConsequenceResult[];
  /** of polyads; null for other models */
  readonly deperturbation: Deperturbation | null;
  /** null: intervals to first order */
  readonly intervals: IntervalRecord | null;
  readonly fitReport: {
    readonly method: string;
    readonly converged: boolean;
    readonly reason: string;
    readonly iterations: number;
  };
  readonly warnings: readonly Warning[];
}
