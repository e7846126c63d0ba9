import type { LevelResult, SeriesResult } from "../../analysis/index.ts";
import type { Column, TableData } from "../table-data.ts";
import { fixed, measured, quantity } from "../text/cells.ts";
import { unitSymbol } from "../text/units.ts";

/** Parts of a level shown in its row. */
const PARTS = 3;

/** Levels of a model whose states mix, with what they are made of; null for other models. */
export function levelsTable(levels: readonly LevelResult[] | null): TableData | null {
  if (levels === null || levels.length === 0) return null;
  const polyads = levels.some(({ N }) => N !== undefined);
  const species = levels.some((level) => level.species !== undefined);
  const columns: Column[] = [
    { quantity: "level", align: "left" },
    ...(species ? [{ quantity: "species", align: "left" } as const] : []),
    { quantity: "degeneracy", align: "right", reportOnly: true },
    { quantity: "energy", unit: "cm-1", align: "point" },
    { quantity: polyads ? "stretch share" : "weight", align: "point" },
    { quantity: polyads ? "states vs,vb" : "local states", align: "left" },
  ];
  return {
    columns,
    rows: levels.map((level) => ({
      cells: [
        level.label,
        ...(species ? [level.species ?? ""] : []),
        String(level.degeneracy),
        measured(level.energy, level.standardUncertainty),
        fixed(level.weight ?? level.stretchShare ?? null, 4),
        composition(level),
      ],
    })),
    notes: [
      polyads
        ? "Energies above the ground state; a level with l > 0 stands once. Stretch share: of the state with the most stretch in its block, for l = 0 the pure overtone, which carries the intensity."
        : "Energies above the ground state; a degenerate level stands once. Weight: of the local state that names the level.",
    ],
  };
}

function composition({ composition: parts }: LevelResult): string {
  const shown = parts.slice(0, PARTS).map(({ state, weight }) => `${state} ${fixed(weight, 2)}`);
  return parts.length > PARTS ? `${shown.join(", ")} …` : shown.join(", ");
}

/** What follows from the constants of such a model; null where nothing does. */
export function consequencesTable({ consequences }: Pick<SeriesResult, "consequences">): TableData | null {
  if (consequences.length === 0) return null;
  return {
    columns: [
      { quantity: "quantity", align: "left" },
      { quantity: "value", align: "point" },
      { quantity: "unit", align: "left" },
    ],
    rows: consequences.map(({ symbol, quantity: q }) => ({
      cells: [symbol, quantity(q), q === null || q.unit === "1" ? "" : unitSymbol(q.unit)],
    })),
    notes: consequences.flatMap(({ symbol, note }) => (note === null ? [] : [`${symbol.split(" =")[0]}: ${note}.`])),
  };
}

/** By how much a reading is off, in words. */
function bias(read: number, truth: number): string {
  const share = read / truth - 1;
  return `the latter ${fixed(Math.abs(share) * 100, 1)} % too ${share < 0 ? "small" : "large"}`;
}

/** Overtones without their neighbours beside the levels that would be read as them; null for models without. */
export function deperturbationTable({ deperturbation }: Pick<SeriesResult, "deperturbation">): TableData | null {
  if (deperturbation === null || deperturbation.overtones.length === 0) return null;
  const { overtones, constants, naive } = deperturbation;
  return {
    columns: [
      { quantity: "v", align: "right" },
      { quantity: "deperturbed", unit: "cm-1", align: "point" },
      { quantity: "strongest level", align: "left" },
      { quantity: "at", unit: "cm-1", align: "point" },
      { quantity: "its stretch share", align: "point" },
      { quantity: "ω̃x if read", unit: "cm-1", align: "point" },
    ],
    rows: overtones.map(({ v, deperturbed, strongest, naive: read }) => ({
      cells: [
        String(v),
        quantity(deperturbed),
        strongest.label,
        fixed(strongest.energy, 2),
        fixed(strongest.share, 4),
        fixed(read?.wx ?? null, 2),
      ],
    })),
    notes: [
      `Deperturbed, ω̃ = ${quantity(constants.w)} and ω̃x = ${quantity(constants.wx)} cm⁻¹.`,
      naive === null
        ? "Fewer than two of the strongest levels were observed, so there is nothing to read as overtones."
        : `The observed strongest levels read as overtones would give ω̃ = ${fixed(naive.w, 2)} and ω̃x = ${fixed(naive.wx, 2)} cm⁻¹, ${bias(naive.wx, constants.wx.value)}: a bias, not a scatter, and De goes with it. Last column: read up to that level.`,
    ],
  };
}
