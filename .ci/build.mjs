// Bundles the command and the library into dist/, so that the only run-time dependency is the canvas.
import { spawnSync } from "node:child_process";
import { chmodSync, copyFileSync, mkdirSync, rmSync } from "node:fs";
import { createRequire } from "node:module";
import { dirname, join } from "node:path";
import { fileURLToPath } from "node:url";
import { build } from "esbuild";

const root = dirname(dirname(fileURLToPath(import.meta.url)));
const require = createRequire(import.meta.url);
process.chdir(root);

/** chartjs-node-canvas asks for `canvas` through a helper that bundlers cannot see; @napi-rs/canvas stands in for it. */
const canvasStandIn = {
  name: "canvas-stand-in",
  setup(bundler) {
    bundler.onResolve({ filter: /^canvas$/ }, () => ({ path: "@napi-rs/canvas/node-canvas", external: true }));
  },
};

rmSync("dist", { recursive: true, force: true });
await build({
  entryPoints: { rungwise: "src/cli/main.ts", index: "src/index.ts" },
  outdir: "dist",
  bundle: true,
  splitting: true,
  format: "esm",
  platform: "node",
  target: "node20.12",
  minify: true,
  keepNames: false,
  legalComments: "none",
  chunkNames: "parts/[name]-[hash]",
  banner: {
    js: 'import{createRequire as bundledRequire}from"node:module";const require=bundledRequire(import.meta.url);',
  },
  external: ["@napi-rs/canvas"],
  plugins: [canvasStandIn],
});
chmodSync("dist/rungwise.js", 0o755);

mkdirSync("dist/fonts", { recursive: true });
const arimo = dirname(require.resolve("@expo-google-fonts/arimo/package.json"));
copyFileSync(join(arimo, "400Regular/Arimo_400Regular.ttf"), "dist/fonts/Arimo-Regular.ttf");
copyFileSync(join(arimo, "400Regular_Italic/Arimo_400Regular_Italic.ttf"), "dist/fonts/Arimo-Italic.ttf");
copyFileSync(join(arimo, "LICENSE_FONT"), "dist/fonts/LICENSE");

const tsc = join(dirname(require.resolve("typescript/package.json")), "bin/tsc");
const types = [
  "--emitDeclarationOnly",
  "--declaration",
  "--noEmit",
  "false",
  "--outDir",
  "dist/types",
  "--rootDir",
  "src",
];
const { status } = spawnSync(process.execPath, [tsc, "-p", ".ci/types.json", ...types], { stdio: "inherit" });
process.exitCode = status ?? 1;
