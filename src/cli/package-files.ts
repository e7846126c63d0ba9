import { existsSync } from "node:fs";
import { dirname, join } from "node:path";
import { fileURLToPath } from "node:url";

/** The folder that holds package.json of Rungwise, found upwards from this module (it moves when it is bundled). */
export function packageRoot(): string {
  let folder = dirname(fileURLToPath(import.meta.url));
  while (!existsSync(join(folder, "package.json"))) {
    const above = dirname(folder);
    if (above === folder) throw new Error("the files of the package cannot be found");
    folder = above;
  }
  return folder;
}

/** Where the series that come along are. */
export const datasetsFolder = () => join(packageRoot(), "datasets");
