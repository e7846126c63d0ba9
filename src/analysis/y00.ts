import type { Well } from "../models/index.ts";
import { kappa } from "../quantity/index.ts";
import type { AnalysisOptions } from "./options.ts";

/**
 * Dunham's Y00 = (Be-ωexe)/4 + αeωe/(12Be) + (αeωe)²/(144Be³) in cm-1 (Dunham 1932) with its gradient by the constants; null unless αe and
 * Be (or re in Å and the reduced mass in u, Be = κ/(μre²)) are given. It raises De and the zero point alike and leaves D0 alone.
 */
export function y00Of(
  well: Well,
  p: readonly number[],
  { be, alphaE, re }: Pick<AnalysisOptions, "be" | "alphaE" | "re">,
  reducedMass: number | null,
): { value: number; gradient: number[] } | null {
  const fromLength = re !== null && reducedMass !== null ? kappa / (reducedMass * re ** 2) : null;
  const b = be ?? fromLength;
  if (b === null || alphaE === null) return null;
  const [at, ax] = well.leading;
  const we = p[at]!;
  const gradient = new Array<number>(p.length).fill(0);
  gradient[at] = alphaE / (12 * b) + (alphaE ** 2 * we) / (72 * b ** 3);
  gradient[ax] = -0.25;
  return { value: (b - p[ax]!) / 4 + (alphaE * we) / (12 * b) + (alphaE * we) ** 2 / (144 * b ** 3), gradient };
}
