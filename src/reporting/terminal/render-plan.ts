import type { Plan, PlannedBand } from "../../analysis/index.ts";
import type { TableData } from "../table-data.ts";
import { LASER_LINE } from "../tables/index.ts";
import { fixed, measured, quantity, size } from "../text/cells.ts";
import { unitSymbol } from "../text/units.ts";
import { paintWith } from "./paint.ts";
import { section } from "./section.ts";

/** Bands to measure next, the best first, for a terminal; ends with a newline. */
export function renderPlan(
  { series }: { readonly series: readonly Plan[] },
  { colour }: { readonly colour: boolean },
): string {
  const paint = paintWith(colour);
  return `${series.map((plan) => section(`${plan.name}: ${aimText(plan)}`, [planTable(plan), LASER_LINE], paint)).join("\n\n")}\n`;
}

function aimText({ aim, now }: Plan): string {
  const value = `${quantity(now)} ${unitSymbol(now.unit)}`;
  if (aim === "model") return `telling the models apart, next constant ${value} now`;
  return `${aim === "d0" ? "D0" : aim} = ${value} now`;
}

function planTable({ candidates, aim, now, scattered }: Plan): TableData {
  const apart = aim === "model";
  const margin = candidates[0]?.lastBandOut ?? null;
  return {
    columns: [
      { quantity: "band", align: "left" },
      { quantity: "look at", unit: "cm-1", align: "point" },
      { quantity: "λ vacuum", unit: "nm", align: "point" },
      { quantity: "σ new", unit: "cm-1", align: "point" },
      ...(apart ? [{ quantity: "apart / u", align: "point" } as const] : []),
      { quantity: "u after", unit: now.unit, align: "point" },
      { quantity: "gain", align: "point" },
    ],
    rows: candidates.map((band) => ({
      cells: [
        band.observed ? `${band.label} again` : band.label,
        quantity(band.position),
        measured(band.vacuumWavelength, wavelengthUncertainty(band)),
        size(band.sigmaNew),
        ...(apart ? [fixed(band.separation, 1)] : []),
        size(band.uncertaintyAfter),
        fixed(Math.min(band.gain, 1e6), 2),
      ],
    })),
    notes: [
      ...(apart
        ? [
            "Apart: how far the band lies off the smaller model if the larger one is true, over the uncertainty of that difference.",
          ]
        : []),
      ...(scattered ? ["λ: of the scattered light."] : []),
      "Gain: uncertainty now over that with this one band added; the uncertainties are those of the model being right.",
      ...(margin === null
        ? []
        : [
            `Look within twice ${size(margin)} cm⁻¹ of a position beyond the last band: by that the same model misses the highest band when it is left out.`,
          ]),
    ],
  };
}

/** |dλ/dν̃| = λ² for light of vacuum wavelength λ, which is that of a Raman shift too. */
function wavelengthUncertainty({ vacuumWavelength, position: { standardUncertainty: u } }: PlannedBand): number | null {
  return u === null ? null : (u * vacuumWavelength ** 2) / 1e7;
}
