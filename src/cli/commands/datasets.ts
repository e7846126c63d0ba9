import { readdirSync } from "node:fs";
import { join, relative, sep } from "node:path";
import { type Dataset, describeDataset } from "../../commands/datasets.ts";
import { tool } from "../../commands/tool.ts";
import { EXIT, nearest } from "../../messages/index.ts";
import { renderDatasets } from "../../reporting/terminal/index.ts";
import type { Job } from "../job.ts";
import { fault, readText } from "../load-input.ts";
import { datasetsFolder } from "../package-files.ts";

/** `rungwise datasets`: the list, or the text of one. */
export const datasetsJob: Job = async ({ argument, options }, console) => {
  const folder = datasetsFolder();
  const files = readdirSync(folder, { recursive: true, encoding: "utf8" })
    .filter((file) => file.endsWith(".csv"))
    .map((file) => ({
      name: relative(".", file)
        .split(sep)
        .join("/")
        .replace(/\.csv$/, ""),
      path: join(folder, file),
    }))
    .sort((a, b) => (a.name < b.name ? -1 : 1));
  const [wanted] = argument;
  if (wanted !== undefined) {
    const found = files.find(({ name }) => name === wanted.replace(/\.csv$/, ""));
    if (found === undefined) {
      const guess = nearest(
        wanted,
        files.map(({ name }) => name),
      );
      throw fault(
        "datasets",
        "unknown-dataset",
        `there is no series "${wanted}"${guess === null ? "" : ` (did you mean ${guess}?)`}`,
        "run rungwise datasets for the list",
      );
    }
    console.out(readText(found.path));
    return EXIT.done;
  }
  const datasets: Dataset[] = files.map(({ name, path }) => describeDataset(name, readText(path)));
  if (options.json === true) {
    const { renderJson } = await import("../../reporting/json.ts");
    console.out(renderJson({ schemaVersion: 1, tool, datasets, folder, warnings: [] }));
  } else console.out(renderDatasets(datasets, folder));
  return EXIT.done;
};
