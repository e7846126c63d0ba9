import type { DissociationRow, SeriesResult } from "../../analysis/index.ts";
import { fromWavenumber, notDetermined, type Quantity } from "../../quantity/index.ts";
import type { Column, TableData } from "../table-data.ts";
import { fixed, measured, quantity } from "../text/cells.ts";
import { methodNames } from "../text/method-names.ts";
import { quotable } from "../text/quotable.ts";

/** Near dissociation energies, once a section. */
export const SAFETY_LINE = "Dissociation energies: not for safety-critical use without an independent value.";

/** Units of the columns: statistical D0 in each, the empirical range where there is room. */
const UNITS = ["cm-1", "kJ/mol", "kcal/mol", "eV"] as const;

/**
 * De and D0 by method with the uncertainty of the fit, and the empirical 80 % range of D0 from known wells; an accepted value as a row of
 * its own. The caution of each row stands below, and a sentence to quote.
 */
export function dissociationTable(series: SeriesResult): TableData {
  const { dissociation, accepted } = series;
  const empirical = dissociation.some((row) => row.empirical != null);
  const range = (row: DissociationRow, unit: (typeof UNITS)[number]) => {
    if (row.empirical == null) return notDetermined;
    const [low, high] = row.empirical.correctedRange.map((x) => fromWavenumber(x, unit));
    const decimals = unit === "eV" ? 2 : 0;
    return `${fixed(low!, decimals)} to ${fixed(high!, decimals)}`;
  };
  const ranges = (unit: (typeof UNITS)[number]): Column[] =>
    empirical
      ? [{ quantity: "D0, empirical 80 %", unit, align: "interval", ...(unit === "cm-1" ? {} : { reportOnly: true }) }]
      : [];
  const rows = dissociation.map((row) => ({
    cells: [
      methodNames[row.method],
      quantity(row.de),
      quantity(row.d0),
      ...(empirical ? [range(row, "cm-1")] : []),
      ...(["kJ/mol", "kcal/mol", "eV"] as const).flatMap((unit) => [
        measured(row.converted?.[unit][0] ?? null, row.converted?.[unit][1] ?? null),
        ...(empirical ? [range(row, unit)] : []),
      ]),
    ],
  }));
  const quote = quotable(series);
  return {
    columns: [
      { quantity: "method", align: "left" },
      { quantity: "De", unit: "cm-1", align: "point" },
      { quantity: "D0", unit: "cm-1", align: "point" },
      ...ranges("cm-1"),
      ...(["kJ/mol", "kcal/mol", "eV"] as const).flatMap((unit): Column[] => [
        { quantity: "D0", unit, align: "point" },
        ...ranges(unit),
      ]),
    ],
    rows: accepted === null ? rows : [...rows, { cells: acceptedCells(accepted, empirical), muted: true }],
    notes: [
      ...(quote === null ? [] : [`To quote: ${quote}`]),
      ...dissociation.flatMap(({ method, d0, note }) =>
        note === null ? [] : [`${methodNames[method]}${d0 === null ? " —" : ""}: ${note}`],
      ),
    ],
  };
}

function acceptedCells({ value, standardUncertainty: u }: Quantity, empirical: boolean): string[] {
  const inUnit = (unit: (typeof UNITS)[number]) =>
    measured(fromWavenumber(value, unit), u === null ? null : fromWavenumber(u, unit));
  const gap = empirical ? [""] : [];
  return [
    "accepted",
    "",
    inUnit("cm-1"),
    ...gap,
    ...(["kJ/mol", "kcal/mol", "eV"] as const).flatMap((unit) => [inUnit(unit), ...gap]),
  ];
}
