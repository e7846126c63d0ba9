import type { AnalysisOptions, ExcessKind, IntervalKind } from "../analysis/index.ts";
import type { Setting, Settings } from "../bands/index.ts";
import type { RobustKind } from "../fitting/index.ts";
import { type Fault, nearest } from "../messages/index.ts";
import { type Fixed, findModel, type Model, modelNames, type Notation } from "../models/index.ts";
import { type AirConditions, readAir, readMeasurement, standardAir } from "../quantity/index.ts";
import { readAssignments } from "./assignments.ts";
import { readAccepted, readModes } from "./read-molecule.ts";
import { Reader } from "./setting-reader.ts";

/** The settings about the fit, read and checked. */
export interface ReadOptions {
  readonly model: Model;
  readonly analysis: AnalysisOptions;
  readonly notation: Notation;
  /** how text writes each constant, in that notation */
  readonly symbols: Readonly<Record<string, string>>;
}

const whole = (least: number, most: number) => (x: number) => Number.isInteger(x) && x >= least && x <= most;
const positive = (x: number) => x > 0;

/** Read everything about the fit; what is wrong comes back as faults, with null. */
export async function readOptions(
  settings: Settings,
): Promise<{ options: ReadOptions | null; faults: readonly Fault[] }> {
  const reader = new Reader(settings);
  const model = await readModel(reader);
  const autoTerms = settings.get("terms")?.value.trim().toLowerCase() === "auto";
  const terms =
    model?.terms == null || autoTerms
      ? null
      : reader.number(
          "terms",
          whole(model.terms.least, model.terms.most),
          `write a whole number from ${model.terms.least} to ${model.terms.most}, or auto`,
        );
  const analysis: AnalysisOptions = {
    terms,
    autoTerms,
    fixed: model === null ? {} : readFixed(reader, model),
    bonds: model?.settings?.own?.includes("bonds") === true ? readBonds(reader) : null,
    cross: reader.choice("cross", ["yes", "no"], "no") === "yes",
    bend: reader.choice("bend", ["degenerate", "single"], "degenerate"),
    power: reader.number("power", (x) => x >= 3, OWN_SETTINGS.power![0]),
    excess: reader.choice<ExcessKind>("excess", ["scatter", "birge", "none"], "scatter"),
    scatter: reader.number("scatter", positive, "write the added scatter in cm-1, such as 0.3"),
    coverage: reader.number("coverage", (x) => x > 0 && x < 1, "write a probability between 0 and 1, such as 0.99"),
    sharing: null,
    modes: readModes(reader, model),
    window: reader.number("window", positive, "write how far from an overtone to look, in cm-1, such as 50") ?? 50,
    groups: reader.choice("groups", ["carried", "fitted"], "carried"),
    robust: settings.has("robust") ? reader.choice<RobustKind>("robust", ["tukey", "huber"], "tukey") : null,
    intervals: reader.choice<IntervalKind>("intervals", ["linear", "profile", "resample"], "linear"),
    resamples:
      reader.number("resamples", whole(100, 1e7), "write a number of draws from 100 up, such as 10000") ?? 10_000,
    seed: reader.number("seed", whole(0, 2 ** 31), "write a whole number such as 1") ?? 1,
    upTo: readUpTo(reader, model),
    air: readAirConditions(reader),
    accepted: readAccepted(reader, "accepted", "D0", "35759(5), or with its unit, 4.4336 eV", "cm-1"),
    diatomic: reader.choice("diatomic", ["yes", "no"], "no") === "yes",
    acceptedEnthalpy: readAccepted(reader, "accepted-enthalpy", "ΔH°(298.15 K)", "431.6(1) in kJ/mol", "kJ/mol"),
    be: reader.number("be", positive, "write Be in cm-1, such as 10.593"),
    alphaE: reader.number("alpha-e", Number.isFinite, "write αe in cm-1, such as 0.307"),
    re: reader.number("re", positive, "write re in Å, such as 1.2746"),
  };
  const window = settings.get("window");
  if (window !== undefined && analysis.modes.length === 0 && !settings.has("modes"))
    reader.fault(
      window,
      "window-without-modes",
      "there are no modes to look for",
      'name them with --modes "bend 1370, rock 1020(5)"',
    );
  const enthalpy = settings.get("accepted-enthalpy");
  if (enthalpy !== undefined && !analysis.diatomic)
    reader.fault(
      enthalpy,
      "enthalpy-without-diatomic",
      "an accepted enthalpy can be compared for a diatomic molecule only",
      "add --diatomic, or give an accepted D0 with --accepted",
    );
  const asked = settings.get("terms");
  if (asked !== undefined && model?.terms === null && !autoTerms)
    reader.fault(
      asked,
      "setting-of-another-model",
      `"terms" means nothing to the model ${model.name}`,
      "leave it out: the model says how many constants there are",
    );
  if (model !== null) checkOwnSettings(reader, model);
  const notation = reader.choice<Notation>("notation", ["equilibrium", "local"], "equilibrium");
  if (model === null || reader.faults.length > 0) return { options: null, faults: reader.faults };
  return { options: { model, analysis, notation, symbols: symbolsOf(model, notation) }, faults: [] };
}

