import type { Warning } from "../messages/index.ts";
import { interval, type Quantity } from "../quantity/index.ts";
import type { Solution } from "./solution.ts";

/** The accepted D0 as a quantity, and a warning when the observed levels contradict it. */
export function acceptedD0({ options, used, model }: Solution): { accepted: Quantity | null; warnings: Warning[] } {
  if (options.accepted === null) return { accepted: null, warnings: [] };
  const { value, sigma } = options.accepted;
  const accepted: Quantity = {
    value,
    standardUncertainty: sigma,
    interval95: sigma === null ? null : interval(value, sigma, 0.95, null),
    unit: "cm-1",
  };
  const above = used.filter((band) => model.levels(band.label).lower === 0 && band.position > value);
  const highest = above.reduce<(typeof used)[number] | null>(
    (best, band) => (best === null || band.position > best.position ? band : best),
    null,
  );
  if (highest === null) return { accepted, warnings: [] };
  return {
    accepted,
    warnings: [
      {
        code: "accepted-below-levels",
        message: `the accepted D0 of ${value} cm-1 lies below the observed level of ${highest.label} at ${highest.position} cm-1: one of the two is wrong, or of another state; check the unit (cm-1 unless written) and the label`,
        about: highest.label,
      },
    ],
  };
}
