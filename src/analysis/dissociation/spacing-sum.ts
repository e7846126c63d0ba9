import { estimator } from "../../fitting/index.ts";
import type { Well } from "../../models/index.ts";
import { dataVariance } from "../data-variance.ts";
import { quantityFrom } from "../propagation.ts";
import type { DissociationRow } from "../result.ts";
import type { Solution } from "../solution.ts";
import { CAUTIONS } from "./cautions.ts";
import { type LinkedLevels, linkedLevels } from "./linked-levels.ts";
import { row } from "./row.ts";

/**
 * The energy of the top observed level plus the linear remainder of the spacings through the last three (Birge & Sponer 1926 over
 * the top of the data only). Between observed levels that are not neighbours the mean spacing stands at their middle.
 */
export function spacingSumRow(solution: Solution, well: Well, top: number, y00: number): DissociationRow {
  const none = (why: string) => row("spacing-sum", null, null, why);
  const levels = linkedLevels(solution);
  if (levels === null || levels.v.at(-1) !== top)
    return none("v = 0 is not linked to the highest observed level by the bands");
  if (levels.v.length < 3) return none("fewer than three observed spacings above v = 0");
  const remainder = linearRemainder(levels);
  if (remainder === null) return none("the last three spacings do not shrink: no remainder follows from them");

  const last = levels.v.length - 1;
  const byLevel = remainder.gradient;
  byLevel[last]! += 1;
  const byBand = solution.used.map((_, i) =>
    byLevel.reduce((sum, g, level) => sum + g * levels.weights[level]![i]!, 0),
  );
  const d0 = levels.energies[last]! + remainder.value;
  const zeroPoint = well.termGradient(0);
  const rows = estimator(solution.fit);
  const zeroByBand = solution.used.map((_, i) => zeroPoint.reduce((sum, g, k) => sum + g * rows[k]![i]!, 0));
  const ofD0 = dataVariance(solution, byBand);
  const ofDe = dataVariance(
    solution,
    byBand.map((g, i) => g + zeroByBand[i]!),
  );
  const u = (variance: number | null) => (variance === null ? null : Math.sqrt(variance));
  return row(
    "spacing-sum",
    quantityFrom(d0 + well.term(0) + y00, u(ofDe), "cm-1", solution.by),
    quantityFrom(d0, u(ofD0), "cm-1", solution.by),
    CAUTIONS.spacingSum,
  );
}

/** ∫ of the line through the last three mean spacings from the top level to where it vanishes, with its gradient by level energy. */
function linearRemainder({ v, energies }: LinkedLevels): { value: number; gradient: number[] } | null {
  const levels = [0, ...v].slice(-4);
  const e = [0, ...energies].slice(-4);
  const offset = v.length - 4;
  const x = [0, 1, 2].map((j) => (levels[j]! + levels[j + 1]!) / 2);
  const width = [0, 1, 2].map((j) => levels[j + 1]! - levels[j]!);
  const y = [0, 1, 2].map((j) => (e[j + 1]! - e[j]!) / width[j]!);
  const mean = (x[0]! + x[1]! + x[2]!) / 3;
  const spread = x.reduce((sum, xi) => sum + (xi - mean) ** 2, 0);
  const slopeOf = x.map((xi) => (xi - mean) / spread);
  const endOf = slopeOf.map((s) => 1 / 3 + s * (levels[3]! - mean));
  const slope = slopeOf.reduce((sum, s, j) => sum + s * y[j]!, 0);
  const end = endOf.reduce((sum, s, j) => sum + s * y[j]!, 0);
  if (!(slope < 0)) return null;
  const gradient = new Array<number>(v.length).fill(0);
  if (end <= 0) return { value: 0, gradient };
  for (let j = 0; j < 3; j++) {
    const byMean = (-end / slope) * endOf[j]! + (end ** 2 / (2 * slope ** 2)) * slopeOf[j]!;
    for (const [level, factor] of [
      [offset + j + 1, 1],
      [offset + j, -1],
    ] as const)
      if (level >= 0) gradient[level]! += (factor * byMean) / width[j]!;
  }
  return { value: end ** 2 / (-2 * slope), gradient };
}
