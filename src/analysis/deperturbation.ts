import { fitLocalMode, type Manifold } from "../models/index.ts";
import { differences } from "./differences.ts";
import type { Deperturbation } from "./mixed-result.ts";
import { type Propagation, propagate } from "./propagation.ts";

/**
 * Overtones without the mixing, and what reading the level that holds most of each for it would give: the bias that deperturbation takes away.
 * `observed`: labels of the levels a reader has, so that no reading goes beyond them; null: all.
 */
export function deperturbationOf(
  manifold: Manifold,
  p: readonly number[],
  by: Propagation,
  upTo: number,
  observed: readonly string[] | null,
): Deperturbation | null {
  const overtones = manifold.deperturbed?.(p, upTo);
  if (overtones === undefined) return null;
  const own = (key: "omega" | "omegaX") => (q: readonly number[]) => manifold.oscillators(q)[0]![key];
  const quantity = (of: (q: readonly number[]) => number) => propagate(of(p), differences(of, p), "cm-1", by);
  const read: (readonly [number, number])[] = [];
  const rows = overtones.map(({ v, position, gradient, strongest }) => {
    const seen = observed === null || observed.includes(strongest.label);
    if (seen) read.push([v, strongest.energy]);
    return {
      v,
      deperturbed: propagate(position, gradient, "cm-1", by),
      strongest: { ...strongest, observed: observed !== null && seen },
      naive: seen ? fitLocalMode(read) : null,
    };
  });
  return {
    overtones: rows,
    constants: { w: quantity(own("omega")), wx: quantity(own("omegaX")) },
    naive: fitLocalMode(read),
  };
}
