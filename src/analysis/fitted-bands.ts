import { informationCriteria } from "../fitting/index.ts";
import type { BandResult, Quality } from "./result.ts";
import type { Solution } from "./solution.ts";

/** How good the fit is, in numbers. */
export function qualityOf(solution: Solution): Quality {
  const { stated, fit, sigmaKnown, used, excess, probability, treated } = solution;
  const { sharing } = solution.options;
  const dof = stated.degreesOfFreedom;
  const squares = fit.residuals.reduce((sum, r) => sum + r * r, 0);
  const constants = stated.keys.length - Object.values(solution.options.fixed).filter((f) => f.sigma === null).length;
  const errors = treated().leftOut.filter((e) => e !== null);
  return {
    bands: used.length,
    degreesOfFreedom: dof,
    chiSquare: sigmaKnown ? stated.chiSquare : null,
    reducedChiSquare: sigmaKnown && dof > 0 ? stated.chiSquare / dof : null,
    probability,
    rms: Math.sqrt(squares / used.length),
    // The degrees of freedom of a joint fit are not those of these residuals.
    standardDeviation: dof > 0 && sharing === null ? Math.sqrt(squares / dof) : null,
    excess,
    ...informationCriteria(sigmaKnown, stated.chiSquare, sharing?.bands ?? used.length, sharing?.fitted ?? constants),
    intervalDegreesOfFreedom: solution.by.degreesOfFreedom,
    leaveOneOutRms:
      errors.length < used.length ? null : Math.sqrt(errors.reduce((sum, e) => sum + e * e, 0) / errors.length),
  };
}

/** Every band of the series beside its calculated position. */
export function bandResults({ series, model, options, used, fit, tests, treated, weights }: Solution): BandResult[] {
  const { calculated } = model.prepare(series.bands, options).evaluate(fit.values);
  const { studentized } = tests();
  const { leverage, leftOut } = treated();
  return series.bands.map((band, i) => {
    const at = used.indexOf(band);
    const of = <T>(list: readonly T[]): T | null => (at < 0 ? null : (list[at] ?? null));
    return {
      label: band.label,
      observed: band.position,
      calculated: calculated[i]!,
      residual: band.position - calculated[i]!,
      standardUncertainty: band.sigma,
      studentizedResidual: of(studentized),
      leverage: of(leverage),
      leftOutResidual: of(leftOut),
      used: band.use,
      weight: weights === null ? null : of(weights),
      asRead: band.asRead,
      twoLevels: band.twoLevels,
      note: band.note,
      phase: band.phase,
      place: band.place,
    };
  });
}
