import type { CommonError, SeriesResult } from "../../analysis/index.ts";
import { decimalsFor } from "../../quantity/index.ts";
import type { TableData } from "../table-data.ts";
import { exact, fixed, quantity } from "../text/cells.ts";
import { unitSymbol } from "../text/units.ts";

const NAMES = {
  calibration: "calibration of all bands",
  group: "group",
  "per-quantum": "per quantum, growing with v",
  laser: "exciting line",
  mixture: "pull of the natural mixture",
} as const;

/** Errors that bands have in common, with their effect on the bands and, where it was asked for, what the bands say of them; null without any. */
export function commonErrorsTable({ commonErrors }: SeriesResult): TableData | null {
  if (commonErrors.length === 0) return null;
  const fitted = commonErrors.some(({ shift }) => shift !== null);
  return {
    columns: [
      { quantity: "common error", align: "left" },
      { quantity: "standard uncertainty", align: "left" },
      { quantity: "bands", align: "right" },
      { quantity: "effect", unit: "cm-1", align: "interval" },
      ...(fitted ? [{ quantity: "shift from the fit", align: "left" } as const] : []),
    ],
    rows: commonErrors.map((error) => ({
      cells: [
        error.group === null ? NAMES[error.kind] : `${NAMES[error.kind]} ${error.group}`,
        error.kind === "mixture" ? "the pull itself" : `${exact(error.standardUncertainty)} ${unitSymbol(error.unit)}`,
        String(error.bands),
        effect(error),
        ...(fitted ? [error.shift === null ? "" : `${quantity(error.shift)} ${unitSymbol(error.unit)}`] : []),
      ],
    })),
    notes: [
      "Effect: of one standard uncertainty, fully correlated between the bands.",
      ...(fitted ? ["Shift: observed less true; the constants are those with the shifts in place."] : []),
    ],
  };
}

function effect({ effect }: CommonError): string {
  if (effect === null) return "0";
  const decimals = Math.min(6, Math.max(...effect.map((x) => (x === 0 ? 0 : decimalsFor(Math.abs(x))))));
  const [low, high] = effect.map((x) => fixed(x, decimals));
  return low === high ? low! : `${low} to ${high}`;
}
