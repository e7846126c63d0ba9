export { figuresFor } from "./figures-for.ts";
export type { FigureAssets } from "./font-files.ts";
export { renderFigures } from "./render-figures.ts";
