// Bundles the analysis once and times it inside this process.
import { mkdirSync } from "node:fs";
import { resolve } from "node:path";
import { pathToFileURL } from "node:url";
import { build } from "esbuild";

const source = `
import { analyse } from "./src/analysis/index.ts";
import { gather } from "./src/commands/gather.ts";
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
  return { microsecondsPerSeries: rounds[4], resampleCpuSeconds: (user + system) / 1e6 };
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
