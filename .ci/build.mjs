// Bundles the command and the library into dist/, so that the only run-time dependency is the canvas.
import { spawnSync } from "node:child_process";
import { chmodSync, copyFileSync, mkdirSync, readFileSync, rmSync, writeFileSync } from "node:fs";
import { createRequire } from "node:module";
import { dirname, join } from "node:path";
import { fileURLToPath } from "node:url";
import { build, transform } from "esbuild";
import { notices } from "./notices.mjs";

const root = dirname(dirname(fileURLToPath(import.meta.url)));
const require = createRequire(import.meta.url);
process.chdir(root);

/** chartjs-node-canvas asks for `canvas` through a helper that bundlers cannot see; @napi-rs/canvas stands in for it. */
const canvasStandIn = {
  name: "canvas-stand-in",
  setup(bundler) {
    const contents = 'exports.freshRequire = () => require("@napi-rs/canvas/node-canvas");';
    bundler.onLoad({ filter: /chartjs-node-canvas.dist.freshRequire\.js$/ }, () => ({ contents }));
    bundler.onResolve({ filter: /^canvas$/ }, () => ({ path: "@napi-rs/canvas/node-canvas", external: true }));
  },
};

/** What the command needs only sometimes: each a file of its own, so that a plain fit does not have to read it. */
const parts = {
  csv: "csv-parse/sync",
  toml: "smol-toml",
  "levenberg-marquardt": "ml-levenberg-marquardt",
  render: "./src/reporting/figures/render.ts",
};

const apart = {
  name: "apart",
  setup(bundler) {
    const places = new Map(Object.entries(parts).map(([name, module]) => [module.split("/figures/").at(-1), name]));
    const filter = /^(csv-parse\/sync|smol-toml|ml-levenberg-marquardt|\.\/render\.ts)$/;
    bundler.onResolve({ filter }, ({ path, kind }) =>
      kind === "entry-point"
        ? undefined
        : { path: `./parts/${places.get(path.replace("./", ""))}.cjs`, external: true },
    );
    // commander loads it for commands that are programs of their own, which there are none of; it costs a tenth of a start.
    bundler.onResolve({ filter: /^node:child_process$/ }, () => ({ path: "none", namespace: "nothing" }));
    bundler.onLoad({ filter: /.*/, namespace: "nothing" }, () => ({ contents: "module.exports = {}" }));
  },
};

/** Tables go in as JSON text: V8 parses that faster than it compiles, or restores from its cache, thousands of literals. */
const tables = {
  name: "tables",
  setup(bundler) {
    bundler.onLoad({ filter: /\.data\.ts$/ }, async ({ path }) => {
      const { code } = await transform(readFileSync(path, "utf8"), { loader: "ts", format: "esm" });
      const values = await import(`data:text/javascript,${encodeURIComponent(code)}`);
      const lines = Object.entries(values).map(([name, value]) => {
        const json = JSON.stringify(value);
        return `export const ${name} = JSON.parse(${JSON.stringify(json)});`;
      });
      return { contents: lines.join("\n") };
    });
  },
};

const common = {
  bundle: true,
  platform: "node",
  target: "node20.12",
  minify: true,
  legalComments: "none",
  metafile: true,
  external: ["@napi-rs/canvas"],
};
/** The command starts faster as CommonJS. */
const command = {
  ...common,
  format: "cjs",
  outExtension: { ".js": ".cjs" },
  define: { "import.meta.url": "bundleUrl" },
  // import() of a part becomes require(): the command runs as a script, which has no loader of modules.
  supported: { "dynamic-import": false },
  banner: { js: 'const bundleUrl=require("node:url").pathToFileURL(__filename).href;' },
};

rmSync("dist", { recursive: true, force: true });
const builds = [];
builds.push(
  await build({ ...command, entryPoints: { command: "src/cli/main.ts" }, outdir: "dist", plugins: [apart, tables] }),
);
builds.push(await build({ ...command, entryPoints: parts, outdir: "dist/parts", plugins: [canvasStandIn] }));
builds.push(
  await build({
    ...common,
    entryPoints: { index: "src/index.ts" },
    outdir: "dist/library",
    format: "esm",
    splitting: true,
    chunkNames: "[name]-[hash]",
    banner: {
      js: 'import{createRequire as bundledRequire}from"node:module";const require=bundledRequire(import.meta.url);',
    },
    plugins: [canvasStandIn, tables],
  }),
);
// The bundler escapes all but regular expressions; ASCII alone can be read without decoding.
const script = readFileSync("dist/command.cjs", "utf8");
const escaped = (character) => `\\u${character.charCodeAt(0).toString(16).padStart(4, "0")}`;
writeFileSync("dist/command.cjs", script.replace(/[^\0-\x7f]/g, escaped));
copyFileSync(".ci/start.cjs", "dist/rungwise.cjs");
chmodSync("dist/rungwise.cjs", 0o755);

mkdirSync("dist/fonts", { recursive: true });
const arimo = dirname(require.resolve("@expo-google-fonts/arimo/package.json"));
copyFileSync(join(arimo, "400Regular/Arimo_400Regular.ttf"), "dist/fonts/Arimo-Regular.ttf");
copyFileSync(join(arimo, "400Regular_Italic/Arimo_400Regular_Italic.ttf"), "dist/fonts/Arimo-Italic.ttf");
writeFileSync(
  "dist/THIRD-PARTY-NOTICES.md",
  notices(
    builds.map(({ metafile }) => metafile),
    ["node_modules/@expo-google-fonts/arimo"],
  ),
);
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
spawnSync(process.execPath, [".ci/cache.cjs"], { stdio: "ignore" });
const { status } = spawnSync(process.execPath, [tsc, "-p", ".ci/types.json", ...types], { stdio: "inherit" });
process.exitCode = status ?? 1;
