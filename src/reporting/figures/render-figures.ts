import type { FigureSpec } from "./figure-spec.ts";
import { type FigureAssets, shippedFonts } from "./font-files.ts";

/** Draw figures as PNG. The drawing stack is loaded here and nowhere else; the files are encoded side by side. */
export async function renderFigures(
  figures: readonly FigureSpec[],
  assets: FigureAssets = shippedFonts(),
): Promise<Uint8Array[]> {
  const { renderFigure } = await import("./render.ts");
  return Promise.all(figures.map((figure) => renderFigure(figure, assets)));
}
