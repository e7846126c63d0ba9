import type { Warning } from "../../messages/index.ts";
import type { Well } from "../../models/index.ts";
import type { Bond } from "../../species/index.ts";
import { linkedLevels } from "../dissociation/linked-levels.ts";
import type { DissociationRow } from "../result.ts";
import type { Solution } from "../solution.ts";
import { type EmpiricalError, empiricalError, type NoReference } from "./empirical-error.ts";
import { empiricalWarning } from "./empirical-warning.ts";

/** The rows with what reference wells say of the Morse D0 among them, and the warning on the headline. `top`: highest observed level. */
export function withEmpirical(
  rows: readonly DissociationRow[],
  solution: Solution,
  well: Well,
  top: number,
): { readonly rows: readonly DissociationRow[]; readonly warnings: readonly Warning[] } {
  const { model, fit } = solution;
  if (model.terms === null || rows[0]?.method !== "morse" || rows[0].d0 === null) return { rows, warnings: [] };
  const terms = { morse: fit.values.length, "morse-refit": model.terms.least };
  const held = Object.keys(solution.options.fixed).length > 0;
  const topEnergy = topLevel(solution, well, top);
  const answers = rows.map((row) =>
    (row.method === "morse" || row.method === "morse-refit") && row.d0 !== null
      ? answerFor(row.method === "morse" && held, terms[row.method], topEnergy, row.d0.value, solution.series.bond)
      : null,
  );
  return {
    rows: rows.map((row, i) => {
      const answer = answers[i] ?? null;
      return answer === null ? row : { ...row, empirical: "reason" in answer ? null : answer };
    }),
    warnings: [empiricalWarning(answers[0]!, solution, top)],
  };
}

function answerFor(
  held: boolean,
  terms: number,
  topEnergy: number,
  fittedD0: number,
  bond: Bond | null,
): EmpiricalError | NoReference {
  if (held) return { reason: "--fix holds or informs constants, which the reference fits do not imitate" };
  return empiricalError({ terms, topEnergy, fittedD0, bond });
}

/** Energy of the highest observed level above v = 0: as observed where bands link the two, otherwise as fitted; cm-1. */
function topLevel(solution: Solution, well: Well, top: number): number {
  const direct = solution.used.filter((band) => {
    const { upper, lower } = solution.model.levels(band.label);
    return upper === top && lower === 0;
  });
  if (direct.length > 0) return Math.max(...direct.map(({ position }) => position));
  const linked = linkedLevels(solution);
  const observed = linked?.v.at(-1) === top ? linked.energies.at(-1) : undefined;
  return observed ?? well.term(top) - well.term(0);
}
