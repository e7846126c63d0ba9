import type { Warning } from "../messages/index.ts";

/** A basis state and its part in a level; weights of one level add to 1. */
export interface Part {
  readonly state: string;
  readonly weight: number;
}

/** A level of a model whose states mix, cm-1 above the ground state; a degenerate level stands once. */
export interface MixedLevel {
  readonly label: string;
  /** what stays good while states mix: total quanta V and species, or polyad number N, l and j; keys as in the JSON document */
  readonly numbers: Readonly<Record<string, number | string>>;
  readonly degeneracy: number;
  readonly energy: number;
  /** where it would lie without the coupling */
  readonly uncoupled: number;
  /** dE/dp by the constants, in their order (Hellmann–Feynman) */
  readonly gradient: readonly number[];
  /** the share that `Manifold.share` names */
  readonly share: number;
  /** largest part first */
  readonly composition: readonly Part[];
}

/** A number that follows from the constants, such as a splitting or a constant in other conventions. */
export interface Consequence {
  readonly key: string;
  readonly symbol: string;
  readonly unit: string;
  /** null where it does not exist */
  of(p: readonly number[]): number | null;
  readonly note: string | null;
}

/** An anharmonic oscillator inside the model, ν(0→v) = v·ω̃ - v(v+1)·ω̃x; `name` where there are several. */
export interface InnerOscillator {
  readonly name: string | null;
  readonly omega: number;
  readonly omegaX: number;
}

/** What a model with blocks of mixed states can tell beyond its constants. */
export interface Manifold {
  /** the key in `MixedLevel.numbers` of the number that blocks keep */
  readonly block: "V" | "N";
  /** what `share` is: its key in JSON and its head in tables */
  readonly share: { readonly key: "weight" | "stretchShare"; readonly title: string };
  /** all levels with block numbers up to this, by block and then from below */
  levels(p: readonly number[], upTo: number): MixedLevel[];
  consequences(upTo: number): Consequence[];
  /** the bonds, for their Morse energies */
  oscillators(p: readonly number[]): readonly InnerOscillator[];
  /** what the labels of the data leave open, such as a sign */
  warnings(labels: readonly string[], p: readonly number[]): Warning[];
  /** constants for another mass of the light atom, ρ = √(μ/μ'); null where the model cannot tell */
  scaled?(p: readonly number[], rho: number): number[];
  /** overtones as they would be without the mixing, by v, beside the level a reader would take for them */
  deperturbed?(p: readonly number[], upTo: number): readonly Deperturbed[];
}

/** An overtone without its neighbours, and the level that holds most of it. */
export interface Deperturbed {
  readonly v: number;
  /** cm-1 */
  readonly position: number;
  /** of the position, by the constants in their order */
  readonly gradient: readonly number[];
  readonly strongest: { readonly label: string; readonly energy: number; readonly share: number };
}
