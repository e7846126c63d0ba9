import type { GivenConstants, Share } from "../analysis/index.ts";
import type { Settings } from "../bands/index.ts";
import { type Fault, InputError } from "../messages/index.ts";
import type { Model } from "../models/index.ts";
import { readMeasurement } from "../quantity/index.ts";
import { readAssignments } from "./assignments.ts";
import { readCorrelation } from "./correlation.ts";

/** `--share wexe`, or `--share "wexe±0.5"` for constants alike to half a wavenumber; null without one. @throws InputError */
export function readShare(settings: Settings): Share | null {
  const setting = settings.get("share");
  if (setting === undefined) return null;
  const [, key = "", spread] = /^\s*([a-z]\w*)\s*(?:(?:±|\+\/?-)\s*(.+))?$/i.exec(setting.value) ?? [];
  const read = spread === undefined ? null : readMeasurement(spread);
  if (key !== "" && (read === null || (read.ok && read.value > 0)))
    return { key: key.toLowerCase(), spread: read?.ok === true ? read.value : 0 };
  throw new InputError([
    {
      code: "share",
      place: setting.place,
      what: `"${setting.value}" names no constant to share`,
      mend: 'write one constant, such as --share wexe, or "wexe±0.5" if it may differ by so much (standard deviation)',
    },
  ]);
}

/** `--compare "we=2990.9463(5) wexe=52.8186(9)"` with `--correlation`; null without it. @throws InputError */
export function readGiven(settings: Settings, { constants, name }: Model): GivenConstants | null {
  const setting = settings.get("compare");
  if (setting === undefined) return null;
  const faults: Fault[] = [];
  const fault = (what: string, mend: string) => faults.push({ code: "compare", place: setting.place, what, mend });
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
  const r = readCorrelation(settings.get("correlation")?.value, keys.length);
  const covariance = sigmas.every((sigma) => sigma === null)
    ? null
    : sigmas.map((a, i) => sigmas.map((b, j) => (r?.[i]?.[j] ?? Number(i === j)) * (a ?? 0) * (b ?? 0)));
  return { keys, values: given.map(([one]) => one!.value), covariance };
}
