import type { Well } from "../../models/index.ts";
import { addScaled, type Propagation, propagate } from "../propagation.ts";
import type { DissociationMethod, DissociationRow } from "../result.ts";
import { row } from "./row.ts";

/** De = ωe²/(4ωexe) and its gradient; null for ωexe ≤ 0, where the series does not converge (Morse 1929). */
export function morseDe(well: Well, p: readonly number[]): { value: number; gradient: number[] } | null {
  const [a, b] = well.leading;
  const we = p[a]!;
  const wexe = p[b]!;
  if (!(wexe > 0 && we > 0)) return null;
  const gradient = new Array<number>(p.length).fill(0);
  gradient[a] = we / (2 * wexe);
  gradient[b] = -(we ** 2) / (4 * wexe ** 2);
  return { value: we ** 2 / (4 * wexe), gradient };
}

/** The row of the Morse relation for given constants. `y00` raises De and the zero point alike and leaves D0 alone. */
export function morseRow(
  method: DissociationMethod,
  well: Well,
  p: readonly number[],
  by: Propagation,
  y00: number,
  note: string,
): DissociationRow {
  const de = morseDe(well, p);
  if (de === null)
    return row(method, null, null, "ωexe is not positive: the spacings do not shrink, and no limit follows from them");
  const d0 = de.value - well.term(0);
  return row(
    method,
    propagate(de.value + y00, de.gradient, "cm-1", by),
    propagate(d0, addScaled(de.gradient, well.termGradient(0), -1), "cm-1", by),
    note,
  );
}
