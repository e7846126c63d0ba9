// Installs the locked dependencies when node_modules is missing or older than the lock file; `npm install` might rewrite the lock.
import { spawnSync } from "node:child_process";
import { statSync } from "node:fs";
import { dirname, join } from "node:path";
import { fileURLToPath } from "node:url";

const root = dirname(dirname(fileURLToPath(import.meta.url)));
const time = (name) => statSync(join(root, name), { throwIfNoEntry: false })?.mtimeMs ?? 0;

if (time("node_modules/.package-lock.json") < time("package-lock.json")) {
  const { status } = spawnSync("npm", ["ci", "--include=dev", "--no-audit", "--no-fund"], {
    cwd: root,
    stdio: "inherit",
    shell: process.platform === "win32",
  });
  process.exitCode = status ?? 1;
}
