import type { Series } from "../../bands/index.ts";
import { fitLinear, type LinearFit, UndeterminedError } from "../../fitting/index.ts";
import { type Fault, InputError, type Place } from "../../messages/index.ts";
import type { Model } from "../../models/index.ts";
import { chiSquareUpperTail } from "../../quantity/index.ts";
import type { AnalysisOptions, SharedConstant, Sharing } from "../options.ts";
import { treat } from "../solution.ts";
import { jointProblem, layoutOf, outsideOf, type Part, partOf } from "./joint.ts";

/** More series than this are refused: the work grows with the fourth power of their number. */
const MOST_SERIES = 100;

/**
 * Options of each series when constants are shared: one fit of all bands, in which each shared constant is one number (or, with a spread, scattered about a
 * common mean) and an error common to all series is one error. Series are then fitted with what the others say of them, which gives the same
 * constants, χ², degrees of freedom and covariance.
 * @throws InputError exit 2 for one series, a constant the model lacks, bands without σ, options that cannot go with it; exit 3 where all bands together do
 * not determine the constants
 */
export function shareConstants(
  series: readonly Series[],
  model: Model,
  options: AnalysisOptions,
  asked: readonly SharedConstant[],
  place: Place,
): ReadonlyMap<Series, AnalysisOptions> {
  const faults = faultsOf(series, model, options, asked, place);
  if (faults.length > 0) throw new InputError(faults);
  const all = model.constants.map((constant) => constant.key);
  const highest = Math.max(...asked.map(({ key }) => all.indexOf(key) + 1));
  const terms = Math.max(options.terms ?? model.terms?.default ?? 0, highest);
  const own: AnalysisOptions = { ...options, terms: model.terms === null ? options.terms : terms, autoTerms: false };
  const parts = series.map((one, i) => partOf(one, i, model, own));
  demandLinear(parts, model, place);

  const keys = parts[0]!.prepared.parameters.map(({ key }) => key);
  const layout = layoutOf(keys, series.length, asked);
  const problem = jointProblem(parts, layout);
  const stated = determined(() => fitLinear(problem), problem.parameters, layout.size, series, place);
  const dof = stated.degreesOfFreedom;
  const probability = dof > 0 ? chiSquareUpperTail(stated.chiSquare, dof) : null;
  const { fit, treatment, kind, value, applied } = treat(problem, stated, probability, own);
  const joint: Omit<Sharing, "place" | "outside"> = {
    constants: asked,
    names: series.map(({ name }) => name),
    treatment,
    excess: { kind, value, applied },
    degreesOfFreedom: applied && options.scatter === null ? dof : null,
    bands: problem.observed.length,
    fitted: problem.parameters.filter(({ held }) => held === undefined).length,
    covariance: (a, b) =>
      keys.map((_, k) => keys.map((__, l) => fit.covariance![layout.column(a, k)]![layout.column(b, l)]!)),
  };
  return new Map(
    series.map((one, i) => {
      const sharing: Sharing = {
        ...joint,
        place: i,
        outside: (bands, by) => outsideOf(parts, layout, i, bands, by),
      };
      return [one, { ...own, sharing }] as const;
    }),
  );
}

function faultsOf(
  series: readonly Series[],
  model: Model,
  options: AnalysisOptions,
  asked: readonly SharedConstant[],
  place: Place,
): Fault[] {
  const faults: Fault[] = [];
  const fault = (code: string, what: string, mend: string) => faults.push({ code, place, what, mend });
  if (series.length < 2)
    fault(
      "share-one-series",
      "there is one series only, and nothing to share with",
      "name several in the column series",
    );
  if (series.length > MOST_SERIES)
    fault(
      "share-too-many",
      `${series.length} series are more than can share a constant (${MOST_SERIES})`,
      "split the file",
    );
  const keys = model.constants.map((constant) => constant.key);
  for (const { key } of asked) {
    if (!keys.includes(key))
      fault("unknown-constant", `there is no constant "${key}"`, `write one of ${keys.join(", ")}`);
    else if (options.fixed[key] !== undefined)
      fault("share-and-fix", `${key} is fixed as well`, "leave one of --share and --fix out");
  }
  const clashes: readonly (readonly [boolean, string, string])[] = [
    [options.autoTerms, "--terms auto", "say how many constants there are, such as --terms 2"],
    [options.robust !== null, "--robust", "leave out one of the two; --excess treats residuals larger than σ"],
    [options.groups === "fitted", "--groups fitted", "write --groups carried"],
  ];
  for (const [there, what, mend] of clashes)
    if (there) fault("share-not-with", `constants cannot be shared under ${what}`, mend);
  const without = series.find(({ bands }) => bands.some(({ use, sigma }) => use && sigma === null));
  if (without !== undefined)
    fault(
      "share-without-sigma",
      `series "${without.name}" carries no σ, so its weight against the others is not known`,
      "give --sigma",
    );
  return faults;
}

function demandLinear(parts: readonly Part[], model: Model, place: Place): void {
  const subtracted = parts.some(({ errors }) => errors.mixing !== null);
  if (!subtracted && parts.every(({ prepared }) => prepared.linear)) return;
  throw new InputError([
    {
      code: "share-not-possible",
      place,
      what: `constants of the model ${model.name}${subtracted ? " from subtracted spacings" : ""} cannot be shared`,
      mend: "leave --share out, or fit band positions with --model oscillator",
    },
  ]);
}

function determined(
  fit: () => LinearFit,
  parameters: readonly { readonly symbol: string }[],
  size: number,
  series: readonly Series[],
  place: Place,
): LinearFit {
  try {
    return fit();
  } catch (error) {
    if (!(error instanceof UndeterminedError)) throw error;
    const at = series[Math.floor(error.parameter / size)];
    throw new InputError(
      [
        {
          code: "share-undetermined",
          place,
          what: `the bands of all series together do not determine ${parameters[error.parameter]!.symbol}${at === undefined ? "" : ` of "${at.name}"`}`,
          mend: "add a band to the shortest series, or share another constant as well",
        },
      ],
      3,
    );
  }
}
