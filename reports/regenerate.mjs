// Makes the sample reports anew with the built command. Run after `npm run build`:  node reports/regenerate.mjs
// `--into DIR` writes them elsewhere, as the test does that compares them.
import { spawnSync } from "node:child_process";
import { dirname, join } from "node:path";
import { fileURLToPath } from "node:url";

const root = dirname(dirname(fileURLToPath(import.meta.url)));
const at = process.argv.indexOf("--into");
const into = at < 0 ? join(root, "reports") : process.argv[at + 1];

const samples = {
  hcl: ["datasets/hcl-h35cl.csv", "--terms", "2", "--be", "10.593416", "--alpha-e", "0.307181", "--accepted", "35759(5)"],
  "two-bonds": ["datasets/demo/bonds-a-and-b.csv"],
  co: ["datasets/co-12c16o.csv", "--terms", "4"],
};

for (const [name, words] of Object.entries(samples)) {
  const { status } = spawnSync(
    process.execPath,
    [join(root, "dist/rungwise.cjs"), "report", ...words, "--out", join(into, name), "--force", "--quiet"],
    { cwd: root, stdio: ["ignore", "ignore", "inherit"] },
  );
  if (status !== 0) process.exit(status ?? 1);
}
