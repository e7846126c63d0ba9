import type { Place } from "../messages/index.ts";
import type { Settings } from "./settings.ts";

/** Columns of a band table, in any order and case. */
export const columnNames = [
  "band",
  "upper",
  "lower",
  "position",
  "unit",
  "medium",
  "sigma",
  "sigma_unit",
  "series",
  "isotopologue",
  "phase",
  "group",
  "companion",
  "ratio",
  "use",
  "note",
] as const;

export type ColumnName = (typeof columnNames)[number];

/** One row as written: only cells that hold something. */
export interface RawRow {
  readonly cells: Readonly<Partial<Record<ColumnName, string>>>;
  readonly place: Place;
}

/** What a file holds before it is understood. */
export interface RawInput {
  readonly settings: Settings;
  readonly rows: readonly RawRow[];
}
