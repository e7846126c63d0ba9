import { type Aim, type Plan, type PlanOptions, planKnown, planNext } from "../analysis/index.ts";
import { readVibrationalLabel, type Setting } from "../bands/index.ts";
import { type Fault, InputError, type Warning } from "../messages/index.ts";
import { isWavelength, readMeasurement, splitUnit, toWavenumber } from "../quantity/index.ts";
import { gather } from "./gather.ts";
import { type SourceRequest, sourcesOf } from "./prediction-sources.ts";
import { type FitRequest, requestSettings } from "./request.ts";
import { tool } from "./tool.ts";

/** What `plan` may be told: bands, constants or a stored result as for `predict`, and what is to become better known. */
export interface PlanRequest extends Omit<SourceRequest, "window" | "modes"> {
  /** "we", "wexe", … ; "d0"; "prediction:7-0"; "model" */
  readonly aim?: string;
  /** standard uncertainty of the new band, "0.02" cm-1 or "0.01 nm"; @default the median of those stated */
  readonly sigmaNew?: string | number;
  /** where can be looked, such as "600..900 nm, 1500..1600 nm" (vacuum) or "9000..11000" cm-1; @default everywhere */
  readonly window?: string;
  /** also bands that start from levels up to this; @default 0 */
  readonly hot?: string | number;
}

/** The document of `plan`; `aim`, `now` and `candidates` are those of the first series. */
export interface PlanDocument extends Pick<Plan, "aim" | "now" | "candidates"> {
  readonly schemaVersion: 1;
  readonly tool: { readonly name: string; readonly version: string };
  readonly series: readonly Plan[];
  readonly warnings: readonly Warning[];
}

/**
 * Which band to measure next, and where to look for it.
 * @throws InputError as `fit`; exit 2 for an aim the model cannot have or windows without any band
 */
export async function plan(request: PlanRequest): Promise<PlanDocument> {
  const { aim, sigmaNew, window, hot, ...rest } = request;
  const own = requestSettings({ aim, sigmaNew, window, hot });
  const faults: Fault[] = [];
  const options = readPlan(own, faults);
  if (faults.length > 0) throw new InputError(faults);
  const plans =
    rest.constants !== undefined || rest.stored !== undefined
      ? await fromKnown(rest, options)
      : await fromBands(rest, options);
  const { aim: text, now, candidates } = plans[0]!;
  return { schemaVersion: 1, tool, aim: text, now, candidates, series: plans, warnings: warnings(plans, own) };
}

async function fromBands(request: FitRequest, options: Omit<PlanOptions, "upTo">): Promise<Plan[]> {
  const { settings, series, options: read, optionsOf } = await gather(request);
  const place = settings.get("share")?.place;
  if (place !== undefined && series.some(({ shared }) => shared.length > 0))
    throw new InputError([
      {
        code: "share-not-possible",
        place,
        what: "a plan does not follow errors that are common to series which share a constant",
        mend: "leave --share out, or the common errors (--shared-sigma, --laser, --per-quantum-sigma, groups)",
      },
    ]);
  return series.map((one) => planNext(one, read.model, optionsOf(one), { ...options, upTo: read.analysis.upTo }));
}

/** From constants or a stored result: what they know, and nothing of the bands behind them. */
async function fromKnown(request: SourceRequest, options: Omit<PlanOptions, "upTo">): Promise<Plan[]> {
  const { sources, options: read, light } = await sourcesOf(request);
  return sources.map(({ reducedMass, values, warnings, ...known }) => {
    const told = { ...read.analysis, terms: values.length, fixed: {}, reducedMass };
    const keys = read.model.prepare([], told).parameters.map(({ key }) => key);
    return planKnown(
      {
        ...known,
        place: request.stored?.source ?? "--constants",
        model: read.model,
        options: told,
        light,
        keys,
        values,
        // What a stored fit says of itself stands in its report.
        warnings: request.stored === undefined ? warnings : [],
      },
      { ...options, upTo: read.analysis.upTo },
    );
  });
}

