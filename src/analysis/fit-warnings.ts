import type { Warning } from "../messages/index.ts";
import { mediumMends } from "./medium.ts";
import { oneMoreTerm } from "./more-terms.ts";
import { IMPROBABLE, type Solution } from "./solution.ts";
import { betterThanTerm, standsOut } from "./stands-out.ts";

/** Everything the user should know about a fit: each with cause, consequence and remedy. `termsChosen`: not by the user but by the bands. */
export function fitWarnings(solution: Solution, termsChosen: boolean): Warning[] {
  return [
    ...aboutSigma(solution),
    ...aboutChiSquare(solution),
    ...aboutTermsAndBands(solution, termsChosen),
    ...aboutRobust(solution),
    ...aboutMedium(solution),
    ...aboutSharing(solution),
  ];
}

/** A few digits, without a power of ten. */
const short = (x: number, digits = 3) => String(Number(x.toPrecision(digits)));

const percent = (p: number) => (p < 1e-4 ? "below 0.01 %" : `${Number((p * 100).toPrecision(2))} %`);

function aboutSigma({ sigmaKnown, fit, by, options }: Solution): Warning[] {
  const warnings: Warning[] = [];
  if (!sigmaKnown && options.scatter !== null)
    warnings.push({
      code: "scatter-without-sigma",
      message: "the bands carry no σ, so --scatter has nothing to be added to and was left aside; give --sigma",
    });
  if (fit.degreesOfFreedom === 0)
    warnings.push({
      code: "exactly-determined",
      message: sigmaKnown
        ? "as many constants as bands: the fit goes through every band and nothing tests the model; add a band"
        : "as many constants as bands and no σ: the fit goes through every band and no uncertainty can be had; add a band or give --sigma",
    });
  else if (!sigmaKnown && fit.exact)
    warnings.push({
      code: "residuals-are-rounding",
      message:
        "the model goes through every band to rounding, so the residuals say nothing of the uncertainty and none is given; if the bands were calculated from constants that is why, otherwise give --sigma",
    });
  else if (!sigmaKnown)
    warnings.push({
      code: "sigma-from-residuals",
      message: `no σ was stated: uncertainties come from the residuals (${by.degreesOfFreedom} degree${by.degreesOfFreedom === 1 ? "" : "s"} of freedom, Student t), and χ² cannot test the model; give --sigma`,
    });
  return warnings;
}

function aboutChiSquare({ probability, stated, excess }: Solution): Warning[] {
  if (probability === null) return [];
  const ratio = `χ² = ${short(stated.chiSquare, 4)} on ${stated.degreesOfFreedom} degree${stated.degreesOfFreedom === 1 ? "" : "s"} of freedom (probability ${percent(probability)})`;
  if (probability > 1 - IMPROBABLE)
    return [
      {
        code: "residuals-too-small",
        message: `${ratio}: the residuals are smaller than the stated σ allow; if the σ were expanded (2σ, 95 %), say so with --sigma-means`,
      },
    ];
  if (probability >= IMPROBABLE) return [];
  const did = {
    scatter: `a scatter τ = ${short(excess.value ?? 0)} cm-1 common to all bands was added (--excess birge or none for another treatment)`,
    birge: `the stated σ were multiplied by the Birge factor ${short(excess.value ?? 0)}`,
    none: "nothing was added, as asked: the uncertainties below are too small",
  }[excess.kind];
  return [
    {
      code: "residuals-exceed-sigma",
      message: `${ratio}: the residuals exceed the stated σ, so the model or a band is off by more than the measurement; ${did}`,
    },
  ];
}

/** Smooth curvature calls for a further term, a single bad band does not: one of the two is named. */
function aboutTermsAndBands(solution: Solution, termsChosen: boolean): Warning[] {
  const band = standsOut(solution);
  const more = oneMoreTerm(solution);
  const terms = solution.stated.values.length;
  if (more?.calledFor === true && !termsChosen && !betterThanTerm(band, solution, more.solution))
    return [
      {
        code: "more-terms",
        message: `the bands call for a further constant: ${terms + 1} terms improve the fit by more than chance would (${more.step.kind} test, probability ${percent(more.step.probability)}); constants and predictions of ${terms} terms are biased; try --terms ${terms + 1} or auto`,
      },
    ];
  if (band === null) return [];
  const measure = solution.sigmaKnown ? "χ²" : "the residual sum of squares";
  const [before, after] = [solution.stated.chiSquare, band.remaining].map((x) => short(x));
  return [
    {
      code: "band-stands-out",
      message: `${band.label} stands out (studentised residual ${band.studentized.toFixed(1)}); without it ${measure} falls from ${before} to ${after}, better than with a further constant: a candidate for a resonance, a misread position or a wrong label; check it, or set use: no for it and compare`,
      about: band.label,
    },
  ];
}

function aboutRobust({ options, weights, used }: Solution): Warning[] {
  if (options.robust === null || weights === null) return [];
  const low = used.filter((_, i) => weights[i]! < 0.5).map((band) => band.label);
  const which =
    low.length === 0 ? "no band lost half its weight" : `${low.join(", ")} lost more than half of the weight`;
  return [
    {
      code: "robust-fit",
      message: `the fit is robust (${options.robust}): ${which}; its uncertainties take the weights as given, so state the method and the bands when you quote it`,
    },
  ];
}

function aboutMedium(solution: Solution): Warning[] {
  const other = mediumMends(solution);
  if (other === null) return [];
  return [
    {
      code: "medium-suspected",
      message: `χ² would fall from ${short(solution.stated.chiSquare)} to ${short(other.chiSquare)} if the wavelengths were in ${other.medium}: check what the instrument reports, and say --medium ${other.medium} if so`,
    },
  ];
}

/** Not a fault: a reader does not see the bands of the other series among those of this one. */
function aboutSharing({ options: { sharing }, stated }: Solution): Warning[] {
  if (sharing === null) return [];
  return sharing.constants.map(({ key, spread }) => ({
    code: "constant-shared",
    message: `${key} is ${spread > 0 ? `alike within ${spread} cm-1` : "the same"} in ${sharing.names.join(", ")}, by one fit of all ${sharing.bands} bands (its χ² on ${stated.degreesOfFreedom} degree${stated.degreesOfFreedom === 1 ? "" : "s"} of freedom stands here): that holds if the bonds are alike; compare with a fit without --share where the bands allow one`,
    about: key,
  }));
}
