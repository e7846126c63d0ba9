/** Where things stand in a TOML text; the parser tells the lines of syntax errors only. Null where it is not plain to see. */
export interface TomlLines {
  /** of a top-level key */
  key(name: string): number | null;
  /** of the nth table of a list of tables, `[[bands]]` (n from 0), if all `count` of them have a header of their own */
  table(name: string, n: number, count: number): number | null;
}

/** Find the headers and the top-level keys of a TOML text, line by line. Text in several lines that looks like one makes it null. */
export function tomlLines(text: string): TomlLines {
  const keys = new Map<string, number[]>();
  const tables = new Map<string, number[]>();
  let top = true;
  text.split(/\r\n|\n/).forEach((line, i) => {
    const [, table] = /^\s*\[\[\s*([\w.\s"-]+?)\s*\]\]/.exec(line) ?? [];
    const [, key] = /^\s*"?([\w-]+)"?\s*=/.exec(line) ?? [];
    if (table !== undefined) note(tables, table.replace(/["\s]/g, ""), i + 1);
    else if (top && key !== undefined) note(keys, key, i + 1);
    if (/^\s*\[/.test(line)) top = false;
  });
  return {
    key: (name) => (keys.get(name)?.length === 1 ? keys.get(name)![0]! : null),
    table: (name, n, count) => (tables.get(name)?.length === count ? tables.get(name)![n]! : null),
  };
}

function note(map: Map<string, number[]>, name: string, line: number): void {
  const lines = map.get(name);
  if (lines === undefined) map.set(name, [line]);
  else lines.push(line);
}