function warnings(plans: readonly Plan[], own: ReadonlyMap<string, Setting>): Warning[] {
  return own.has("sigma-new")
    ? []
    : [
        {
          code: "sigma-new-assumed",
          message: `no --sigma-new: a new band is given ${plans.map(({ candidates }) => `${Number(candidates[0]!.sigmaNew.toPrecision(2))} cm-1`).join(", ")}, the median of the stated σ or the standard deviation of the fit; state what your instrument reaches`,
        },
      ];
}

function readPlan(own: ReadonlyMap<string, Setting>, faults: Fault[]): Omit<PlanOptions, "upTo"> {
  const fault = (name: string, code: string, what: string, mend: string) => {
    faults.push({ code, place: own.get(name)?.place ?? { source: `--${name}` }, what, mend });
    return null;
  };
  const aim = own.get("aim")?.value ?? "";
  const hot = own.get("hot")?.value ?? "0";
  if (!/^\d{1,2}$/.test(hot)) fault("hot", "not-a-level", `"${hot}" is not a level`, "write a whole number such as 1");
  return {
    aim: aimFrom(aim) ??
      fault("aim", "aim", aim === "" ? "no aim is given" : `"${aim}" is no aim`, AIMS) ?? { kind: "model" },
    sigmaNew: sigmaFrom(own.get("sigma-new")?.value, (what) =>
      fault("sigma-new", "sigma-new", what, "write it as in --sigma-new 0.02, or 0.01 nm"),
    ),
    hot: Number(hot),
    windows: windowsFrom(own.get("window")?.value, (what) =>
      fault("window", "window", what, 'write it as in --window "600..900 nm" or "9000..11000"'),
    ),
  };
}

const AIMS = "write --aim we, wexe, weye, d0, prediction:7-0 or model";

function aimFrom(text: string): Aim | null {
  const word = text.trim();
  if (/^d0$/i.test(word)) return { kind: "d0" };
  if (/^model$/i.test(word)) return { kind: "model" };
  const [, label] = /^prediction:\s*(.+)$/i.exec(word) ?? [];
  if (label !== undefined) {
    const levels = readVibrationalLabel(label);
    return levels === null || levels.upper <= levels.lower
      ? null
      : { kind: "prediction", label: `${levels.upper}-${levels.lower}` };
  }
  return /^[a-z]\w*$/i.test(word) ? { kind: "constant", key: word.toLowerCase() } : null;
}

function sigmaFrom(text: string | undefined, fault: (what: string) => null): PlanOptions["sigmaNew"] {
  if (text === undefined) return null;
  const { number, unit } = splitUnit(text);
  const read = readMeasurement(number);
  if (!read.ok) return fault(read.what);
  return read.value > 0 ? { value: read.value, unit: unit ?? "cm-1" } : fault(`${text} is not positive`);
}

/** `600..900 nm, 9000..11000`: each range in its own unit, cm-1 where none stands. */
function windowsFrom(text: string | undefined, fault: (what: string) => null): PlanOptions["windows"] {
  if (text === undefined) return [];
  if (text.trim() === "") return fault("no window is given") ?? [];
  return text
    .split(/[,;\n]+/)
    .filter((part) => part.trim() !== "")
    .flatMap((part) => {
      const [from, to, ...more] = part.split("..").map((end) => splitUnit(end));
      const ends = [from, to].map((end) => readMeasurement(end?.number ?? ""));
      const unit = to?.unit ?? "cm-1";
      if (more.length > 0 || !ends.every((end) => end.ok && end.value > 0) || (from!.unit ?? unit) !== unit)
        return fault(`"${part.trim()}" is no window`) ?? [];
      const [a, b] = ends.map((end) => toWavenumber(end.ok ? end.value : 1, unit)) as [number, number];
      if (a === b) return fault(`"${part.trim()}" is empty`) ?? [];
      const ofLight = isWavelength(unit);
      const name = `${from!.number} to ${to!.number} ${ofLight ? `${unit} (vacuum)` : unit}`;
      return [{ low: Math.min(a, b), high: Math.max(a, b), ofLight, text: name }];
    });
}
