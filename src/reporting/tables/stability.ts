import type { SeriesResult } from "../../analysis/index.ts";
import { decimalsFor } from "../../quantity/index.ts";
import { type Symbols, symbolOf } from "../symbols.ts";
import type { TableData } from "../table-data.ts";
import { fixed } from "../text/cells.ts";

/** The same model on the lowest bands alone; null when there is only one row, which is the fit itself. */
export function stabilityTable(series: SeriesResult, symbols: Symbols): TableData | null {
  const { stability, constants, dissociation, predictions } = series;
  if (stability.length < 2) return null;
  const last = stability.at(-1)!.next;
  const [first = "we", second = "wexe"] = Object.keys(constants);
  const decimals = (u: number | null | undefined, otherwise: number) => (u ? Math.min(4, decimalsFor(u)) : otherwise);
  const places = {
    we: decimals(constants[first]?.standardUncertainty, 2),
    wexe: decimals(constants[second]?.standardUncertainty, 3),
    d0: decimals(dissociation[0]?.d0?.standardUncertainty, 0),
    next: decimals(predictions.find(({ position }) => position.value === last)?.position.standardUncertainty, 1),
  };
  return {
    columns: [
      { quantity: "lowest bands", align: "right" },
      { quantity: symbolOf(symbols, first), unit: "cm-1", align: "point" },
      { quantity: symbolOf(symbols, second), unit: "cm-1", align: "point" },
      { quantity: "D0, Morse", unit: "cm-1", align: "point" },
      { quantity: "next overtone", unit: "cm-1", align: "point" },
    ],
    rows: stability.map(({ bands, we, wexe, d0, next }) => ({
      cells: [
        String(bands),
        fixed(we, places.we),
        fixed(wexe, places.wexe),
        fixed(d0, places.d0),
        fixed(next, places.next),
      ],
    })),
    notes: stability.some(({ d0 }) => d0 === null) ? ["D0 —: in that row the spacings do not shrink."] : [],
  };
}
