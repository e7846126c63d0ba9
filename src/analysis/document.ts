import type { Warning } from "../messages/index.ts";
import type { Quantity } from "../quantity/index.ts";
import type { SeriesResult } from "./result.ts";

/** One constant, or D0, of two series: second less first, cm-1. */
export interface Difference {
  readonly key: string;
  readonly difference: Quantity;
  /** two-sided, of so large a difference by chance; null where no uncertainty can be had, or it is shared */
  readonly probability: number | null;
}

/** Two series side by side, or constants given from elsewhere and a series. */
export interface Comparison {
  readonly first: string;
  readonly second: string;
  readonly differences: readonly Difference[];
  /** errors taken as the same in both */
  readonly commonErrors: readonly string[];
}

/** The document of `fit`. */
export interface FitDocument {
  readonly schemaVersion: 1;
  readonly tool: { readonly name: string; readonly version: string };
  /** the settings as the user gave them, flags over file, long names without dashes */
  readonly request: Readonly<Record<string, string>>;
  /** the file read, or null for flags; sha256 of its bytes */
  readonly input: { readonly source: string; readonly sha256: string } | null;
  /** pairs of up to twelve series, and each series against --compare; empty otherwise */
  readonly comparisons: readonly Comparison[];
  readonly series: readonly SeriesResult[];
  readonly warnings: readonly Warning[];
}
