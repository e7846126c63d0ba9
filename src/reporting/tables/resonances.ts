import type { SeriesResult } from "../../analysis/index.ts";
import type { TableData } from "../table-data.ts";
import { fixed, measured } from "../text/cells.ts";

/** Combinations near the overtones, the likeliest first, and the band that would test the first; null where none were looked for. */
export function resonancesTable({ resonances }: Pick<SeriesResult, "resonances">): TableData | null {
  if (resonances === null) return null;
  const { candidates, test, window, standsOut } = resonances;
  return {
    columns: [
      { quantity: "band", align: "left" },
      { quantity: "combination", align: "left" },
      { quantity: "at", unit: "cm-1", align: "point" },
      { quantity: "gap", unit: "cm-1", align: "point" },
      { quantity: "order", align: "right" },
      { quantity: "obs − calc", unit: "cm-1", align: "point" },
    ],
    rows: candidates.map(({ band, state, position, gap, gapUncertainty, order, residual, matched }) => ({
      cells: [
        matched ? `${band} *` : band,
        state,
        fixed(position, 1),
        gapUncertainty === null ? fixed(gap, 1) : measured(gap, gapUncertainty),
        String(order),
        fixed(residual, 2),
      ],
    })),
    notes: [
      `Within ${window} cm⁻¹ of an overtone; harmonic sums, anharmonicity between modes left out. Order: stretch quanta traded and quanta gained; ranked by closeness, each order beyond the third five times weaker.`,
      ...(candidates.length === 0 ? ["None was found: widen --window, or add modes."] : []),
      ...(standsOut === null
        ? []
        : [
            candidates.some(({ matched }) => matched)
              ? `* ${standsOut} stands out in the fit, in the direction this level would push it.`
              : `${standsOut} stands out in the fit, and no candidate would push it that way.`,
          ]),
      ...(test === null
        ? []
        : [
            test.kind === "overtone"
              ? `What would test the first: ${test.label} near ${fixed(test.position, 1)} cm⁻¹, where the same combination lies ${fixed(test.gap, 1)} cm⁻¹ off: if it is right, that band is off more.`
              : `What would test the first: a weak companion of ${test.label} near ${fixed(test.position, 1)} cm⁻¹.`,
          ]),
    ],
  };
}
