import type { Warning } from "../messages/index.ts";
import { studentUpperTail } from "../quantity/index.ts";
import { moreTermsCalledFor } from "./more-terms.ts";
import { IMPROBABLE, type Solution } from "./solution.ts";

/** Everything the user should know about a fit: each with cause, consequence and remedy. `termsChosen`: not by the user but by the bands. */
export function fitWarnings(solution: Solution, termsChosen: boolean): Warning[] {
  return [
    ...aboutSigma(solution),
    ...aboutChiSquare(solution),
    ...(termsChosen ? [] : aboutTerms(solution)),
    ...aboutBands(solution),
  ];
}

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
  else if (!sigmaKnown)
    warnings.push({
      code: "sigma-from-residuals",
      message: `no σ was stated: uncertainties come from the residuals (${by.degreesOfFreedom} degree${by.degreesOfFreedom === 1 ? "" : "s"} of freedom, Student t), and χ² cannot test the model; give --sigma`,
    });
  return warnings;
}

function aboutChiSquare({ probability, stated, excess }: Solution): Warning[] {
  if (probability === null) return [];
  const ratio = `χ² = ${stated.chiSquare.toPrecision(4)} on ${stated.degreesOfFreedom} degree${stated.degreesOfFreedom === 1 ? "" : "s"} of freedom (probability ${percent(probability)})`;
  if (probability > 1 - IMPROBABLE)
    return [
      {
        code: "residuals-too-small",
        message: `${ratio}: the residuals are smaller than the stated σ allow; if the σ were expanded (2σ, 95 %), say so with --sigma-means`,
      },
    ];
  if (probability >= IMPROBABLE) return [];
  const did = {
    scatter: `a scatter τ = ${(excess.value ?? 0).toPrecision(3)} cm-1 common to all bands was added (--excess birge or none for another treatment)`,
    birge: `the stated σ were multiplied by the Birge factor ${(excess.value ?? 0).toPrecision(3)}`,
    none: "nothing was added, as asked: the uncertainties below are too small",
  }[excess.kind];
  return [
    {
      code: "residuals-exceed-sigma",
      message: `${ratio}: the residuals exceed the stated σ, so the model or a band is off by more than the measurement; ${did}`,
    },
  ];
}

function aboutTerms(solution: Solution): Warning[] {
  const more = moreTermsCalledFor(solution);
  if (more === null) return [];
  return [
    {
      code: "more-terms",
      message: `the bands call for a further constant: ${more.terms} terms improve the fit by more than chance would (${more.test} test, probability ${percent(more.probability)}); the constants and predictions of ${more.terms - 1} terms are biased; try --terms ${more.terms}`,
    },
  ];
}

/** Bands that stand out from the rest, by the two-sided residual test at 1 % with Bonferroni's correction. */
function aboutBands({ used, tests, stated, sigmaKnown }: Solution): Warning[] {
  if (stated.degreesOfFreedom < 2) return [];
  const dof = sigmaKnown ? null : stated.degreesOfFreedom - 1;
  const worst = tests.studentized.reduce<number>(
    (best, t, i) => (Math.abs(t ?? 0) > Math.abs(tests.studentized[best] ?? 0) ? i : best),
    0,
  );
  const t = tests.studentized[worst] ?? null;
  if (t === null || 2 * studentUpperTail(Math.abs(t), dof) * used.length > 0.01) return [];
  const { label } = used[worst]!;
  return [
    {
      code: "band-stands-out",
      message: `${label} stands out (studentised residual ${t.toFixed(1)}): a wrong label, a misread position, a resonance, or a model with too few terms; check the band, or set use: no for it and compare`,
      about: label,
    },
  ];
}
