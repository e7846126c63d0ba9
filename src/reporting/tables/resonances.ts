import type { Resonances, SeriesResult } from "../../analysis/index.ts";
import type { TableData } from "../table-data.ts";
import { fixed, measured } from "../text/cells.ts";

/** Combinations near the overtones, the likeliest first, and the band that would test the first; null where none were looked for. */
export function resonancesTable({ resonances }: Pick<SeriesResult, "resonances">): TableData | null {
  if (resonances === null) return null;
  const { candidates } = resonances;
  const anyMatched = candidates.some(({ matched }) => matched);
  return {
    columns: [
      { quantity: "band", align: "left" },
      { quantity: "combination", align: "left" },
      { quantity: "at", unit: "cm-1", align: "point" },
      { quantity: "gap", unit: "cm-1", align: "point" },
      { quantity: "order", align: "right" },
      { quantity: "obs − calc", unit: "cm-1", align: "point" },
      ...(anyMatched ? [{ quantity: "coupling", unit: "cm-1", align: "point" } as const] : []),
    ],
    rows: candidates.map(({ band, state, position, gap, gapUncertainty, order, residual, matched, coupling }) => ({
      cells: [
        matched ? `${band} *` : band,
        state,
        fixed(position, 1),
        gapUncertainty === null ? fixed(gap, 1) : measured(gap, gapUncertainty),
        String(order),
        fixed(residual, 2),
        ...(anyMatched ? [coupling === null ? "" : fixed(coupling, 1)] : []),
      ],
    })),
    notes: notesOn(resonances, anyMatched),
  };
}

function notesOn({ window, standsOut, without, candidates, test }: Resonances, anyMatched: boolean): string[] {
  const from = without === null ? "" : `, the overtones from the fit without ${without}`;
  const notes = [
    `Within ${window} cm⁻¹ of an overtone; harmonic sums, anharmonicity between modes (some tens of cm⁻¹) and symmetry left out${from}. Order: stretch quanta traded and quanta gained. Ranked by closeness, gaps well below 10 cm⁻¹ alike; the next order must lie five times closer (a rule of thumb).`,
  ];
  if (candidates.length === 0) notes.push("None was found: widen --window, or add modes.");
  if (standsOut !== null)
    notes.push(
      anyMatched
        ? `* ${standsOut} stands out in the fit, in the direction this level would push it; coupling: what would explain its obs − calc, two levels.`
        : `${standsOut} stands out in the fit, and no candidate would push it that way.`,
    );
  const seen = candidates.filter(({ companionGap }) => companionGap !== null);
  for (const label of new Set(seen.map(({ band }) => band))) {
    const [nearest] = seen
      .filter(({ band }) => band === label)
      .sort((a, b) => Math.abs(a.companionGap!) - Math.abs(b.companionGap!));
    const dark = nearest!.position + nearest!.companionGap!;
    notes.push(
      `The companion of ${label} lay at ${fixed(dark, 1)} cm⁻¹ by itself; nearest to that: ${nearest!.state}, at ${fixed(nearest!.position, 1)} cm⁻¹.`,
    );
  }
  if (test === null) return notes;
  const near = `${fixed(test.position, 1)} cm⁻¹`;
  if (test.kind === "overtone")
    notes.push(
      `What would test the first: ${test.label} near ${near}, where the same combination lies ${fixed(test.gap, 1)} cm⁻¹ off: if it is right, that band is off more.`,
    );
  else
    notes.push(
      `What would test the first: a weak companion of ${test.label} near ${near}${test.ratio === null ? "" : `, with about 1/${test.ratio < 10 ? test.ratio.toFixed(1) : test.ratio.toFixed(0)} of its intensity`}.`,
    );
  return notes;
}
