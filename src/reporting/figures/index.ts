export type { FigureSpec } from "./figure-spec.ts";
export { figuresFor } from "./figures-for.ts";
export { type FigureAssets, shippedFonts } from "./font-files.ts";
export type { FigureOptions } from "./options.ts";
export { renderFigures } from "./render-figures.ts";