function readUpTo(reader: Reader, model: Model | null): number | null {
  const { step, most } = model?.highest ?? { step: 1, most: 500 };
  const accept = (x: number) => Number.isInteger(x / step) && x > 0 && x <= most;
  const mend =
    model?.highest === undefined
      ? "write the highest level to predict, such as 9"
      : `write a number from ${step} to ${most} in steps of ${step}: the levels of the model ${model.name} multiply with it`;
  return reader.number("up-to", accept, mend);
}

/** How text writes the constants of a model. */
export function symbolsOf(model: Model, notation: Notation): Record<string, string> {
  return Object.fromEntries(model.constants.map(({ key, symbol }) => [key, symbol[notation]]));
}

async function readModel(reader: Reader): Promise<Model | null> {
  const setting = reader.settings.get("model");
  const name = setting?.value.trim().toLowerCase() ?? "oscillator";
  const model = await findModel(name);
  if (model === null && setting !== undefined) {
    const guess = nearest(name, modelNames);
    reader.fault(
      setting,
      "unknown-model",
      `there is no model "${setting.value}"${guess === null ? "" : ` (did you mean ${guess}?)`}`,
      `write ${modelNames.join(" or ")}`,
    );
  }
  return model;
}

function readAirConditions(reader: Reader): AirConditions {
  const setting = reader.settings.get("air");
  if (setting === undefined) return standardAir;
  const read = readAir(setting.value);
  if (!("what" in read)) return read;
  reader.fault(setting, "air-conditions", read.what, read.mend);
  return standardAir;
}

function readBonds(reader: Reader): number | "unlike" | null {
  const text = reader.choice("bonds", ["2", "3", "4", "unlike"], "2");
  return text === "unlike" ? text : Number(text);
}

/** Settings that only some models know, with what to write and whose they are. */
const OWN_SETTINGS: Readonly<Record<string, readonly [mend: string, model: string]>> = {
  power: [
    "write n of the long-range potential D - Cn/r^n, 3 or more (no such law for less), such as 5 or 6",
    "near-limit",
  ],
  cn: ["write Cn in cm-1 Å^n, such as 3.1e5, or 3.1(2)e5 with its uncertainty", "near-limit"],
  limit: ["write the limit in cm-1 above v = 0, such as 20043.1, or 20043.1(5) with its uncertainty", "near-limit"],
  bonds: ["write how many equivalent bonds there are: 2, 3 or 4, or unlike for two different ones", "coupled"],
  cross: ["say that a cross anharmonicity is fitted too", "coupled"],
  bend: ["write degenerate or single", "polyad"],
};

/** What the model cannot do without must be there, and what it does not know must not. */
function checkOwnSettings(reader: Reader, { name: model, settings }: Model): void {
  const named = reader.settings.get("model");
  const required = settings?.required ?? [];
  for (const name of required)
    if (!reader.settings.has(name) && named !== undefined)
      reader.fault(named, "setting-missing", `${model} needs --${name}`, OWN_SETTINGS[name]![0]);
  const known = [...required, ...(settings?.own ?? []), ...Object.keys(settings?.constants ?? {})];
  for (const [name, [mend, owner]] of Object.entries(OWN_SETTINGS)) {
    const setting = reader.settings.get(name);
    if (setting === undefined || known.includes(name)) continue;
    // --bond and --bonds are one slip apart.
    const slip = name === "bonds" && !/^[234]$|^unlike$/i.test(setting.value.trim());
    reader.fault(
      setting,
      "setting-of-another-model",
      `"${name}" means nothing to the model ${model}`,
      slip
        ? `for the two atoms write --bond "${setting.value}"; --bonds counts equivalent bonds of --model ${owner} (${mend})`
        : `leave it out, or name the model it belongs to: --model ${owner}`,
    );
  }
}

/** `--fix "weye=0.22(1) weze=0"`: constants held, or with an uncertainty observed; a model may have settings that do the same. */
function readFixed(reader: Reader, model: Model): Readonly<Record<string, Fixed>> {
  const fixed: Record<string, Fixed> = {};
  const keys = model.constants.map((constant) => constant.key);
  const fix = reader.settings.get("fix");
  const read = (setting: Setting, key: string, text: string, mend: string) => {
    const measured = readMeasurement(text);
    const positive = model.constants.find((constant) => constant.key === key)!.positive === true;
    if (!measured.ok) reader.fault(setting, "not-a-number", `"${key}" has no number`, mend);
    else if (positive && !(measured.value > 0))
      reader.fault(setting, "out-of-range", `${key} = ${measured.value} is not possible: it is positive`, mend);
    else if (Object.hasOwn(fixed, key))
      reader.fault(setting, "constant-twice", `"${key}" stands there twice`, "name each constant once");
    else fixed[key] = { value: measured.value, sigma: measured.sigma };
  };
  for (const { key, value } of fix === undefined ? [] : readAssignments(fix.value)) {
    if (keys.includes(key)) read(fix!, key, value ?? "", `write ${key}=0.22, or ${key}=0.22(1) with its uncertainty`);
    else
      reader.fault(
        fix!,
        "unknown-constant",
        `there is no constant "${key}"`,
        `write one of ${keys.join(", ")}, such as ${keys.includes("weye") ? "weye=0.22" : `${keys[0]}=…`}`,
      );
  }
  for (const [name, key] of Object.entries(model.settings?.constants ?? {})) {
    const setting = reader.settings.get(name);
    if (setting !== undefined) read(setting, key, setting.value, OWN_SETTINGS[name]![0]);
  }
  return fixed;
}
