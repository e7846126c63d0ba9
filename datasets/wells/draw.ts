import { writeFileSync } from "node:fs";
import { shippedFonts } from "../../src/reporting/figures/font-files.ts";
import { renderFigure } from "../../src/reporting/figures/render.ts";
import { figure } from "./figure.ts";
import type { WellFile } from "./read-well.ts";

/** Write the picture into a folder. */
export async function drawFigure(wells: readonly WellFile[], folder: string): Promise<void> {
  const spec = figure(wells);
  writeFileSync(`${folder}/${spec.name}.png`, await renderFigure(spec, shippedFonts()));
}
