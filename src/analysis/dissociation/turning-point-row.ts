import type { Well } from "../../models/index.ts";
import { addScaled, type Propagation, propagate } from "../propagation.ts";
import type { DissociationRow } from "../result.ts";
import { turningPoint } from "../turning-point.ts";
import { CAUTIONS } from "./cautions.ts";
import { row } from "./row.ts";

/** G at the first turning point past the highest observed level. The slope vanishes there, so v* itself adds no uncertainty. */
export function turningPointRow(well: Well, top: number, by: Propagation, y00: number): DissociationRow {
  const beyond = turningPoint(well, top);
  const at = beyond ?? turningPoint(well, 0);
  if (at === null)
    return row(
      "turning-point",
      null,
      null,
      "dG/dv does not vanish: this polynomial does not dissociate, so there is no number",
    );
  const below = well.term(at) <= well.term(top) || beyond === null;
  return row(
    "turning-point",
    propagate(well.term(at) + y00, well.termGradient(at), "cm-1", by),
    propagate(well.term(at) - well.term(0), addScaled(well.termGradient(at), well.termGradient(0), -1), "cm-1", by),
    below
      ? "unphysical: the polynomial turns over below the highest observed level; do not use"
      : CAUTIONS.turningPoint,
  );
}
