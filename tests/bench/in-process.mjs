// Bundles the analysis once and times it inside this process.
import { mkdirSync } from "node:fs";
import { resolve } from "node:path";
import { pathToFileURL } from "node:url";
import { build } from "esbuild";

const source = `
import { analyse } from "./src/analysis/index.ts";
import { gather } from "./src/commands/gather.ts";
import { fit } from "./src/commands/fit.ts";
import { findModel } from "./src/models/index.ts";
const request = { series: "2885.9775 5667.9841 8346.7821 10922.803 13396.19 15768", bond: "1H 35Cl" };
export async function measure() {
  const plain = await gather(request);
  const work = ({ series, options }, count) => {
    for (let i = 0; i < count; i++) analyse(series[0], options.model, options.analysis);
  };
  work(plain, 3000);
  const rounds = Array.from({ length: 9 }, () => {
    const start = performance.now();
    work(plain, 1000);
    return performance.now() - start;
  }).sort((a, b) => a - b);
  const drawn = await gather({ ...request, intervals: "resample", resamples: 10000 });
  const before = process.cpuUsage();
  work(drawn, 1);
  const { user, system } = process.cpuUsage(before);
  const seconds = async (model, options, p, upTo) => {
    const levels = (await findModel(model)).manifold({ terms: null, fixed: {}, ...options }).levels(p, upTo);
    // Thirty levels spread over all blocks, with half a wavenumber of regular noise.
    const some = levels.filter((_, i) => i % Math.max(1, Math.floor(levels.length / 30)) === 0).slice(-30);
    const bands = some.map(({ label, energy }, i) => label + " " + (energy + 0.5 * Math.sin(7 * i)).toFixed(4)).join(", ");
    const start = performance.now();
    await fit({ bands, model, ...options, sigma: 0.5, upTo });
    return (performance.now() - start) / 1000;
  };
  const threeBonds = await seconds("coupled", { bonds: 3 }, [2200, 38.5, -3.7], 8);
  const fourBonds = await seconds("coupled", { bonds: 4 }, [2256, 34, -0.55], 6);
  const polyads = await seconds("polyad", {}, [3086, 1370, -64, -5, -24, 5, 100], 5);
  return { threeBonds, fourBonds, polyads, microsecondsPerSeries: rounds[4], resampleCpuSeconds: (user + system) / 1e6 };
}`;

/** Median time of a full result, and the CPU time of one fit with 10 000 resamples. */
export async function buildBench() {
  const out = resolve("node_modules/.rungwise/bench.mjs");
  mkdirSync(resolve("node_modules/.rungwise"), { recursive: true });
  await build({
    stdin: { contents: source, resolveDir: process.cwd(), loader: "ts" },
    outfile: out,
    bundle: true,
    format: "esm",
    platform: "node",
    banner: {
      js: 'import{createRequire as bundledRequire}from"node:module";const require=bundledRequire(import.meta.url);',
    },
  });
  return (await import(pathToFileURL(out).href)).measure();
}
