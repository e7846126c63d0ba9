import type { Warning } from "../messages/index.ts";
import type { Bond } from "../species/index.ts";
import type { Band } from "./series.ts";

/** Some bands with σ, some without. */
export function aboutSigma(used: readonly Band[]): Warning[] {
  const without = used.filter((band) => band.sigma === null);
  if (without.length === 0 || without.length === used.length) return [];
  return [
    {
      code: "sigma-partly-missing",
      message: `${labels(without)} carr${without.length === 1 ? "ies" : "y"} no σ while others do: σ is treated as unknown for all, and every band counts the same; give --sigma for those without`,
    },
  ];
}

/** Uncertainties that --sigma-means leaves alone: `(2)` is a standard one by convention (JCGM 100:2008, 7.2.2), ± is not. */
export function aboutMeaning(used: readonly Band[], meaning: number): Warning[] {
  const inParentheses = used.filter((band) => band.asRead.text.includes("("));
  if (meaning === 1 || inParentheses.length === 0) return [];
  return [
    {
      code: "sigma-means-not-applied",
      message: `${labels(inParentheses)}: uncertainties in parentheses are standard ones by convention and stay as they are, whatever --sigma-means says; write them after ± or in the column sigma if it holds for them`,
    },
  ];
}

/** A bond asked for that differs from the one in the column isotopologue. */
export function aboutBond(used: Bond | null, asked: Bond | null): Warning[] {
  if (used === null || asked === null || used.reducedMass === asked.reducedMass) return [];
  return [
    {
      code: "bond-differs",
      message: `the column isotopologue says ${used.text}, the bond asked for is ${asked.text}: the column is used; mend one of them`,
    },
  ];
}

/** Air wavelengths beyond the range of the dispersion formula. */
export function aboutAir(beyond: readonly Band[]): Warning[] {
  if (beyond.length === 0) return [];
  return [
    {
      code: "air-range-extended",
      message: `${labels(beyond)}: beyond 1690 nm Ciddor's dispersion formula is extrapolated (error about 1e-4 cm-1); give vacuum values where that matters`,
    },
  ];
}

/** Bands corrected for a companion: what that rests on. */
export function aboutCompanions(used: readonly Band[]): Warning[] {
  return used.flatMap(({ label, twoLevels: pair }) =>
    pair === null
      ? []
      : [
          {
            code: "companion-corrected",
            message: `${label} is moved by ${pair.shift.toFixed(2)} cm-1 to ${pair.corrected.toFixed(2)}, where it would stand without its companion (coupling ${pair.coupling.toFixed(2)} cm-1): that holds for two levels only of which the dark one carries no intensity of its own, else the ratio misleads; ${pair.ratioSigma === null ? "the ratio counts as exact, write 6.7(3) with its uncertainty; " : ""}${pair.ratio < 1 ? "the companion is the stronger of the two, so the label may belong to it; " : ""}compare with the fit without ${label}`,
            about: label,
          },
        ],
  );
}

/** The labels of some bands, the first eight by name. */
function labels(bands: readonly Band[]): string {
  const shown = bands.slice(0, 8).map(({ label }) => label);
  return bands.length > shown.length ? `${shown.join(", ")} and ${bands.length - shown.length} more` : shown.join(", ");
}
