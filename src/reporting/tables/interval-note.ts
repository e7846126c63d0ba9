import type { SeriesResult } from "../../analysis/index.ts";
import { fixed } from "../text/cells.ts";
import { count } from "../text/lists.ts";

/** What the digits in parentheses and the intervals of a series mean, with the coverage factor really used (JCGM 100:2008). */
export function intervalNote(series: SeriesResult): string {
  const { intervalDegreesOfFreedom: dof } = series.quality;
  const known = Object.values(series.constants).find((q) => q.standardUncertainty !== null && q.interval95 !== null);
  const law = dof === null ? "normal distribution" : `Student t, ${count(dof, "degree")} of freedom`;
  if (known === undefined) return "In parentheses: standard uncertainty (k = 1) of the last digits.";
  const k = (known.interval95![1] - known.interval95![0]) / (2 * known.standardUncertainty!);
  return `In parentheses: standard uncertainty (k\u00a0=\u00a01) of the last digits. 95\u00a0%: k\u00a0=\u00a0${fixed(k, 3)} (${law}).`;
}
