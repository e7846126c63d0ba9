import { existsSync } from "node:fs";
import { createRequire } from "node:module";
import { fileURLToPath } from "node:url";

/** Paths of the font files: Arimo Regular and Italic, TrueType. */
export interface FigureAssets {
  readonly regularFont: string;
  readonly italicFont: string;
}

/** The fonts that ship with the package, beside or above the bundled code; in a checkout those of the package they come from. */
export function shippedFonts(): FigureAssets {
  for (const folder of ["./fonts/", "../fonts/"]) {
    const [regularFont, italicFont] = ["Arimo-Regular.ttf", "Arimo-Italic.ttf"].map((name) =>
      fileURLToPath(new URL(`${folder}${name}`, import.meta.url)),
    ) as [string, string];
    if (existsSync(regularFont) && existsSync(italicFont)) return { regularFont, italicFont };
  }
  const { resolve } = createRequire(import.meta.url);
  return {
    regularFont: resolve("@expo-google-fonts/arimo/400Regular/Arimo_400Regular.ttf"),
    italicFont: resolve("@expo-google-fonts/arimo/400Regular_Italic/Arimo_400Regular_Italic.ttf"),
  };
}
