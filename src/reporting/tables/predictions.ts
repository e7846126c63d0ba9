import type { Prediction } from "../../analysis/index.ts";
import { notDetermined, type Quantity } from "../../quantity/index.ts";
import type { Column, TableData } from "../table-data.ts";
import { ends, exact, fixed, measured, quantity, size } from "../text/cells.ts";

/** Beside predicted wavelengths, because light is set by them. */
export const LASER_LINE =
  "These wavelengths are predictions; choose and run lasers under local laser-safety rules and licensed practice.";

/** Predicted bands; those already observed are left out unless there are no others or `withObserved` asks for them. */
export function predictionsTable(all: readonly Prediction[], withObserved = false): TableData {
  const fresh = all.filter(({ observed }) => !observed);
  const shown = fresh.length > 0 && !withObserved ? fresh : all;
  const mark = withObserved && fresh.length < all.length;
  const other = shown.find(({ position }) => position.interval !== undefined)?.position.interval?.coverage ?? null;
  const interval = (bounds: readonly [string, string] | null) =>
    bounds === null ? notDetermined : `${bounds[0]} to ${bounds[1]}`;
  return {
    columns: [
      { quantity: "band", align: "left" },
      { quantity: "position", unit: "cm-1", align: "point" },
      { quantity: "95 % interval", unit: "cm-1", align: "interval", reportOnly: true },
      ...(other === null
        ? []
        : [{ quantity: `${exact(100 * other)} % interval`, unit: "cm-1", align: "interval" } satisfies Column]),
      { quantity: "last band out", unit: "cm-1", align: "point" },
      { quantity: "λ vacuum", unit: "nm", align: "point" },
      { quantity: "λ air", unit: "nm", align: "point" },
      ...(mark ? [{ quantity: "", align: "left" } satisfies Column] : []),
    ],
    rows: shown.map(({ label, position, lastBandOut, vacuumWavelength, airWavelength, observed }) => ({
      cells: [
        label,
        position.standardUncertainty === null ? fixed(position.value, 2) : quantity(position),
        interval(ends(position, position.interval95)),
        ...(other === null ? [] : [interval(ends(position, position.interval?.bounds ?? null))]),
        size(lastBandOut),
        wavelength(vacuumWavelength, position),
        wavelength(airWavelength, position),
        ...(mark ? [observed ? "observed" : ""] : []),
      ],
    })),
    notes: predictionNotes(shown, mark),
  };
}

/** A wavelength with the uncertainty of its wavenumber carried over: u(λ) = λ·u(ν̃)/ν̃. */
function wavelength(nm: number | null, { value, standardUncertainty: u }: Quantity): string {
  return nm === null || u === null ? fixed(nm, 3) : measured(nm, (nm * u) / value);
}

function predictionNotes(shown: readonly Prediction[], mark: boolean): string[] {
  const notes: string[] = [];
  if (shown.length === 0) return notes;
  if (!mark && shown.every(({ observed }) => observed))
    notes.push("All of these were observed; nothing lies beyond them.");
  if (shown.some(({ lastBandOut }) => lastBandOut !== null))
    notes.push(
      "Last band out: how far the same model misses the highest observed band when that is left out; twice it is the more honest margin.",
    );
  else notes.push("Last band out —: there is no band to leave out, or the others do not determine the constants.");
  if (shown.some(({ position }) => position.standardUncertainty === null))
    notes.push("Positions stand without uncertainty: none can be had for the constants.");
  if (shown.some(({ airWavelength }) => airWavelength === null))
    notes.push("λ air —: the dispersion of air is not known below 230 nm.");
  return notes;
}
