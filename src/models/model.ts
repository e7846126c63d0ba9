import type { Series } from "../bands/index.ts";
import type { Prepared } from "../fitting/index.ts";
import type { Fault } from "../messages/index.ts";
import type { Bond } from "../species/index.ts";
import type { Manifold } from "./manifold.ts";

export type Notation = "equilibrium" | "local";

/** A constant held (`sigma` null) or known from elsewhere with a standard uncertainty. */
export interface Fixed {
  readonly value: number;
  readonly sigma: number | null;
}

/** What a model may be told. */
export interface ModelOptions {
  /** number of constants of a single oscillator; null: the model's own default */
  readonly terms: number | null;
  readonly fixed: Readonly<Record<string, Fixed>>;
  /** n of the long-range potential -C_n/rⁿ, for models that ask for it */
  readonly power?: number | null;
  /** how many equivalent bonds, or two unlike ones */
  readonly bonds?: number | "unlike" | null;
  /** whether the bend of a stretch-bend polyad is degenerate; @default degenerate */
  readonly bend?: "degenerate" | "single";
  /** whether a cross anharmonicity between bonds is fitted too */
  readonly cross?: boolean;
  /** of the series, in u; put there by the analysis */
  readonly reducedMass?: number | null;
}

/** One transition to calculate. */
export interface Transition {
  readonly label: string;
  readonly isotopologue: Bond | null;
}

/** Term values of one oscillator as a function of a (continuous) quantum number, cm-1; gradients are with respect to the constants. */
export interface Well {
  term(v: number): number;
  slope(v: number): number;
  curvature(v: number): number;
  termGradient(v: number): number[];
  slopeGradient(v: number): number[];
  curvatureGradient(v: number): number[];
  /** places of ωe and ωexe among the constants */
  readonly leading: readonly [number, number];
}

/** A constant as text shows it. */
export interface ConstantInfo {
  readonly key: string;
  readonly unit: string;
  readonly symbol: Readonly<Record<Notation, string>>;
  /** only a positive value makes sense */
  readonly positive?: true;
  /** what alone depends on it, for messages: "levels with …" */
  readonly seenIn?: string;
}

/** Settings a model has of its own, by their long names. */
export interface OwnSettings {
  /** those it cannot do without */
  readonly required: readonly string[];
  /** all of them that are no constants; @default those required */
  readonly own?: readonly string[];
  /** those that give a constant: the same as `--fix` with that key */
  readonly constants: Readonly<Record<string, string>>;
}

/** What is asked of a law that holds only close under the dissociation limit, which is one of its constants. */
export interface Limit {
  /** fewer different levels than this are refused */
  readonly leastLevels: number;
  /** places of the energy of the limit, of the (not whole) quantum number there, and of the long-range constant */
  readonly energy: number;
  readonly level: number;
  readonly slope: number;
  /** what is a straight line against v where the law holds, for messages */
  line(options: ModelOptions): string;
  /** the same law with one more constant, the last, that is 0 where the law holds */
  bent(transitions: readonly Transition[], options: ModelOptions): Prepared;
}

/** A physical model: what it can do, asked for by capability and never by name. */
export interface Model {
  readonly name: string;
  /** for sentences: "fitted by …" */
  readonly title: string;
  /** the form of a label, for messages */
  readonly labelForm: string;
  /** keys into the list of references */
  readonly references: readonly string[];
  /** the definition of the constants in one sentence, for the methods paragraph, where the works alone leave sign and factor open */
  readonly definition?: string;
  /** how many constants a user may ask for; null where the number is given by the model */
  readonly terms: { readonly least: number; readonly most: number; readonly default: number } | null;
  readonly constants: readonly ConstantInfo[];
  readonly settings?: OwnSettings;
  check(series: Series, options: ModelOptions): Fault[];
  prepare(transitions: readonly Transition[], options: ModelOptions): Prepared;
  /** the block numbers that may be asked for, of models whose levels multiply with them */
  readonly highest?: { readonly step: number; readonly most: number };
  /** labels of the transitions worth predicting up to a level, in order */
  labels(upTo: number): string[];
  /** upper and lower level of a label */
  levels(label: string): { readonly upper: number; readonly lower: number };
  well?(p: readonly number[]): Well;
  /** first values of all constants, of a model that is not linear in them; null where the bands do not lead to any */
  starts?(transitions: readonly Transition[], observed: readonly number[], options: ModelOptions): number[] | null;
  readonly limit?: Limit;
  /** of models whose states mix in blocks: levels and what follows from them */
  manifold?(options: ModelOptions): Manifold;
}
