import type { Warning } from "../../messages/index.ts";
import type { Solution } from "../solution.ts";
import { bondElements } from "./bond-elements.ts";
import type { EmpiricalError, NoReference } from "./empirical-error.ts";
import { LEVEL } from "./spread.ts";

/** How far the headline D0 is off by experience, or that no reference well can tell. `top`: highest observed level. */
export function empiricalWarning(answer: EmpiricalError | NoReference, solution: Solution, top: number): Warning {
  if ("reason" in answer)
    return {
      code: "no-reference",
      message: `the error of extrapolating to D0 is not known by experience (${answer.reason}): the uncertainty of D0 is that of the fit alone; do not quote D0 without saying so`,
      about: "d0",
    };
  const { covered, errorRange, correctedRange, references } = answer;
  const whose = answer.class === "all" ? "" : answer.class === "hydride" ? "hydride " : "other than hydride ";
  const parts = [
    `D0 is extrapolated from ${Math.round(100 * covered)} % of the well: at this coverage ${references} reference wells ${whose === "" ? "" : `(${whose.trim()}) `}put fitted/accepted at ${errorRange.map((x) => x.toFixed(2)).join(" to ")} (${100 * LEVEL} %)`,
    `the corrected range is ${correctedRange.map((x) => Math.round(x)).join(" to ")} cm-1, empirical and not part of the stated uncertainty`,
  ];
  if (bondElements(solution.series.bond) === null)
    parts.push("without --bond no well is left out and the class is not known: give --bond");
  if (missing(solution, top)) parts.push("bands are missing below the highest one, which the reference fits have");
  parts.push("quote the range, observe higher levels, or take a limit from elsewhere");
  return { code: "extrapolation-error", message: parts.join("; "), about: "d0" };
}

function missing({ used, model }: Solution, top: number): boolean {
  return new Set(used.map((band) => model.levels(band.label).upper)).size < top;
}
