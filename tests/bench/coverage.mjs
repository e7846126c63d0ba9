// Coverage of 95 % intervals and choice of terms over 2000 synthetic five-band series, the large run behind tests/analysis/coverage.test.ts.
// Run:  node tests/bench/coverage.mjs [series]
import { mkdirSync } from "node:fs";
import { resolve } from "node:path";
import { pathToFileURL } from "node:url";
import { build } from "esbuild";

const count = Number(process.argv[2] ?? 2000);
const source = `
export { analysed, position, synthetic } from "./tests/analysis/synthetic.ts";
export { generator } from "./tests/analysis/ladders.ts";`;
const out = resolve("node_modules/.rungwise/coverage.mjs");
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
const { analysed, position, synthetic, generator } = await import(pathToFileURL(out).href);

const truth = { we: 3870, wexe: 83, weye: 0 };
const levels = [1, 2, 3, 4, 5];
const d0 = truth.we ** 2 / (4 * truth.wexe) - truth.we / 2 + truth.wexe / 4;
const percent = (n, of = count) => `${((100 * n) / of).toFixed(1).padStart(5)} %`;

function coverage(what, stated, options) {
  const next = generator(4).normal;
  const held = [0, 0, 0, 0];
  for (let trial = 0; trial < count; trial++) {
    const errors = levels.map(() => next());
    const r = analysed(synthetic(truth, levels, errors, stated), { terms: 2, upTo: 7, ...options });
    const inside = (bounds, value) => Number(bounds !== null && bounds[0] <= value && value <= bounds[1]);
    held[0] += inside(r.constants.we.interval95, truth.we);
    held[1] += inside(r.constants.wexe.interval95, truth.wexe);
    held[2] += inside(r.dissociation[0].d0.interval95, d0);
    held[3] += inside(r.predictions[6].position.interval95, position(truth, 7));
  }
  console.log(what.padEnd(44), held.map((n) => percent(n)).join("  "));
}

console.log(
  `95 % intervals that hold the truth, ${count} series of five bands${" ".repeat(4)}we       wexe     D0       7-0`,
);
for (const intervals of ["linear", "profile", "resample"])
  coverage(`${intervals}, sigma known`, 1, { intervals, excess: "none" });
for (const excess of ["none", "scatter", "birge"])
  coverage(`linear, sigma stated half, excess ${excess}`, 0.5, { excess });

function share(what, make, right) {
  const next = generator(9).normal;
  let hits = 0;
  for (let trial = 0; trial < count; trial++) {
    const { truth: t = truth, errors } = make(next, trial);
    hits += Number(right(analysed(synthetic(t, levels, errors, 1)), trial));
  }
  console.log(what.padEnd(66), percent(hits));
}

const noise = (next) => levels.map(() => next());
const three = analysed(
  synthetic(
    truth,
    levels,
    levels.map(() => 0),
    1,
  ),
  { terms: 3 },
);
const weye = 5 * three.constants.weye.standardUncertainty;
const off = (next, trial) => ({
  errors: levels.map((_, i) => next() + (i === trial % 4 ? (trial % 8 < 4 ? 10 : -10) : 0)),
});
share(
  "auto picks two terms for a Morse series",
  (next) => ({ errors: noise(next) }),
  (r) => r.terms === 2,
);
share(
  "auto picks three when weye is five standard errors",
  (next) => ({ truth: { ...truth, weye }, errors: noise(next) }),
  (r) => r.terms === 3,
);
share(
  "one of v = 1-4 ten sigma off: the right band is named",
  off,
  (r, trial) => r.warnings.find(({ code }) => code === "band-stands-out")?.about === `${(trial % 4) + 1}-0`,
);
share("the same: no term is added", off, (r) => r.terms === 2);
