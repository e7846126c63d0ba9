/** A series that comes along: its name, its title and where it is from. */
export interface Dataset {
  readonly name: string;
  readonly title: string;
  readonly source: string | null;
  readonly status: string | null;
}

/** Read the head of a data file: `# name: …` is the title, `# Source - …` and `# Status - …` say where it is from. */
export function describeDataset(name: string, text: string): Dataset {
  const head = text.split(/\r?\n/).filter((line) => line.startsWith("#"));
  const find = (pattern: RegExp) =>
    head.map((line) => pattern.exec(line)?.[1]?.trim()).find((found) => found !== undefined) ?? null;
  return {
    name,
    title: find(/^#\s*name\s*:\s*(.+)$/i) ?? name,
    source: find(/^#\s*source\s*[-–:]\s*(.+)$/i),
    status: find(/^#\s*status\s*[-–:]\s*(.+)$/i),
  };
}
