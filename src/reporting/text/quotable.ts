import type { SeriesResult } from "../../analysis/index.ts";
import { formatMeasured } from "../../quantity/index.ts";
import { methodNames } from "./method-names.ts";

/** One sentence on D0 that can be quoted as it stands, cm-1 as in data; null when there is no D0. */
export function quotable({ dissociation, accepted }: SeriesResult): string | null {
  const headline = dissociation.find(({ d0 }) => d0 !== null);
  if (headline?.d0 == null) return null;
  const { value, standardUncertainty } = headline.d0;
  const print = (x: number, u: number | null = null) => formatMeasured(x, u, { style: "print" });
  const whole = (x: number) => String(Math.round(x));
  const parts = [
    `D0 = ${standardUncertainty === null ? whole(value) : print(value, standardUncertainty)} cm-1 (${methodNames[headline.method]}; ${standardUncertainty === null ? "no uncertainty to be had" : "standard uncertainty of the fit alone"})`,
  ];
  const { empirical } = headline;
  if (empirical !== undefined && empirical !== null) {
    const [low, high] = empirical.correctedRange;
    parts.push(
      `known wells fitted in the same way to ${Math.round(100 * empirical.covered)} % of their depth put it between ${whole(low)} and ${whole(high)} cm-1 (80 %, ${empirical.references} wells, empirical)`,
    );
  }
  if (accepted !== null) {
    const ratio = (value / accepted.value).toFixed(3);
    const inside =
      empirical == null
        ? ""
        : accepted.value >= empirical.correctedRange[0] && accepted.value <= empirical.correctedRange[1]
          ? ", and the accepted value lies in the empirical range"
          : ", and the accepted value lies outside the empirical range";
    parts.push(
      `fitted/accepted = ${ratio} with the accepted ${print(accepted.value, accepted.standardUncertainty)} cm-1${inside}`,
    );
  }
  return `${parts.join("; ")}.`;
}
