export type WellClass = "hydride" | "other";

/** One fit of a reference well to its lowest bands: the covered fraction E_top/D0 and (D0 fitted − E_top)/(D0 accepted − E_top). */
export type ReferenceFit = readonly [covered: number, ratio: number];

/** What fits of a well with known D0 get wrong, by the number of terms; each list rises in the covered fraction. */
export interface ReferenceWell {
  readonly name: string;
  /** element symbols */
  readonly atoms: readonly [string, string];
  readonly class: WellClass;
  readonly fits: Readonly<Record<number, readonly ReferenceFit[]>>;
}
