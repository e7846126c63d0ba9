/**
 * A number with its standard uncertainty (k = 1) and its 95 % interval, in `unit`.
 * Uncertainty and interval are null where the data do not determine them.
 */
export interface Quantity {
  readonly value: number;
  readonly standardUncertainty: number | null;
  readonly interval95: readonly [number, number] | null;
  readonly unit: string;
  /** An interval at another level, when one was asked for. */
  readonly interval?: { readonly coverage: number; readonly bounds: readonly [number, number] | null };
}
