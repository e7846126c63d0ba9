import { readdirSync, readFileSync } from "node:fs";
import { join } from "node:path";
import { describe, expect, it } from "vitest";

/** Top to bottom, as in DEVELOPERS.md: a folder imports only folders above it. */
const ORDER = [
  "messages",
  "quantity",
  "species",
  "bands",
  "fitting",
  "models",
  "analysis",
  "reporting",
  "commands",
  "cli",
];

const files = readdirSync("src", { recursive: true, encoding: "utf8" }).filter((file) => file.endsWith(".ts"));
const importsOf = (file: string) =>
  [...readFileSync(join("src", file), "utf8").matchAll(/(?:from|import\()\s*"(\.[^"]+)"/g)].map((found) =>
    new URL(found[1]!, `file:///${file}`).pathname.slice(1),
  );

describe("layering", () => {
  it("knows every folder of src", () => {
    expect(new Set(files.filter((f) => f.includes("/")).map((f) => f.split("/")[0]))).toEqual(new Set(ORDER));
  });

  it.each(files)("%s imports only folders above it", (file) => {
    const own = ORDER.indexOf(file.split("/")[0]!);
    const below = importsOf(file).filter(
      (target) => target.includes("/") && own >= 0 && ORDER.indexOf(target.split("/")[0]!) > own,
    );
    expect(below).toEqual([]);
  });

  it.each(files.filter((f) => f.endsWith("index.ts")))("%s holds re-exports only", (file) => {
    const statements = readFileSync(join("src", file), "utf8")
      .replace(/\/\*[\s\S]*?\*\//g, "")
      .split(/;\s*/)
      .filter((line) => line.trim() !== "");
    expect(statements.filter((line) => !/^\s*export (type )?(\*|\{)[\s\S]* from "/.test(line))).toEqual([]);
  });
});
