import type { Shared } from "../bands/index.ts";
import { timesInverse } from "../fitting/index.ts";
import { type Fault, InputError, type Warning } from "../messages/index.ts";
import { quantityFrom } from "./propagation.ts";
import type { CommonError } from "./result.ts";
import type { Solution } from "./solution.ts";

/** A shift that the bands know no better than before leaves this much of its variance. */
const NOTHING_LEARNT = 1 - 1e-6;

/**
 * The causes of error that bands share, with the shift of each as the bands see it where that was asked for. A shift with a prior uncertainty
 * that is carried in the covariance and one that is a constant of the fit with that prior are the same estimate: with V the whole covariance,
 * c the effect of one standard uncertainty and r the residuals, b = cᵀV⁻¹r, and its variance is 1 - cᵀV⁻¹c + cᵀV⁻¹X·C·XᵀV⁻¹c (Aitken 1936).
 * @throws InputError exit 3, naming the pair, when a shift that was asked for cannot be told from the constants
 */
export function commonErrors(solution: Solution): { readonly errors: CommonError[]; readonly warnings: Warning[] } {
  const { series, options, sigmaKnown, used } = solution;
  if (series.shared.length === 0) return { errors: [], warnings: [] };
  if (!sigmaKnown)
    return {
      errors: [],
      warnings: [
        {
          code: "shared-needs-sigma",
          message:
            "errors common to several bands were given, but not every band carries a σ: the common ones are left out of the uncertainties; give --sigma",
        },
      ],
    };
  const shifts = options.groups === "fitted" ? shiftsOf(solution) : null;
  const at = used.map((band) => series.bands.indexOf(band));
  const errors = series.shared.map(({ kind, group, sigma, parts }, k): CommonError => {
    const effects = at.map((i) => parts[i]!).filter((x) => x !== 0);
    return {
      kind,
      group,
      standardUncertainty: sigma.value,
      unit: sigma.unit,
      bands: effects.length,
      effect: effects.length === 0 ? null : [Math.min(...effects), Math.max(...effects)],
      shift: kind === "group" && shifts !== null ? shifts[k]! : null,
    };
  });
  return { errors, warnings: aboutShifts(errors) };
}

function shiftsOf(solution: Solution) {
  const { series, errors, fit, by } = solution;
  const { jacobian, whitening } = fit;
  const covariance = by.covariance!;
  const faults: Fault[] = [];
  const shifts = series.shared.map(({ kind, group, sigma }, k) => {
    if (kind !== "group") return null;
    const c = errors.shared[k]!;
    const weighted = timesInverse(whitening, c);
    const value = weighted.reduce((sum, w, i) => sum + w * fit.residuals[i]!, 0);
    /** XᵀV⁻¹c */
    const onto = fit.values.map((_, p) => weighted.reduce((sum, w, i) => sum + w * jacobian[i]![p]!, 0));
    const carried = covariance.map((row) => row.reduce((sum, x, j) => sum + x * onto[j]!, 0));
    const variance =
      1 - weighted.reduce((sum, w, i) => sum + w * c[i]!, 0) + onto.reduce((sum, x, p) => sum + x * carried[p]!, 0);
    if (variance >= NOTHING_LEARNT) faults.push(inseparable(solution, group!, sigma, carried));
    return quantityFrom(value * sigma.value, Math.sqrt(Math.max(0, variance)) * sigma.value, sigma.unit, by);
  });
  if (faults.length > 0) throw new InputError(faults, 3);
  return shifts;
}

/** The constant that takes up most of the shift stands beside it. */
function inseparable(solution: Solution, group: string, sigma: Shared["sigma"], carried: readonly number[]): Fault {
  const { fit, series, model, by } = solution;
  const share = carried.map((x, p) => Math.abs(x) / Math.sqrt(by.covariance![p]![p]! || Number.POSITIVE_INFINITY));
  const key = fit.keys[share.indexOf(Math.max(...share))]!;
  const symbol = model.constants.find((constant) => constant.key === key)?.symbol.equilibrium ?? key;
  return {
    code: "group-not-separable",
    place: { source: series.bands[0]?.place.source ?? series.name },
    what: `series "${series.name}": the ${sigma.unit === "ppm" ? "scale" : "offset"} of group "${group}" cannot be told from ${symbol}: the bands know it no better than its prior ${sigma.value} ${sigma.unit}`,
    mend: "write --groups carried, hold that constant with --fix, or add bands of the same levels from another group",
  };
}

function aboutShifts(errors: readonly CommonError[]): Warning[] {
  return errors.flatMap(({ group, shift, standardUncertainty: prior, unit }) =>
    shift === null || Math.abs(shift.value) < 3 * prior
      ? []
      : [
          {
            code: "group-shift-large",
            message: `the bands put group "${group}" off by ${Number(shift.value.toPrecision(3))} ${unit}, more than three times its prior ${prior} ${unit}: its calibration or that prior is wrong; calibrate it anew, or state a larger uncertainty`,
            about: group!,
          },
        ],
  );
}
