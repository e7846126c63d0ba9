import type { Series } from "../bands/index.ts";
import type { Prepared } from "../fitting/index.ts";
import type { Fault } from "../messages/index.ts";
import type { Bond } from "../species/index.ts";

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
  /** how many constants a user may ask for; null where the number is given by the model */
  readonly terms: { readonly least: number; readonly most: number; readonly default: number } | null;
  readonly constants: readonly ConstantInfo[];
  check(series: Series): Fault[];
  prepare(transitions: readonly Transition[], options: ModelOptions): Prepared;
  /** labels of the transitions worth predicting up to a level, in order */
  labels(upTo: number): string[];
  /** upper and lower level of a label */
  levels(label: string): { readonly upper: number; readonly lower: number };
  well?(p: readonly number[]): Well;
}
