// Writes src/analysis/empirical/wells.data.ts and, with --docs, docs/empirical-error.{md,png}. Development only:
//   node datasets/wells/generate.mjs [--docs]
import { mkdtempSync, rmSync, writeFileSync } from "node:fs";
import { join } from "node:path";
import { fileURLToPath, pathToFileURL } from "node:url";
import { build } from "esbuild";

const root = fileURLToPath(new URL("../../", import.meta.url));
const folder = join(root, "datasets/wells");

/** chartjs-node-canvas asks for `canvas` through a helper that bundlers cannot see; @napi-rs/canvas stands in for it. */
const canvasStandIn = {
  name: "canvas-stand-in",
  setup(bundler) {
    bundler.onResolve({ filter: /^canvas$/ }, () => ({ path: "@napi-rs/canvas/node-canvas", external: true }));
  },
};

/** Bundle one TypeScript module of this folder, load it, and hand it over. */
async function load(entry) {
  const place = mkdtempSync(join(root, "node_modules/.wells-"));
  try {
    const outfile = join(place, "bundle.mjs");
    await build({
      entryPoints: [join(folder, entry)],
      outfile,
      bundle: true,
      format: "esm",
      platform: "node",
      logLevel: "warning",
      banner: {
        js: 'import{createRequire as bundledRequire}from"node:module";const require=bundledRequire(import.meta.url);',
      },
      external: ["@napi-rs/canvas"],
      plugins: [canvasStandIn],
    });
    return await import(pathToFileURL(outfile).href);
  } finally {
    rmSync(place, { recursive: true, force: true });
  }
}

const { readWells, tableModule } = await load("build.ts");
const wells = readWells(folder);
writeFileSync(join(root, "src/analysis/empirical/wells.data.ts"), tableModule(wells));

if (process.argv.includes("--docs")) {
  // loaded after the table is written, since it works with that
  const { page } = await load("page.ts");
  writeFileSync(join(root, "docs/empirical-error.md"), page(wells));
  const { drawFigure } = await load("draw.ts");
  await drawFigure(wells, join(root, "docs"));
}
