import { type Assignment, assignPeaks } from "../analysis/index.ts";
import {
  type Band,
  mergeSettings,
  readInput,
  rowsFromPeaks,
  type Setting,
  type Settings,
  toSeries,
  withoutLabels,
} from "../bands/index.ts";
import { type Fault, InputError, type Warning } from "../messages/index.ts";
import { readMeasurement } from "../quantity/index.ts";
import { type InputText, requestSettings } from "./request.ts";
import { tool } from "./tool.ts";

/** What `assign` may be told; positions as in `fit`, without labels. */
export interface AssignRequest {
  /** such as "2886 5668 8347 9120" */
  readonly peaks?: string;
  /** a table with a column position */
  readonly input?: InputText;
  /** @default "cm-1" */
  readonly unit?: string;
  /** @default "vacuum" */
  readonly medium?: string;
  readonly air?: string;
  /** standard uncertainty of peaks that carry none, what a two-constant ladder leaves included; @default 3 cm-1 */
  readonly sigma?: string | number;
  readonly sigmaMeans?: string;
  readonly laser?: string | number;
  /** 1, or 2 for two kinds of bonds; @default 1 */
  readonly ladders?: string | number;
  /** @default "omega=500..4500 ratio=0.002..0.04" */
  readonly limits?: string;
  /** levels known to lie in a range, such as "1-0 2900..3100" */
  readonly expect?: string;
  /** highest level looked for; @default 10 */
  readonly upTo?: string | number;
}

/** The document of `assign`. */
export interface AssignDocument extends Assignment {
  readonly schemaVersion: 1;
  readonly tool: { readonly name: string; readonly version: string };
  /** limits in force: ω in cm-1 and ωx/ω, and the highest level looked for */
  readonly limits: {
    readonly omega: readonly [number, number];
    readonly ratio: readonly [number, number];
    readonly highest: number;
  };
  readonly warnings: readonly Warning[];
}

/** σ in cm-1 where none is stated: of positions read off a spectrum, and what three constants leave of HDO to v = 7. */
const UNSTATED_SIGMA = 3;
/** Real ladders bend by ωy/ω of this size: HDO 1.2e-4, HCl 0.7e-4, CO 1e-6 (from the constants of those molecules). */
const CUBIC = 1e-4;
const MOST_PEAKS = 200;

const SETTINGS = [
  "peaks",
  "unit",
  "medium",
  "air",
  "sigma",
  "sigma-means",
  "laser",
  "ladders",
  "limits",
  "expect",
  "up-to",
];

/**
 * Label peaks of which nothing is known but that some of them are overtones of one oscillator (or two).
 * @throws InputError exit 2 for a wrong request or fewer than three different peaks, exit 3 when no ladder fits the limits
 */
export async function assign(request: AssignRequest): Promise<AssignDocument> {
  const flags = requestSettings(request);
  const file =
    request.input === undefined
      ? null
      : await readInput(request.input.text, request.input.source, request.input.format, false);
  const settings = new Map(
    [...mergeSettings(flags, file?.settings ?? new Map())].filter(([name]) => SETTINGS.includes(name)),
  );
  const faults: Fault[] = [];
  const limits = readLimits(settings, faults);
  const expectations = readExpectations(settings, faults);
  const ladders = readWhole(settings, "ladders", [1, 2], faults, "write 1 or 2") ?? 1;
  const highest = readWhole(settings, "up-to", [3, 30], faults, "write the highest level to look for, such as 8") ?? 10;
  const bands = peaksOf(settings, file?.rows ?? null, faults);
  if (faults.length > 0) throw new InputError(faults);
  const place = { source: request.input?.source ?? "--peaks" };
  const distinct = new Set(bands.map(({ position }) => position)).size;
  if (distinct < 3)
    throw new InputError([
      {
        code: "too-few-peaks",
        place,
        what: `${bands.length} peak${bands.length === 1 ? "" : "s"}${distinct < bands.length ? `, ${distinct} of them different,` : ""} cannot be assigned`,
        mend: "give at least three different peaks",
      },
    ]);
  if (bands.length > MOST_PEAKS)
    throw new InputError([
      {
        code: "too-many-peaks",
        place,
        what: `${bands.length} peaks are too many to assign`,
        mend: `give the ${MOST_PEAKS} strongest at most`,
      },
    ]);
  const unstated = bands.filter(({ sigma }) => sigma === null);
  const assignment = assignPeaks(
    bands.map(({ position, sigma }) => ({ position, sigma: sigma ?? UNSTATED_SIGMA })),
    { ...limits, cubic: CUBIC, highest, expectations, ladders: ladders as 1 | 2 },
  );
  if (assignment.hypotheses.length === 0)
    throw new InputError(
      [
        {
          code: "no-ladder",
          place,
          what: `no three peaks${ladders === 2 ? " of each of two ladders" : ""} are in step with ω ${limits.omega.join(" to ")} cm-1 and ωx/ω ${limits.ratio.join(" to ")}${expectations.length > 0 ? " and what was expected" : ""}`,
          mend: "widen --limits or --expect, state a larger --sigma, or give more peaks",
        },
      ],
      3,
    );
  return {
    schemaVersion: 1,
    tool,
    limits: { ...limits, highest },
    ...assignment,
    warnings:
      unstated.length === 0
        ? []
        : [
            {
              code: "sigma-assumed",
              message: `${unstated.length === bands.length ? "no peak carries" : `${unstated.length} peaks carry`} a σ: ${UNSTATED_SIGMA} cm-1 is assumed, and the probabilities rest on it; give --sigma`,
            },
          ],
  };
}

