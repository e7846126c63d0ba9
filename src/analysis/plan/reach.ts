import type { Warning } from "../../messages/index.ts";
import { boundLevel } from "../bound-level.ts";
import { labelsWithin } from "../near-limit/levels.ts";
import type { Basis } from "./basis.ts";
import type { PlanOptions } from "./types.ts";

/** Levels beyond the last band that are looked at when nothing else is asked, and the highest one from constants alone. */
const BEYOND = 3;
const FROM_CONSTANTS = 6;

/** The bands that exist by the constants, up to the level asked for: overtones, then hot bands. */
export function bandsInReach(
  { model, options: told, used, values }: Basis,
  { upTo, hot }: Pick<PlanOptions, "upTo" | "hot">,
): { readonly labels: readonly string[]; readonly warnings: readonly Warning[] } {
  const last = Math.max(0, ...used.map(({ label }) => model.levels(label).upper));
  const wanted = upTo ?? (last > 0 ? last + BEYOND : FROM_CONSTANTS);
  const highest = boundLevel(model, values) ?? wanted;
  const top = Math.min(wanted, highest);
  const labels = model.labels(top);
  for (let lower = 1; lower <= hot; lower++)
    for (let upper = lower + 1; upper <= top; upper++) labels.push(`${upper}-${lower}`);
  return {
    labels: model.limit === undefined ? labels : labelsWithin(labels, used, model, told, values),
    warnings:
      upTo === null || upTo <= highest
        ? []
        : [
            {
              code: "above-highest-level",
              message: `bands are looked for up to v = ${highest}: these constants have no bound level above it; ask for --up-to ${highest} or less`,
            },
          ],
  };
}
