import { wrap } from "../text/wrap.ts";

/** A series that comes with the tool. */
export interface DatasetEntry {
  readonly name: string;
  readonly title: string;
  readonly source: string | null;
  readonly status: string | null;
}

/** Folders of many small files, which stand in one paragraph each. */
const COLLECTIONS: Readonly<Record<string, string>> = {
  wells: "reference wells behind the empirical error of D0",
};

/** The list of series for a terminal: name, title, where it is from; ends with a newline. */
export function renderDatasets(datasets: readonly DatasetEntry[], folder: string): string {
  const of = (name: string) => Object.keys(COLLECTIONS).find((collection) => name.startsWith(`${collection}/`));
  const collections = Object.entries(COLLECTIONS).flatMap(([collection, title]) => {
    const names = datasets.filter(({ name }) => of(name) === collection).map(({ name }) => name.split("/")[1]!);
    if (names.length === 0) return [];
    const text = `${names.length} ${title}, each with its source and status: ${names.join(", ")}`;
    return [[`${collection}/…`, wrap(text, "  ")].join("\n")];
  });
  const single = datasets.filter(({ name }) => of(name) === undefined);
  const blocks = single.map(({ name, title, source, status }) =>
    [
      name,
      wrap(title, "  "),
      ...(source === null ? [] : [wrap(`Source: ${source}`, "  ", "    ")]),
      ...(status === null ? [] : [wrap(`Status: ${status}`, "  ", "    ")]),
    ].join("\n"),
  );
  return `${[...blocks, ...collections, `Files in ${folder}`].join("\n\n")}\n`;
}
