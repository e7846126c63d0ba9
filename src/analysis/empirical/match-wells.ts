import { ratioAt } from "./ratio-at.ts";
import type { ReferenceWell, WellClass } from "./reference-well.ts";
import { spread } from "./spread.ts";

/** Fewer wells than this at a covered fraction: no reference there. */
export const LEAST_WELLS = 3;
/** Fewer wells of the user's class than this: all wells stand in. */
export const LEAST_OF_CLASS = 6;

export interface Match {
  readonly covered: number;
  /** ratios of the extrapolated part, of every well that reaches the fraction */
  readonly all: readonly number[];
  /** those of the user's class; null where there are too few */
  readonly alike: readonly number[] | null;
}

/** The covered fraction is settled when a full step would move it by less; it is told in percent. */
const SETTLED = 5e-4;
/** A guard that is not reached: steps are halved, and a well or a class that drops out stays out, so nothing swings. */
const ROUNDS = 60;

/**
 * The ratios of the wells at the covered fraction that their own spread leads to: top over the middle of the corrected range,
 * found upwards or downwards from top over fitted D0. `top`, `beyond` (fitted D0 less top) in cm-1. Where fewer than
 * `LEAST_WELLS` reach, `alike` is null and `all` holds what there is.
 */
export function matchWells(
  wells: readonly ReferenceWell[],
  kind: WellClass | null,
  terms: number,
  top: number,
  beyond: number,
): Match {
  let covered = top / (top + beyond);
  let ofClass = kind !== null;
  // One state a well: 0 not reached in the last round, 1 reached, 2 dropped out for good. This runs in every fit.
  const state = new Uint8Array(wells.length);
  for (let round = 1; ; round++) {
    const all: number[] = [];
    const alike: number[] = [];
    for (let i = 0; i < wells.length; i++) {
      if (state[i] === 2) continue;
      const well = wells[i]!;
      const fits = well.fits[terms];
      const ratio = fits === undefined ? null : ratioAt(fits, covered);
      if (ratio === null) {
        if (state[i] === 1) state[i] = 2;
        continue;
      }
      state[i] = 1;
      all.push(ratio);
      if (well.class === kind) alike.push(ratio);
    }
    if (all.length < LEAST_WELLS) return { covered, all, alike: null };
    ofClass &&= alike.length >= LEAST_OF_CLASS;
    const [low, high] = spread(ofClass ? alike : all);
    const next = top / (top + (beyond / low + beyond / high) / 2);
    if (Math.abs(next - covered) < SETTLED || round === ROUNDS) return { covered, all, alike: ofClass ? alike : null };
    covered = (covered + next) / 2;
  }
}
