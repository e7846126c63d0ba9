import type { SeriesResult } from "../../analysis/index.ts";
import { fromWavenumber, notDetermined, type Quantity } from "../../quantity/index.ts";
import type { TableData } from "../table-data.ts";
import { ends, quantity } from "../text/cells.ts";
import { quotient } from "../text/units.ts";

const ENERGIES = ["kJ/mol", "kcal/mol", "eV"] as const;

/** Numbers that follow from the constants; the head of each row is its own quotient. null for a model without any. */
export function derivedTable({ derived, reducedMass }: SeriesResult): TableData | null {
  if (derived === null) return null;
  const { zeroPointEnergy: zero, highestLevel } = derived;
  const notes: string[] = [];
  const row = (name: string, unit: string, q: Quantity | null) => {
    const bounds = ends(q, q?.interval95 ?? null);
    return {
      cells: [quotient(name, unit), quantity(q), bounds === null ? notDetermined : `${bounds[0]} to ${bounds[1]}`],
    };
  };
  const rows = [
    row("zero-point energy", "cm-1", zero),
    ...ENERGIES.map((unit) => row("zero-point energy", unit, converted(zero, unit))),
    row("force constant", "N/m", derived.forceConstant),
    row("Morse a", "1/Å", derived.morseA),
    row("Y00", "cm-1", derived.y00),
    {
      cells: [
        "highest bound level v",
        highestLevel === null ? notDetermined : String(highestLevel.value),
        highestLevel?.range == null ? notDetermined : `${highestLevel.range[0]} to ${highestLevel.range[1]}`,
      ],
    },
    row("ν̃/v against v: intercept", "cm-1", derived.positionPlotIntercept),
    row("ν̃/v against v: slope", "cm-1", derived.positionPlotSlope),
    row("ΔG against v + ½: intercept", "cm-1", derived.spacingPlotIntercept),
    row("ΔG against v + ½: slope", "cm-1", derived.spacingPlotSlope),
  ];
  if (derived.forceConstant === null) notes.push("Force constant —: no masses are known.");
  if (derived.morseA === null)
    notes.push(`Morse a —: ${reducedMass === null ? "no masses are known" : "the spacings do not shrink"}.`);
  if (derived.y00 === null)
    notes.push("Y00 —: Be (or re) and αe were not given; zero-point energy and De leave it out.");
  if (highestLevel?.range != null)
    notes.push(`Highest bound level: 95 % range ${highestLevel.range[0]} to ${highestLevel.range[1]}.`);
  if (highestLevel === null) notes.push("Highest level —: the spacings of this series do not vanish anywhere.");
  return {
    columns: [
      { quantity: "quantity", align: "left" },
      { quantity: "value", align: "point" },
      { quantity: "95 % interval", align: "interval", reportOnly: true },
    ],
    rows,
    notes,
  };
}

function converted(q: Quantity, unit: (typeof ENERGIES)[number]): Quantity {
  const to = (x: number) => fromWavenumber(x, unit);
  return {
    value: to(q.value),
    standardUncertainty: q.standardUncertainty === null ? null : to(q.standardUncertainty),
    interval95: q.interval95 === null ? null : [to(q.interval95[0]), to(q.interval95[1])],
    unit,
  };
}
