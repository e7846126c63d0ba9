import type { Well } from "../../models/index.ts";
import type { Bond } from "../../species/index.ts";
import type { DissociationRow } from "../result.ts";
import { type Solution, trySolve } from "../solution.ts";
import { CAUTIONS } from "./cautions.ts";
import { morseRow } from "./morse.ts";
import { spacingSumRow } from "./spacing-sum.ts";
import { turningPointRow } from "./turning-point-row.ts";

/** Every answer the bands give to where the limit lies; the headline is the first. `top`: highest observed level. */
export function dissociationRows(solution: Solution, well: Well, top: number, y00: number): DissociationRow[] {
  const { fit, by, model, series, options } = solution;
  const rows = [morseRow("morse", well, fit.values, by, y00, headlineNote(series.bond))];
  const least = model.terms?.least ?? fit.values.length;
  if (fit.values.length > least) {
    const two = trySolve(series, model, { ...options, terms: least, fixed: {}, sharing: null });
    if (two !== null) {
      const { values } = two.fit;
      rows.push(morseRow("morse-refit", model.well!(values), values, two.by, y00, CAUTIONS.refit));
    }
    rows.push(turningPointRow(well, top, by, y00));
  }
  rows.push(spacingSumRow(solution, well, top, y00));
  return rows;
}

/** The caution of the headline; an X–H bond may be one of a polyatomic molecule, which the tool cannot know. */
function headlineNote(bond: Bond | null): string {
  const hydride = bond?.atoms?.some((atom) => /^(1H|H|D|T|2H|3H)$/.test(atom)) === true;
  return hydride ? `${CAUTIONS.extrapolation}; ${CAUTIONS.frozenFrame}` : CAUTIONS.extrapolation;
}
