import type { Band } from "../bands/index.ts";
import type { Model, ModelOptions } from "../models/index.ts";
import { type AirConditions, airRange, fromWavenumber } from "../quantity/index.ts";
import { type Propagation, propagate } from "./propagation.ts";
import type { Prediction } from "./result.ts";

/**
 * Positions of the given transitions from fitted constants. The uncertainty is that of the true position (fit and shared part), not of a future
 * measurement. `lastBandOut` stands beside each: formal intervals beyond the data are too small.
 */
export function predict(
  model: Model,
  options: ModelOptions & { readonly air: AirConditions },
  labels: readonly string[],
  p: readonly number[],
  by: Propagation,
  lastBandOut: number | null,
  used: readonly Pick<Band, "label">[],
): Prediction[] {
  const seen = new Set(used.map((band) => band.label));
  const { calculated, jacobian } = model
    .prepare(
      labels.map((label) => ({ label, isotopologue: null })),
      options,
    )
    .evaluate(p);
  return labels.map((label, i) => {
    const position = calculated[i]!;
    const vacuumWavelength = fromWavenumber(position, "nm");
    return {
      label,
      position: propagate(position, jacobian[i]!, "cm-1", by),
      lastBandOut,
      vacuumWavelength,
      airWavelength:
        airRange(vacuumWavelength) === "refused" ? null : fromWavenumber(position, "nm", "air", options.air),
      observed: seen.has(label),
    };
  });
}
