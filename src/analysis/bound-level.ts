import type { Model } from "../models/index.ts";
import { turningPoint } from "./turning-point.ts";

/** The highest level that constants leave bound, or null where the spacings do not vanish anywhere. */
export function boundLevel(model: Model, values: readonly number[]): number | null {
  const limit =
    model.well === undefined ? (values[model.limit?.level ?? -1] ?? null) : turningPoint(model.well(values), 0);
  return limit === null ? null : Math.max(0, Math.ceil(limit - 1e-9) - 1);
}
