import { wrap } from "../text/wrap.ts";

/** A series that comes with the tool. */
export interface DatasetEntry {
  readonly name: string;
  readonly title: string;
  readonly source: string | null;
  readonly status: string | null;
}

/** The list of series for a terminal: name, title, where it is from; ends with a newline. */
export function renderDatasets(datasets: readonly DatasetEntry[], folder: string): string {
  const blocks = datasets.map(({ name, title, source, status }) =>
    [
      name,
      wrap(title, "  "),
      ...(source === null ? [] : [wrap(`Source: ${source}`, "  ", "    ")]),
      ...(status === null ? [] : [wrap(`Status: ${status}`, "  ", "    ")]),
    ].join("\n"),
  );
  return `${[...blocks, `Files in ${folder}`].join("\n\n")}\n`;
}
