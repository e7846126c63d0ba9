import type { AsRead, TwoLevels } from "../bands/index.ts";
import type { Place, Warning } from "../messages/index.ts";
import type { Quantity } from "../quantity/index.ts";
import type { EmpiricalError } from "./empirical/empirical-error.ts";

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
  readonly degreesOfFreedom: number;
  /** null when no uncertainty was stated */
  readonly chiSquare: number | null;
  readonly reducedChiSquare: number | null;
  /** probability of a larger chi-square; null as above or without degrees of freedom */
  readonly probability: number | null;
  /** root mean square residual, cm-1 */
  readonly rms: number;
  /** sqrt(RSS/degreesOfFreedom), cm-1 */
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

/** A level of a model whose states mix; cm-1 above the ground state. A degenerate level stands once. */
export interface LevelResult {
  readonly label: string;
  /** total quanta and species of coupled bonds */
  readonly V?: number;
  readonly species?: string;
  /** polyad number, angular momentum of the bend, and place from the highest level down */
  readonly N?: number;
  readonly l?: number;
  readonly j?: number;
  readonly degeneracy: number;
  readonly energy: number;
  readonly standardUncertainty: number | null;
  /** where it would lie without the coupling */
  readonly uncoupled: number;
  /** of the local state that names the level */
  readonly weight?: number;
  /** of the pure stretch, which carries the intensity */
  readonly stretchShare?: number;
  readonly composition: readonly { readonly state: string; readonly weight: number }[];
}

/** A number that follows from constants of such a model. */
export interface ConsequenceResult {
  readonly key: string;
  readonly symbol: string;
  readonly quantity: Quantity | null;
  readonly note: string | null;
}

/** Pure overtones of a polyad beside the level that a reader would take for each, and the local-mode constants either gives. */
export interface Deperturbation {
  readonly overtones: readonly {
    readonly v: number;
    readonly deperturbed: Quantity;
    readonly strongest: { readonly label: string; readonly energy: number; readonly share: number };
  }[];
  /** ω̃ and ω̃x, cm-1 */
  readonly constants: { readonly w: Quantity; readonly wx: Quantity };
  /** the same from the strongest levels read as overtones; null for fewer than two */
  readonly naive: { readonly w: number; readonly wx: number } | null;
}

/** A combination near an overtone; cm-1. */
export interface Resonance {
  readonly band: string;
  /** as text, such as "2 stretch + bend" */
  readonly state: string;
  readonly stretch: number;
  /** quanta of the other modes, by name */
  readonly modes: Readonly<Record<string, number>>;
  /** harmonic sum above the ground state */
  readonly position: number;
  /** position less that of the overtone as fitted */
  readonly gap: number;
  /** from the stated uncertainties of the modes; null where one has none */
  readonly gapUncertainty: number | null;
  /** stretch quanta traded and quanta gained */
  readonly order: number;
  /** of the overtone in the fit; null where it was not used */
  readonly residual: number | null;
  /** the band stands out, and in the direction this level would push it */
  readonly matched: boolean;
}

/** What could perturb the overtones, with --modes. */
export interface Resonances {
  readonly window: number;
  /** the band that stands out in the fit, if one does */
  readonly standsOut: string | null;
  /** matched ones first, then by closeness and order */
  readonly candidates: readonly Resonance[];
  /** the band that would test the first: an overtone where the same trade comes closer, or the dark level beside its band */
  readonly test: {
    readonly label: string;
    readonly position: number;
    readonly gap: number;
    readonly kind: "overtone" | "companion";
  } | null;
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

/** One constant, or D0, of two series: second less first, cm-1. */
export interface Difference {
  readonly key: string;
  readonly difference: Quantity;
  /** two-sided, of so large a difference by chance; null where no uncertainty can be had, or it is shared */
  readonly probability: number | null;
}

/** Two series side by side, or constants given from elsewhere and a series. */
export interface Comparison {
  readonly first: string;
  readonly second: string;
  readonly differences: readonly Difference[];
  /** errors taken as the same in both */
  readonly commonErrors: readonly string[];
}

/** The document of `fit`. */
export interface FitDocument {
  readonly schemaVersion: 1;
  readonly tool: { readonly name: string; readonly version: string };
  /** the settings as the user gave them, flags over file, long names without dashes */
  readonly request: Readonly<Record<string, string>>;
  /** the file read, or null for flags; sha256 of its bytes */
  readonly input: { readonly source: string; readonly sha256: string } | null;
  /** pairs of up to twelve series, and each against --compare; empty otherwise */
  readonly comparisons: readonly Comparison[];
  readonly series: readonly SeriesResult[];
  readonly warnings: readonly Warning[];
}
