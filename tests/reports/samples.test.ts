import { spawnSync } from "node:child_process";
import { readdirSync, readFileSync } from "node:fs";
import { join } from "node:path";
import { beforeAll, describe, expect, it } from "vitest";
import { emptyFolder } from "../cli/run.ts";

const fresh = emptyFolder();
const names = ["co", "hcl", "two-bonds"];
const filesOf = (folder: string) =>
  readdirSync(folder, { recursive: true, encoding: "utf8" })
    .filter((file) => file.includes("."))
    .sort();

/** Width, height and density of a PNG, from its chunks. */
function head(file: string): number[] {
  const data = readFileSync(file);
  const density = data.indexOf("pHYs", 8, "latin1");
  return [data.readUInt32BE(16), data.readUInt32BE(20), data.readUInt32BE(density + 4)];
}

describe("the sample reports", () => {
  beforeAll(() => {
    const { status } = spawnSync(process.execPath, ["reports/regenerate.mjs", "--into", fresh], { stdio: "inherit" });
    expect(status).toBe(0);
  });

  it.each(names)("%s: the same files, text equal to the byte, figures of the same size and density", (name) => {
    const kept = join("reports", name);
    expect(filesOf(join(fresh, name))).toEqual(filesOf(kept));
    for (const file of filesOf(kept)) {
      const [before, after] = [join(kept, file), join(fresh, name, file)];
      if (file.endsWith(".png")) expect([file, ...head(after)]).toEqual([file, ...head(before)]);
      else expect(readFileSync(after, "utf8")).toBe(readFileSync(before, "utf8"));
    }
  });
});
