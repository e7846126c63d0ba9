import { readVibrationalLabel, type Series, vibrationalLabelFault } from "../../bands/index.ts";
import type { Fault } from "../../messages/index.ts";
import type { ModelOptions } from "../model.ts";

/** A limit with an uncertainty may lie this many of them below a level. */
const MARGIN = 2;

/** Everything wrong with a series for this model: labels, levels that do not rise or lie above a given limit, constants without masses. */
export function nearLimitFaults(series: Series, options: ModelOptions): Fault[] {
  const labels = series.bands.flatMap((band) => vibrationalLabelFault(band) ?? []);
  return [
    ...labels,
    ...aboveLimit(series, options),
    ...aboveLimitNumber(series, options),
    ...withoutMass(series, options),
  ];
}

function aboveLimit({ bands }: Series, { fixed }: ModelOptions): Fault[] {
  const limit = fixed.d;
  if (limit === undefined) return [];
  const highest = limit.value + MARGIN * (limit.sigma ?? 0);
  return bands
    .filter((band) => band.use && readVibrationalLabel(band.label)?.lower === 0 && band.position >= highest)
    .map((band) => ({
      code: "above-limit",
      place: { ...band.place, column: band.place.column ?? "position" },
      what: `${band.label} at ${band.position} cm-1 does not lie below the given limit of ${limit.value} cm-1`,
      mend: "count both from the same v = 0, mend the position or the limit, or mark the level use: no if it lies behind a barrier",
    }));
}

function aboveLimitNumber({ bands }: Series, { fixed }: ModelOptions): Fault[] {
  const limit = fixed.vd;
  if (limit === undefined || limit.sigma !== null) return [];
  return bands
    .filter((band) => band.use && (readVibrationalLabel(band.label)?.upper ?? 0) >= limit.value)
    .map((band) => ({
      code: "above-limit",
      place: { ...band.place, column: band.place.column ?? "band" },
      what: `${band.label} goes to a level that does not lie below the given vD = ${limit.value}`,
      mend: "mend the label or vD",
    }));
}

function withoutMass({ bond, name }: Series, { fixed }: ModelOptions): Fault[] {
  const place = { source: name };
  if (bond === null && fixed.cn !== undefined)
    return [
      {
        code: "no-mass",
        place,
        what: "Cn is given, but no masses: it acts on the levels through the reduced mass",
        mend: 'give --bond "127I 127I" or --reduced-mass 63.452',
      },
    ];
  if (bond !== null && fixed.hn !== undefined)
    return [
      {
        code: "hn-with-mass",
        place,
        what: "Hn is given where masses are known: Cn stands in its place",
        mend: "give the coefficient with --cn, or leave the masses out",
      },
    ];
  return [];
}
