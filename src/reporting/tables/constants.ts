import type { SeriesResult } from "../../analysis/index.ts";
import { notDetermined } from "../../quantity/index.ts";
import { type Symbols, symbolOf } from "../symbols.ts";
import type { Column, TableData } from "../table-data.ts";
import { ends, exact, fixed, quantity } from "../text/cells.ts";
import { andList } from "../text/lists.ts";
import { quotient } from "../text/units.ts";
import { intervalNote } from "./interval-note.ts";

const interval = (bounds: readonly [string, string] | null) =>
  bounds === null ? notDetermined : `${bounds[0]} to ${bounds[1]}`;

/** Constants with standard uncertainty and intervals. */
export function constantsTable(series: SeriesResult, symbols: Symbols): TableData {
  const entries = Object.entries(series.constants);
  const other = entries.find(([, q]) => q.interval !== undefined)?.[1].interval?.coverage ?? null;
  const units = new Set(entries.map(([, q]) => q.unit));
  // Constants of different units carry them in their own row.
  const unit = units.size > 1 ? {} : { unit: entries[0]?.[1].unit ?? "cm-1" };
  const columns: Column[] = [
    { quantity: "constant", align: "left" },
    { quantity: "value", ...unit, align: "point" },
    { quantity: "95 % interval", ...unit, align: "interval" },
    ...(other === null
      ? []
      : [{ quantity: `${exact(100 * other)} % interval`, ...unit, align: "interval" } satisfies Column]),
  ];
  const rows = entries.map(([key, q]) => {
    const held = series.held.includes(key);
    return {
      cells: [
        units.size > 1 && q.unit !== "1" ? quotient(symbolOf(symbols, key), q.unit) : symbolOf(symbols, key),
        held ? `${exact(q.value)} (held)` : quantity(q),
        interval(ends(q, q.interval95)),
        ...(other === null ? [] : [interval(ends(q, q.interval?.bounds ?? null))]),
      ],
    };
  });
  return { columns, rows, notes: constantNotes(series, symbols) };
}

function constantNotes(series: SeriesResult, symbols: Symbols): string[] {
  const notes: string[] = [];
  const free = Object.entries(series.constants).filter(([key]) => !series.held.includes(key));
  if (free.some(([, q]) => q.standardUncertainty !== null)) notes.push(intervalNote(series));
  else notes.push("No uncertainty can be had: as many constants as bands and no σ was stated; add a band or state σ.");
  if (series.held.length > 0)
    notes.push(
      `${andList(series.held.map((key) => symbolOf(symbols, key)))} held at the value given, so without uncertainty.`,
    );
  return notes;
}

/** The correlation of two constants as a sentence, of more as a table; null where there is nothing to correlate. */
export function correlation(series: SeriesResult, symbols: Symbols): TableData | string | null {
  if (series.correlation === null || series.correlation.order.length < 2) return null;
  const { order, matrix } = series.correlation;
  const names = order.map((key) => symbolOf(symbols, key));
  if (order.length === 2) return `Correlation of ${names[0]} and ${names[1]}: ${fixed(matrix[0]![1]!, 4)}`;
  return {
    columns: [
      { quantity: "correlation", align: "left" },
      ...names.slice(0, -1).map((name) => ({ quantity: name, align: "point" }) satisfies Column),
    ],
    rows: names.slice(1).map((name, i) => ({
      cells: [name, ...names.slice(0, -1).map((_, j) => (j <= i ? fixed(matrix[i + 1]![j]!, 4) : ""))],
    })),
    notes: [],
  };
}
