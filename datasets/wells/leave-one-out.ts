import { type EmpiricalError, empiricalError, type NoReference } from "../../src/analysis/empirical/empirical-error.ts";
import { fitsOf, type WellFit } from "./fit-well.ts";
import type { WellFile } from "./read-well.ts";

/** One well taken as if its D0 were unknown, all wells of its two elements left out. */
export interface Trial {
  readonly well: WellFile;
  readonly fit: WellFit;
  readonly answer: EmpiricalError | NoReference;
  /** null without a range */
  readonly outcome: {
    /** the range holds the accepted D0 */
    readonly holds: boolean;
    /** the middle of the range is nearer the accepted D0 than the fitted one */
    readonly nearer: boolean;
    /** half the range over its middle */
    readonly halfWidth: number;
  } | null;
}

/** Every well that has a fit of that many terms to that many bands. */
export function leaveOneOut(wells: readonly WellFile[], terms: number, bands: number): Trial[] {
  return wells.flatMap((well) => {
    const fit = fitsOf(well, terms).find((one) => one.bands === bands);
    if (fit === undefined) return [];
    const answer = empiricalError({ terms, topEnergy: fit.top, fittedD0: fit.d0, bond: { atoms: well.atoms } });
    return [{ well, fit, answer, outcome: "reason" in answer ? null : outcomeOf(answer, fit.d0, well.d0) }];
  });
}

function outcomeOf({ correctedRange: [low, high] }: EmpiricalError, fitted: number, accepted: number) {
  const middle = (low + high) / 2;
  return {
    holds: low <= accepted && accepted <= high,
    nearer: Math.abs(middle - accepted) < Math.abs(fitted - accepted),
    halfWidth: (high - low) / 2 / middle,
  };
}

/** Counts over the trials that have a range. */
export function tally(trials: readonly Trial[]) {
  const told = trials.flatMap(({ outcome }) => (outcome === null ? [] : [outcome]));
  return {
    wells: trials.length,
    ranges: told.length,
    holds: told.filter(({ holds }) => holds).length,
    nearer: told.filter(({ nearer }) => nearer).length,
    widest: Math.max(...told.map(({ halfWidth }) => halfWidth)),
  };
}
