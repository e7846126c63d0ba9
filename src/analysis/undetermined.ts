import type { Band, Series } from "../bands/index.ts";
import { type Problem, UndeterminedError } from "../fitting/index.ts";
import { InputError } from "../messages/index.ts";
import { type Model, symmetricEigen } from "../models/index.ts";
import type { AnalysisOptions } from "./options.ts";

/** Run a fit; constants that the bands leave undetermined become an InputError of exit 3 that names them. */
export function determined<T>(
  series: Series,
  model: Model,
  used: readonly Band[],
  problem: Problem,
  options: AnalysisOptions,
  fit: () => T,
): T {
  try {
    return fit();
  } catch (error) {
    if (!(error instanceof UndeterminedError)) throw error;
    const free = problem.parameters.filter((p) => p.held === undefined);
    const distinct = new Set(used.map((band) => band.label)).size;
    const place = { source: series.bands[0]?.place.source ?? series.name };
    const few = `${distinct} different used band${distinct === 1 ? "" : "s"} cannot determine ${free.length} constants (${free.map((p) => p.symbol).join(", ")})`;
    const more = `give at least ${free.length} different bands, ${model.terms === null ? "or" : "ask for fewer --terms, or"} hold a constant with --fix`;
    const at = model.starts?.(used, problem.observed, options) ?? null;
    const unseen = unseenConstants(problem, model, at);
    const mend = [
      ...(distinct < free.length ? [more] : []),
      ...unseen,
      ...(distinct < free.length || unseen.length > 0 ? [] : [openConstants(problem, error.parameter, at)]),
    ].join("; ");
    throw new InputError([{ code: "not-determined", place, what: `series "${series.name}": ${few}`, mend }], 3);
  }
}

/** What to do about each free constant that no datum depends on. */
function unseenConstants({ parameters, evaluate }: Problem, model: Model, at: readonly number[] | null): string[] {
  if (at === null) return [];
  const { jacobian } = evaluate(at);
  return parameters.flatMap(({ key, symbol, typical, held, prior, even }, k) => {
    if (held !== undefined || prior !== undefined || even === true) return [];
    // Nothing, beyond rounding of energies, over the whole size of the constant.
    if (jacobian.some((row) => Math.abs(row[k]!) * typical > 1e-9)) return [];
    const seenIn = model.constants.find((constant) => constant.key === key)?.seenIn ?? "a band that does";
    return [`no band depends on ${symbol}: add ${seenIn}, or hold it with --fix "${key}=…"`];
  });
}

/** What to do where each constant is seen, but not apart from the others. */
function openConstants(problem: Problem, parameter: number, at: readonly number[] | null): string {
  const { key, symbol, even } = problem.parameters[parameter]!;
  if (even === true)
    return `they are met best with ${symbol} = 0, where they say nothing of its size; add a band that shows the mixing, or hold it with --fix "${key}=0"`;
  return `they leave ${openDirection(problem, at) ?? symbol} open; add a band from another level or hold a constant of these with --fix`;
}

/** A direction among the constants that no datum depends on, such as `ω̃ : ω̃x = 2 : 1`; null where it is one constant alone. */
function openDirection(problem: Problem, at: readonly number[] | null): string | null {
  const { parameters } = problem;
  const { jacobian } = problem.evaluate(at ?? parameters.map(() => 0));
  const free = parameters.flatMap(({ held }, k) => (held === undefined ? [k] : []));
  const scaled = jacobian.map((row) => free.map((k) => row[k]! * parameters[k]!.typical));
  if (!scaled.flat().every(Number.isFinite)) return null;
  const gram = free.map((_, i) => free.map((__, j) => scaled.reduce((sum, row) => sum + row[i]! * row[j]!, 0)));
  const direction = symmetricEigen(gram).vectors[0]!.map((x, i) => x * parameters[free[i]!]!.typical);
  const largest = Math.max(...direction.map((x, i) => Math.abs(x) / parameters[free[i]!]!.typical));
  const parts = direction.flatMap((x, i) => {
    const { symbol, typical } = parameters[free[i]!]!;
    return Math.abs(x) / typical > 1e-3 * largest ? [{ symbol, x }] : [];
  });
  if (parts.length < 2) return parts[0]?.symbol ?? null;
  const unit = Math.min(...parts.map(({ x }) => Math.abs(x))) * Math.sign(parts[0]!.x);
  return `the direction ${parts.map(({ symbol }) => symbol).join(" : ")} = ${parts.map(({ x }) => Number((x / unit).toPrecision(3))).join(" : ")}`;
}
