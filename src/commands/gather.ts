import { type AnalysisOptions, type GivenConstants, shareConstants } from "../analysis/index.ts";
import {
  mergeSettings,
  readInput,
  rowsFromBands,
  rowsFromSeries,
  type Series,
  type Settings,
  toSeries,
  type Understood,
} from "../bands/index.ts";
import { loadNonlinearCore } from "../fitting/index.ts";
import { type Fault, formatFault, InputError, type Warning } from "../messages/index.ts";
import { readGiven, readShare } from "./read-comparison.ts";
import { type ReadOptions, readOptions } from "./read-options.ts";
import { type FitRequest, requestSettings } from "./request.ts";

/** A request made ready: bands on a common footing and options checked. */
export interface Gathered {
  readonly settings: Settings;
  readonly series: readonly Series[];
  readonly options: ReadOptions;
  /** of one series, where a constant is shared; otherwise those of `options` */
  readonly optionsOf: (one: Series) => AnalysisOptions;
  /** constants to compare with */
  readonly given: GivenConstants | null;
  readonly warnings: readonly Warning[];
}

/** Read the file and the flags of a request. Throws InputError with everything that is wrong, before any work is done. */
export async function gather(request: FitRequest): Promise<Gathered> {
  const flags = requestSettings(request);
  const file =
    request.input === undefined
      ? null
      : await readInput(request.input.text, request.input.source, request.input.format);
  const settings = mergeSettings(flags, file?.settings ?? new Map());
  const { options, faults } = await readOptions(settings);
  const { result, faults: more } = collect(() => bandsOf(settings, flags, file));
  const wrong = [
    ...faults,
    ...more,
    ...(options === null || result === null
      ? []
      : result.series.flatMap((s) => options.model.check(s, options.analysis))),
  ];
  if (options !== null && (options.analysis.intervals === "profile" || options.model.starts !== undefined))
    await loadNonlinearCore();
  if (wrong.length > 0 || options === null || result === null) throw new InputError(distinct(wrong));
  const given = readGiven(settings, options.model);
  const shared = readShare(settings);
  const each =
    shared === null
      ? null
      : shareConstants(result.series, options.model, options.analysis, shared, settings.get("share")!.place);
  return {
    settings,
    series: result.series,
    options,
    optionsOf: (one) => each?.get(one) ?? options.analysis,
    given,
    warnings: result.warnings,
  };
}

function bandsOf(settings: Settings, flags: Settings, file: Awaited<ReturnType<typeof readInput>> | null): Understood {
  const place = { source: "request" };
  const given = [
    ...(file !== null && file.rows.length > 0 ? ["FILE"] : []),
    ...["series", "bands"].filter((name) => (file !== null && file.rows.length > 0 ? flags : settings).has(name)),
  ];
  if (given.length > 1)
    throw new InputError([
      {
        code: "bands-twice",
        place,
        what: `bands come from ${given.join(" and ")}`,
        mend: "give them once: a FILE, --series or --bands",
      },
    ]);
  if (given[0] === "FILE") return toSeries(file!.rows, settings);
  const setting = given[0] === undefined ? undefined : settings.get(given[0])!;
  if (setting === undefined)
    throw new InputError([
      {
        code: "no-bands",
        place,
        what: "there are no bands",
        mend: 'give a FILE, --series "2885.98 5667.98 8346.78" or --bands "1-0 2885.98, 3-0 8346.78"',
      },
    ]);
  const rows =
    given[0] === "series"
      ? rowsFromSeries(
          setting.value,
          settings.get("from")?.value ?? null,
          settings.get("unit")?.value ?? null,
          setting.place,
          settings.has("laser"),
        )
      : rowsFromBands(setting.value, setting.place);
  return toSeries(rows, settings);
}

/** The same fault may be seen from two sides (a setting read by bands and fit). */
function distinct(faults: readonly Fault[]): Fault[] {
  return [...new Map(faults.map((fault) => [formatFault(fault), fault])).values()];
}

/** Run a step that may throw InputError of exit 2, and keep its faults. */
function collect<T>(step: () => T): { result: T | null; faults: readonly Fault[] } {
  try {
    return { result: step(), faults: [] };
  } catch (error) {
    if (error instanceof InputError && error.exit === 2) return { result: null, faults: error.faults };
    throw error;
  }
}
