import type { Quantity } from "../quantity/index.ts";

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

/** ω̃ and ω̃x of levels read as overtones, cm-1. */
interface NaiveReading {
  readonly w: number;
  readonly wx: number;
}

/** Pure overtones of a polyad beside the level that a reader would take for each, and the local-mode constants either gives. */
export interface Deperturbation {
  readonly overtones: readonly {
    readonly v: number;
    readonly deperturbed: Quantity;
    readonly strongest: {
      readonly label: string;
      readonly energy: number;
      readonly share: number;
      readonly observed: boolean;
    };
    /** from the strongest levels up to this one read as overtones; null for fewer than two, and where this one was not observed */
    readonly naive: NaiveReading | null;
  }[];
  /** ω̃ and ω̃x, cm-1 */
  readonly constants: { readonly w: Quantity; readonly wx: Quantity };
  /** from all strongest levels that were observed; null for fewer than two */
  readonly naive: NaiveReading | null;
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
  /** of the band in the fit that gave the overtones; null where it was not used */
  readonly residual: number | null;
  /** the band stands out, and in the direction this level would push it */
  readonly matched: boolean;
  /** where the band was given a companion: the dark level by itself, as the correction has it, less `position` */
  readonly companionGap: number | null;
  /** of two levels, the matrix element that explains the residual; null where it is not matched */
  readonly coupling: number | null;
}

/** What could perturb the overtones, with --modes. */
export interface Resonances {
  readonly window: number;
  /** the band that stands out in the fit, if one does */
  readonly standsOut: string | null;
  /** overtones, gaps and residuals are those of the fit without this band; null: of all bands */
  readonly without: string | null;
  /** matched ones first, then by closeness and order */
  readonly candidates: readonly Resonance[];
  /**
   * the band that would test the first: an overtone not measured yet where the same trade comes closer, or the dark level beside its band, with the intensity of the band over its own
   * where its coupling is known
   */
  readonly test: {
    readonly label: string;
    readonly position: number;
    readonly gap: number;
    readonly ratio: number | null;
    readonly kind: "overtone" | "companion";
  } | null;
}
