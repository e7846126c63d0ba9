import type { FitDocument, SeriesResult } from "../../analysis/index.ts";
import type { Citations } from "./citations.ts";

/** Sentences on how the constants and their uncertainties were found; only what was really used. */
export function howItWasFitted(
  series: readonly SeriesResult[],
  request: FitDocument["request"],
  cite: Citations["cite"],
): string[] {
  return [
    ...solving(series, request, cite),
    ...choosing(series),
    ...treating(series, request, cite),
    ...intervals(series, cite),
    ...testing(series, cite),
  ];
}

const some = (series: readonly SeriesResult[], test: (one: SeriesResult) => boolean) => series.some(test);

function solving(series: readonly SeriesResult[], request: FitDocument["request"], cite: Citations["cite"]): string[] {
  const weighted = some(series, ({ quality }) => quality.chiSquare !== null);
  const curved = some(series, ({ fitReport }) => fitReport.method.includes("Levenberg"));
  // Citations are numbered as they are made, so this is written where it stands in the sentence.
  const how = () =>
    curved
      ? `by damped steps ${cite("levenberg1944", "marquardt1963", "transtrum2012")} and Householder QR ${cite("golub1965")}`
      : `by Householder QR on scaled columns ${cite("golub1965")}`;
  const text = [
    weighted
      ? `The positions themselves are fitted by generalised least squares with the inverse covariance of the stated uncertainties as weights ${cite("aitken1936")}, ${how()}.`
      : `The positions themselves are fitted by least squares with equal weights, ${how()}; uncertainties come from the residual variance.`,
  ];
  if (request.laser !== undefined)
    text.push(
      `Bands are Raman shifts: the wavenumber of the exciting line (${request.laser} nm) less that of the scattered light.`,
    );
  if (some(series, ({ commonErrors }) => commonErrors.length > 0))
    text.push("Errors that bands have in common enter the covariance as fully correlated.");
  if (some(series, ({ commonErrors }) => commonErrors.some(({ shift }) => shift !== null)))
    text.push(
      "The shifts of the groups are the estimates that this covariance implies: constants of the fit with their prior.",
    );
  if (some(series, ({ bands }) => bands.some(({ twoLevels }) => twoLevels !== null)))
    text.push(
      `Bands with a companion are corrected for two levels of which one is dark ${cite("herzberg1945")}: with Δ between band and companion and R the ratio of their intensities, the coupling is W = Δ√R/(R + 1) and the band by itself lies Δ/(R + 1) nearer to the companion; the uncertainties of both positions and of the ratio are propagated.`,
    );
  if (some(series, ({ resonances }) => resonances !== null))
    text.push(
      "Combinations near the overtones are harmonic sums: term values of the stretch as fitted plus whole multiples of the wavenumbers of the other modes.",
    );
  if (request.spacings === "subtracted")
    text.push(
      "Spacings were subtracted from measured positions, so neighbours share errors: the covariance is tridiagonal.",
    );
  if (request.robust === "huber") text.push(`Huber weights, iterated ${cite("huber1981")}.`);
  if (request.robust === "tukey")
    text.push(`Tukey's biweight, iterated from Huber's solution ${cite("beatontukey1974")}.`);
  return text;
}

function choosing(series: readonly SeriesResult[]): string[] {
  const kinds = new Set(series.flatMap(({ comparison }) => comparison?.flatMap(({ step }) => step?.kind ?? []) ?? []));
  if (kinds.size === 0) return [];
  const tests = [
    ...(kinds.has("χ²-difference") ? ["χ²-difference at 1 %"] : []),
    ...(kinds.has("F") ? ["F test at 5 %"] : []),
  ];
  return [
    `The number of terms is the one beyond which a further constant is not called for (${tests.join(", ")}), nor explains the misfit better than leaving one band out.`,
  ];
}

function treating(series: readonly SeriesResult[], request: FitDocument["request"], cite: Citations["cite"]): string[] {
  const used = (kind: string) => some(series, ({ quality }) => quality.excess.applied && quality.excess.kind === kind);
  const text: string[] = [];
  if (used("scatter"))
    text.push(
      request.scatter === undefined
        ? `Where χ² is improbable at 5 %, a scatter τ common to all bands is added in quadrature so that χ² equals the degrees of freedom ${cite("mandel1970")}.`
        : "A scatter τ common to all bands is added in quadrature, as given.",
    );
  if (used("birge"))
    text.push(
      `Where χ² is improbable at 5 %, the stated uncertainties are multiplied by the Birge factor √(χ²/ν) ${cite("birge1932")}.`,
    );
  return text;
}

function intervals(series: readonly SeriesResult[], cite: Citations["cite"]): string[] {
  const text: string[] = [];
  if (some(series, ({ covariance }) => covariance !== null))
    text.push(`Uncertainties are propagated to first order with the full covariance ${cite("jcgm100")}.`);
  if (some(series, (one) => one.intervals?.kind === "profile"))
    text.push(
      `Intervals of constants, De, D0 and predictions are those of the profile of χ² ${cite("bateswatts1988")}.`,
    );
  const drawn = series.find((one) => one.intervals?.kind === "resample")?.intervals;
  if (drawn != null)
    text.push(
      `Intervals of constants, De, D0 and predictions come from ${drawn.resamples} draws of the constants (seed ${drawn.seed}) ${cite("jcgm101")}.`,
    );
  return text;
}

function testing(series: readonly SeriesResult[], cite: Citations["cite"]): string[] {
  const tested = (known: boolean) =>
    some(
      series,
      ({ quality, bands }) =>
        (quality.chiSquare !== null) === known && bands.some(({ studentizedResidual }) => studentizedResidual !== null),
    );
  return [
    ...(tested(true)
      ? [`Residuals are studentised by the stated uncertainties under their full covariance ${cite("cook1982")}.`]
      : []),
    ...(tested(false) ? [`Residuals are externally studentised ${cite("cook1982")}.`] : []),
  ];
}
