// The main job on the demo series: fits both bonds and leaves a report in reports/demo.
import { spawnSync } from "node:child_process";
import { dirname } from "node:path";
import { fileURLToPath } from "node:url";

const root = dirname(dirname(fileURLToPath(import.meta.url)));
const demo = ["report", "datasets/demo/bonds-a-and-b.csv", "--out", "reports/demo", "--force"];
const { status } = spawnSync(process.execPath, ["dist/rungwise.cjs", ...demo], { cwd: root, stdio: "inherit" });
process.exitCode = status ?? 1;
