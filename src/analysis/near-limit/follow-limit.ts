import type { Warning } from "../../messages/index.ts";
import type { Limit } from "../../models/index.ts";
import { row } from "../dissociation/row.ts";
import { predict } from "../predictions.ts";
import { quantityFrom } from "../propagation.ts";
import type { DissociationRow, Prediction } from "../result.ts";
import { type Solution, trySolve } from "../solution.ts";
import { labelsWithin, levelsOf } from "./levels.ts";
import { limitingRegion, passesFrom, type Verdict } from "./limiting-region.ts";

/** What follows from the fit of a law that holds only close under the limit. */
export interface LimitFollows {
  readonly dissociation: readonly DissociationRow[];
  readonly predictions: readonly Prediction[];
  /** the refusal, or that nothing was tested */
  readonly first: readonly Warning[];
  readonly warnings: readonly Warning[];
}

/** Judge whether the levels reach the limiting region; only then D0 and further levels follow. */
export function followLimit(solution: Solution, limit: Limit): LimitFollows {
  const verdict = limitingRegion(solution, limit);
  const { fit, by, options } = solution;
  const value = fit.values[limit.energy]!;
  const given = options.fixed[fit.keys[limit.energy]!]?.sigma === null;
  const first = [...refusal(solution, limit, verdict), ...untested(verdict)];
  const warnings = aboutMass(solution);
  if (verdict.failures.length > 0) {
    const tests = verdict.failures.map(({ test }) => test).join(", ");
    const note = `refused: the levels do not reach the region where the law holds (test of ${tests})`;
    return { dissociation: [row("near-limit", null, null, note)], predictions: [], first, warnings };
  }
  const u = given || by.covariance === null ? null : Math.sqrt(by.covariance[limit.energy]![limit.energy]!);
  const d0 = quantityFrom(value, u, "cm-1", by);
  const further = furtherLevels(solution, limit);
  return {
    dissociation: [row("near-limit", null, d0, noteOf(verdict, given))],
    predictions: further.predictions,
    first,
    warnings: [...warnings, ...further.warnings],
  };
}

function refusal(solution: Solution, limit: Limit, { failures }: Verdict): Warning[] {
  if (failures.length === 0) return [];
  const from = passesFrom(solution, limit);
  const levels = levelsOf(solution.used, solution.model);
  const mend =
    from === null
      ? "no set of the highest of these levels passes: give levels nearer the limit, or fit an oscillator and take its empirical range"
      : `the ${levels.filter((v) => v >= from).length} levels from v = ${from} up pass: fit them alone (use: no for the rest)`;
  return [
    {
      code: "not-near-limit",
      message: `no dissociation energy: the levels v = ${levels[0]} to ${levels.at(-1)} do not reach the limiting region, for ${failures.map(({ test, what }) => `(${test}) ${what}`).join("; ")}. The constants only describe these levels; ${mend}`,
      about: solution.fit.keys[limit.energy]!,
    },
  ];
}

function untested({ tested, failures }: Verdict): Warning[] {
  if (tested || failures.length > 0) return [];
  return [
    {
      code: "near-limit-untested",
      message:
        "too few levels to test whether they reach the limiting region, where alone the law holds: D rests on that assumption; add a level, or state σ",
    },
  ];
}

function aboutMass({ options }: Solution): Warning[] {
  if (options.reducedMass != null) return [];
  return [
    {
      code: "no-bond",
      message: "no masses are known, so the slope Hn stands in place of Cn; give --bond or --reduced-mass",
    },
  ];
}

function noteOf({ tested, drift }: Verdict, given: boolean): string {
  if (given) return "the limit is the one given";
  const law = "limiting law for levels close under the limit";
  if (!tested) return `${law}; too few levels to test whether these are`;
  const by = drift === null || Math.abs(drift.shift) < 1e-4 ? "less than 0.0001" : Number(drift.shift.toPrecision(2));
  const without =
    drift === null
      ? ""
      : `; without the ${drift.left === 1 ? "lowest level" : `${drift.left} lowest levels`} it moves by ${String(by).replace("-", "−")} cm-1`;
  return `${law}${without}; the uncertainty is that of the fit alone`;
}

/** Every level from the lowest used one up to the limit, or to `--up-to`. */
function furtherLevels(solution: Solution, limit: Limit): { predictions: Prediction[]; warnings: Warning[] } {
  const { model, options, used, fit, by } = solution;
  // The quantum number at the limit is no level itself.
  const highest = Math.ceil(fit.values[limit.level]! - 1e-9) - 1;
  const upTo = Math.min(options.upTo ?? highest, highest);
  const labels = labelsWithin(model.labels(upTo), used, model, options, fit.values);
  const predictions = predict(model, options, labels, fit.values, by, lastLevelOut(solution), used);
  if (options.upTo === null || upTo === options.upTo) return { predictions, warnings: [] };
  return {
    predictions,
    warnings: [
      {
        code: "above-highest-level",
        message: `predictions end at v = ${upTo}: there is no level between it and the limit; ask for --up-to ${upTo} or less`,
      },
    ],
  };
}

/** How far the law misses the highest level when it is fitted without it; null where the others do not determine it. */
function lastLevelOut(solution: Solution): number | null {
  const { series, model, options, used } = solution;
  const top = levelsOf(used, model).at(-1)!;
  const at = used.find(({ label }) => model.levels(label).upper === top)!;
  const bands = series.bands.map((band) =>
    band.use && model.levels(band.label).upper === top ? { ...band, use: false } : band,
  );
  const rest = trySolve({ ...series, bands }, model, options);
  if (rest === null) return null;
  const there = model.prepare([at], options).evaluate(rest.fit.values).calculated[0]!;
  return Number.isFinite(there) ? Math.abs(at.position - there) : null;
}
