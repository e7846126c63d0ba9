import type { SeriesResult } from "../../analysis/index.ts";
import { fixed, probability, size, statistic } from "../text/cells.ts";

/** One number of the quality of a fit, in a fixed order. */
interface QualityEntry {
  readonly name: string;
  readonly value: string;
}

/** Bands, constants, degrees of freedom, χ², reduced χ², probability, rms; then why any of them is `—`. */
export function qualityEntries({ quality, correlation, constants, held }: SeriesResult): {
  readonly entries: readonly QualityEntry[];
  readonly notes: readonly string[];
} {
  const free = correlation?.order.length ?? Object.keys(constants).length - held.length;
  const notes: string[] = [];
  if (quality.chiSquare === null) notes.push("χ² is —: not every band carries a σ, so nothing measures the residuals.");
  else if (quality.degreesOfFreedom === 0)
    notes.push("Reduced χ² and probability are —: no degrees of freedom are left.");
  if (quality.excess.applied && quality.excess.value !== null)
    notes.push(
      quality.excess.kind === "birge"
        ? `Uncertainties multiplied by the Birge factor ${fixed(quality.excess.value, 2)}; χ² is that before it.`
        : `Added scatter τ = ${size(quality.excess.value)} cm⁻¹, common to all bands; χ² is that before it.`,
    );
  return {
    entries: [
      { name: "bands", value: String(quality.bands) },
      { name: "constants", value: String(free) },
      { name: "degrees of freedom", value: String(quality.degreesOfFreedom) },
      { name: "χ²", value: statistic(quality.chiSquare) },
      { name: "reduced χ²", value: statistic(quality.reducedChiSquare) },
      { name: "probability", value: probability(quality.probability) },
      { name: "rms", value: `${rms(quality.rms)} cm⁻¹` },
    ],
    notes,
  };
}

/** Below a millionth of a wavenumber residuals are rounding. */
const rms = (value: number) => (value < 1e-6 ? "< 10⁻⁶" : size(value));
