// Measures the budgets: whole commands as ratios to bare node within this run, work in process in microseconds.
// Run after `npm run build`:  node tests/bench/budgets.mjs
import { spawnSync } from "node:child_process";
import { mkdtempSync, rmSync, writeFileSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { buildBench } from "./in-process.mjs";

const folder = mkdtempSync(join(tmpdir(), "rungwise-bench-"));
const command = "dist/rungwise.cjs";
const bands = ["--series", "2885.9775 5667.9841 8346.7821 10922.803 13396.19 15768", "--bond", "1H 35Cl"];

function seconds(words) {
  const start = process.hrtime.bigint();
  const { status, stderr } = spawnSync(process.execPath, words, { stdio: ["ignore", "ignore", "pipe"] });
  if (status !== 0) throw new Error(`${words.join(" ")}: ${stderr}`);
  return Number(process.hrtime.bigint() - start) / 1e9;
}

const median = (xs) => [...xs].sort((a, b) => a - b)[Math.floor(xs.length / 2)];

/** Median of the ratios of neighbouring runs, so that a drifting machine cancels. */
function ratio(words, runs) {
  seconds(words);
  const ratios = [];
  for (let i = 0; i < runs; i++) ratios.push(seconds(words) / seconds(["-e", "0"]));
  return median(ratios);
}

function line(what, value, unit, budget) {
  const verdict = value <= budget ? "met" : "MISSED";
  console.log(`${what.padEnd(46)} ${value.toFixed(2).padStart(9)} ${unit.padEnd(14)} budget ${budget} (${verdict})`);
}

try {
  line("fit, 6 bands with --bond", ratio([command, "fit", ...bands], 31), "x bare node", 1.5);
  const report = [command, "report", ...bands, "--out", join(folder, "report"), "--force"];
  line("report with all figures, 85 mm", ratio(report, 11), "x bare node", 12);
  const inProcess = await buildBench();
  line("full result in process", inProcess.microsecondsPerSeries, "µs", 100);
  line("10 000 resamples of a linear fit", inProcess.resampleCpuSeconds, "s CPU", 0.2);
  line("three coupled bonds to V = 8, 30 levels", inProcess.threeBonds, "s", 1);
  line("four coupled bonds to V = 6, 30 levels", inProcess.fourBonds, "s", 1);
  line("polyads to N = 5, 30 levels", inProcess.polyads, "s", 1);
  const many = join(folder, "many.csv");
  const rows = Array.from({ length: 10_000 }, (_, i) =>
    [1, 2, 3, 4, 5, 6].map((v) => `s${i},${v}-0,${(3800 + i / 100) * v - 80 * v * (v + 1)}`).join("\n"),
  );
  writeFileSync(many, `series,band,position\n${rows.join("\n")}\n`);
  line("10 000 series in one file, --json", seconds([command, "fit", many, "--json", "--quiet"]), "s", 5);
} finally {
  rmSync(folder, { recursive: true, force: true });
}
