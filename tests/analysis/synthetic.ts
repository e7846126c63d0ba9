import { type AnalysisOptions, analyse, type SeriesResult } from "../../src/analysis/index.ts";
import type { Band, Series } from "../../src/bands/index.ts";
import { loadNonlinearCore } from "../../src/fitting/index.ts";
import { findModel, type Model } from "../../src/models/index.ts";
import { standardAir } from "../../src/quantity/index.ts";

await loadNonlinearCore();

/** A Morse oscillator, with a cubic term when wanted; cm-1. */
export interface Truth {
  readonly we: number;
  readonly wexe: number;
  readonly weye: number;
}

export const defaults: AnalysisOptions = {
  terms: null,
  autoTerms: false,
  fixed: {},
  excess: "scatter",
  scatter: null,
  robust: null,
  groups: "carried",
  modes: [],
  window: 50,
  sharing: null,
  diatomic: false,
  acceptedEnthalpy: null,
  coverage: null,
  intervals: "linear",
  resamples: 2000,
  seed: 1,
  upTo: null,
  air: standardAir,
  accepted: null,
  be: null,
  alphaE: null,
  re: null,
};

export const oscillator = (await findModel("oscillator")) as Model;

/** Position of v-0. */
export const position = ({ we, wexe, weye }: Truth, v: number) =>
  we * v - wexe * v * (v + 1) + weye * ((v + 0.5) ** 3 - 0.125);

/** A series of bands v-0 with given errors; `stated`: the σ they claim, null for none. */
export function synthetic(
  truth: Truth,
  levels: readonly number[],
  errors: readonly number[],
  stated: number | null,
): Series {
  const bands = levels.map(
    (v, i): Band => ({
      label: `${v}-0`,
      position: position(truth, v) + errors[i]!,
      sigma: stated,
      isotopologue: null,
      use: true,
      phase: null,
      group: null,
      twoLevels: null,
      note: null,
      place: { source: "synthetic" },
      asRead: { text: "", unit: "cm-1", medium: "vacuum", sigmaText: null },
    }),
  );
  return {
    name: "synthetic",
    bond: null,
    bands,
    shared: [],
    subtracted: false,
    light: { medium: "vacuum", air: standardAir, exciting: null },
    warnings: [],
  };
}

/** Fit a synthetic series. */
export const analysed = (series: Series, options: Partial<AnalysisOptions> = {}): SeriesResult =>
  analyse(series, oscillator, { ...defaults, ...options });
