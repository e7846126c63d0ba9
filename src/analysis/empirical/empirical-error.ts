import type { Bond } from "../../species/index.ts";
import { bondClass, bondElements } from "./bond-elements.ts";
import { LEAST_WELLS, matchWells } from "./match-wells.ts";
import type { ReferenceWell, WellClass } from "./reference-well.ts";
import { spread } from "./spread.ts";
import { referenceWells } from "./wells.data.ts";

export interface Extrapolation {
  /** constants fitted, 2 … 6 */
  readonly terms: number;
  /** highest observed level above v = 0, cm-1 */
  readonly topEnergy: number;
  /** Morse D0 of the fit, cm-1 */
  readonly fittedD0: number;
  /** decides the class, and which wells are left out: those of the same two elements */
  readonly bond: Pick<Bond, "atoms"> | null;
}

/** What the reference wells say of one D0; 80 % ranges. */
interface EmpiricalSpread {
  /** how many wells */
  readonly references: number;
  /** fitted/accepted */
  readonly errorRange: readonly [number, number];
  /** D0 in cm-1; always above the highest observed level */
  readonly correctedRange: readonly [number, number];
}

export interface EmpiricalError extends EmpiricalSpread {
  /** the wells behind the numbers; "all" when the class is unknown or too few of it reach the covered fraction */
  readonly class: WellClass | "all";
  /** highest observed level over corrected D0 */
  readonly covered: number;
  /** the same from the wells of both classes */
  readonly overall: EmpiricalSpread;
}

/** No answer, and why. */
export interface NoReference {
  readonly reason: string;
}

/**
 * How wrong a Morse D0 is by experience: reference wells fitted with the same number of terms at the same covered fraction
 * miss their accepted D0 by a ratio r = (fitted − top)/(accepted − top) of the extrapolated part; the spread of r gives the
 * range top + (fitted − top)/r. The covered fraction of a well whose D0 is unknown is self-consistent: top over the middle
 * of the corrected range (docs/empirical-error.md). The spread covers wells as they come (80 %), not the fit's own uncertainty.
 */
export function empiricalError(
  { terms, topEnergy, fittedD0, bond }: Extrapolation,
  wells: readonly ReferenceWell[] = referenceWells,
): EmpiricalError | NoReference {
  const beyond = fittedD0 - topEnergy;
  if (!(topEnergy > 0)) return { reason: "no observed level above v = 0" };
  if (!(beyond > 0))
    return { reason: "the fitted D0 does not lie above the highest observed level: nothing to correct" };
  const elements = bondElements(bond);
  const kind = elements === null ? null : bondClass(elements);
  const others = wells.filter(({ atoms }) => atoms[0] !== elements?.[0] || atoms[1] !== elements[1]);
  const { covered, all, alike } = matchWells(others, kind, terms, topEnergy, beyond);
  if (all.length < LEAST_WELLS)
    return {
      reason: `no reference at this coverage: ${all.length} of ${others.length} wells reach ${percent(covered)} of their D0 with ${terms} terms, ${LEAST_WELLS} are needed`,
    };
  return {
    class: alike === null ? "all" : kind!,
    covered,
    ...spreadOf(alike ?? all, topEnergy, fittedD0),
    overall: spreadOf(all, topEnergy, fittedD0),
  };
}

function spreadOf(ratios: readonly number[], topEnergy: number, fittedD0: number): EmpiricalSpread {
  const [low, high] = spread(ratios);
  const beyond = fittedD0 - topEnergy;
  const correctedRange = [topEnergy + beyond / high, topEnergy + beyond / low] as const;
  return {
    references: ratios.length,
    errorRange: [fittedD0 / correctedRange[1], fittedD0 / correctedRange[0]],
    correctedRange,
  };
}

const percent = (fraction: number) => `${Math.round(100 * fraction)} %`;
