import { morseDe } from "../../src/analysis/dissociation/morse.ts";
import { fitLinear } from "../../src/fitting/index.ts";
import { oscillator } from "../../src/models/oscillator.ts";
import type { WellFile } from "./read-well.ts";

/** A well fitted to its `bands` lowest bands 1-0, 2-0, …, all with equal weight; energies in cm-1. */
export interface WellFit {
  readonly bands: number;
  readonly d0: number;
  readonly top: number;
  /** top over accepted D0 */
  readonly covered: number;
  /** (fitted − top)/(accepted − top) */
  readonly ratio: number;
}

/** Fits are left out whose extrapolated part is not known to this fraction, for the accepted D0 or for the levels. */
const KNOWN = { accepted: 0.1, levels: 0.05 } as const;

/** Every fit of a well with that many terms that has something to say, in rising number of bands. */
export function fitsOf(well: WellFile, terms: number): WellFit[] {
  const fits: WellFit[] = [];
  for (let bands = terms; bands < well.levels.length; bands++) {
    const fit = fitWell(well, terms, bands);
    if (fit !== null) fits.push(fit);
  }
  return fits;
}

function fitWell(well: WellFile, terms: number, bands: number): WellFit | null {
  const observed = well.levels.slice(1, bands + 1);
  const labels = observed.map((_, i) => ({ label: `${i + 1}-0`, isotopologue: null }));
  // equal weights whatever the value; 1 stands for "smooth" and is not used then
  const sigmas = observed.map(() => (well.sigma > 0 ? well.sigma : 1));
  const fit = fitLinear({
    ...oscillator.prepare(labels, { terms, fixed: {} }),
    observed,
    errors: { sigmas, mixing: null, shared: [] },
  });
  const form = oscillator.well!(fit.values);
  const de = morseDe(form, fit.values);
  if (de === null) return null;
  const d0 = de.value - form.term(0);
  const top = observed.at(-1)!;
  const remainder = well.d0 - top;
  const gradient = de.gradient.map((g, k) => g - form.termGradient(0)[k]!);
  const variance = gradient.reduce(
    (sum, g, i) => sum + gradient.reduce((part, h, j) => part + g * h * fit.covariance![i]![j]!, 0),
    0,
  );
  const noise = well.sigma > 0 ? Math.sqrt(variance) : 0;
  const known = well.d0Uncertainty <= KNOWN.accepted * remainder && noise <= KNOWN.levels * (d0 - top);
  return known && d0 > top ? { bands, d0, top, covered: top / well.d0, ratio: (d0 - top) / remainder } : null;
}