function peaksOf(
  settings: Settings,
  rows: Parameters<typeof withoutLabels>[0] | null,
  faults: Fault[],
): readonly Band[] {
  const peaks = settings.get("peaks");
  const fromFile = rows !== null && rows.length > 0;
  if (fromFile && peaks !== undefined && peaks.place.source === "--peaks") {
    faults.push({
      code: "peaks-twice",
      place: peaks.place,
      what: "peaks come from FILE and --peaks",
      mend: "give them once",
    });
    return [];
  }
  if (!fromFile && peaks === undefined) {
    faults.push({
      code: "no-peaks",
      place: { source: "request" },
      what: "there are no peaks",
      mend: 'give a FILE with a column position, or --peaks "2886 5668 8347 9120"',
    });
    return [];
  }
  try {
    const raw = fromFile ? withoutLabels(rows) : rowsFromPeaks(peaks!.value, peaks!.place);
    // Several series in one file are one spectrum here.
    const merged = raw.map(({ cells: { series: _, ...cells }, place }) => ({ cells, place }));
    return toSeries(merged, settings).series.flatMap(({ bands }) => bands.filter(({ use }) => use));
  } catch (error) {
    if (!(error instanceof InputError)) throw error;
    faults.push(...error.faults);
    return [];
  }
}

function readWhole(
  settings: Settings,
  name: string,
  [least, most]: readonly [number, number],
  faults: Fault[],
  mend: string,
): number | null {
  const setting = settings.get(name);
  if (setting === undefined) return null;
  const value = Number(setting.value);
  if (Number.isInteger(value) && value >= least && value <= most) return value;
  faults.push({ code: "out-of-range", place: setting.place, what: `"${setting.value}" is not possible`, mend });
  return null;
}

const DEFAULTS = { omega: [500, 4500], ratio: [0.002, 0.04] } as const;

/** `omega=500..4500 ratio=0.002..0.04`, one or both. */
function readLimits(
  settings: Settings,
  faults: Fault[],
): { omega: readonly [number, number]; ratio: readonly [number, number] } {
  const setting = settings.get("limits");
  const limits: { omega: readonly [number, number]; ratio: readonly [number, number] } = { ...DEFAULTS };
  if (setting === undefined) return limits;
  const mend = 'write them as in --limits "omega=500..4500 ratio=0.002..0.04"';
  for (const word of setting.value.split(/[\s,;]+/).filter((text) => text !== "")) {
    const [, name, range = ""] = /^(omega|ratio)=(.*)$/i.exec(word) ?? [];
    const ends = rangeOf(range);
    if (name === undefined || ends === null || !(ends[0] > 0))
      faults.push({ code: "limits", place: setting.place, what: `"${word}" is no limit`, mend });
    else limits[name.toLowerCase() as "omega" | "ratio"] = ends;
  }
  if (limits.ratio[1] >= 0.5)
    faults.push({ code: "limits", place: setting.place, what: "ωx/ω of 0.5 and more leaves no overtones", mend });
  return limits;
}

/** `2900..3100` in rising order; null for anything else. */
function rangeOf(text: string): readonly [number, number] | null {
  const [low, high, ...more] = text.split("..").map((end) => readMeasurement(end));
  if (more.length > 0 || low === undefined || high === undefined || !low.ok || !high.ok) return null;
  return low.value < high.value ? [low.value, high.value] : null;
}

/** `1-0 2900..3100; 2-0 5700..5900`, cm-1. */
function readExpectations(settings: Settings, faults: Fault[]) {
  const setting: Setting | undefined = settings.get("expect");
  if (setting === undefined) return [];
  return setting.value
    .split(/[,;\n]+/)
    .filter((part) => part.trim() !== "")
    .flatMap((part) => {
      const [, level, range = ""] = /^\s*(\d{1,2})-0\s+(\S+)\s*$/.exec(part) ?? [];
      const ends = rangeOf(range);
      if (level !== undefined && Number(level) > 0 && ends !== null)
        return [{ v: Number(level), low: ends[0], high: ends[1] }];
      faults.push({
        code: "expect",
        place: setting.place,
        what: `"${part.trim()}" is no expectation`,
        mend: 'write a level and a range in cm-1, such as --expect "1-0 2900..3100"',
      });
      return [];
    });
}
