import type { GivenConstants, SharedConstant } from "../analysis/index.ts";
import type { Settings } from "../bands/index.ts";
import { type Fault, InputError } from "../messages/index.ts";
import type { Model } from "../models/index.ts";
import { readMeasurement } from "../quantity/index.ts";
import { readAssignments } from "./assignments.ts";
import { readCorrelation } from "./correlation.ts";

/** `--share "wexe weye"`, or `"wexe±0.5"` for constants alike to half a wavenumber; null without one. @throws InputError */
export function readShare(settings: Settings): SharedConstant[] | null {
  const setting = settings.get("share");
  if (setting === undefined) return null;
  const fault = (what: string) =>
    new InputError([
      {
        code: "share",
        place: setting.place,
        what,
        mend: 'write constants such as wexe or "wexe weye", or "wexe±0.5" for one that may differ by so much (standard deviation)',
      },
    ]);
  const words = setting.value
    .replace(/\s*(?:±|\+\/?-)\s*/g, "±")
    .split(/[\s,;]+/)
    .filter((word) => word !== "");
  const read = words.map((word) => {
    const [, key = "", spread] = /^([a-z]\w*)(?:±(.+))?$/i.exec(word) ?? [];
    const within = spread === undefined ? null : readMeasurement(spread);
    if (key === "" || (within !== null && !(within.ok && within.value > 0)))
      throw fault(`"${word}" names no constant to share`);
    return { key: key.toLowerCase(), spread: within?.ok === true ? within.value : 0 };
  });
  if (read.length === 0) throw fault("names no constant to share");
  const twice = read.find(({ key }, i) => read.findIndex((other) => other.key === key) !== i);
  if (twice !== undefined) throw fault(`"${twice.key}" stands there twice`);
  return read;
}

/** `--compare "we=2990.9463(5) wexe=52.8186(9)"` with `--correlation`; null without it. @throws InputError */
export function readGiven(settings: Settings, { constants, name, well }: Model): GivenConstants | null {
  const setting = settings.get("compare");
  const correlation = settings.get("correlation");
  if (setting === undefined) {
    if (correlation === undefined) return null;
    const what = "there are no constants from elsewhere that it could belong to";
    const mend = "leave it out, or give --compare (fit) or --constants";
    throw new InputError([{ code: "correlation-alone", place: correlation.place, what, mend }]);
  }
  const faults: Fault[] = [];
  const fault = (what: string, mend: string) => faults.push({ code: "compare", place: setting.place, what, mend });
  if (well === undefined) {
    fault(`constants of the model ${name} are not compared`, "leave it out, or use --model oscillator");
    throw new InputError(faults);
  }
  const known = constants.map(({ key }) => key);
  const read = readAssignments(setting.value).map(({ key, value }) => {
    const number = readMeasurement(value ?? "");
    if (!known.includes(key))
      fault(`there is no constant "${key}" in the model ${name}`, `write some of ${known.join(", ")}`);
    else if (!number.ok) fault(`"${key}" has no number`, `write ${key}=52.8 or ${key}=52.8(1)`);
    return { key, value: number.ok ? number.value : 0, sigma: number.ok ? number.sigma : null };
  });
  // In the order of the model, and none left out: D0 is compared too.
  const keys = known.slice(0, Math.max(0, ...read.map(({ key }) => known.indexOf(key) + 1)));
  const given = keys.map((key) => read.filter((one) => one.key === key));
  if (faults.length === 0 && (keys.length < 2 || given.some((all) => all.length !== 1)))
    fault(
      "does not hold each constant once",
      `write ${known.slice(0, Math.max(2, keys.length)).join(", ")}, such as "we=2990.95(1) wexe=52.82(1)"`,
    );
  if (faults.length > 0) throw new InputError(faults);
  const sigmas = given.map(([one]) => one!.sigma);
  const r = readCorrelation(correlation?.value, keys.length);
  if (r !== null && sigmas.some((sigma) => sigma === null))
    throw new InputError([
      {
        code: "correlation-without-uncertainty",
        place: correlation!.place,
        what: "not every constant of --compare carries an uncertainty",
        mend: "write them as in we=2990.95(1)",
      },
    ]);
  const covariance = sigmas.every((sigma) => sigma === null)
    ? null
    : sigmas.map((a, i) => sigmas.map((b, j) => (r?.[i]?.[j] ?? Number(i === j)) * (a ?? 0) * (b ?? 0)));
  return { keys, values: given.map(([one]) => one!.value), covariance };
}
