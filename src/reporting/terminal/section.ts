import { renderTable } from "../table.ts";
import { narrow, type TableData } from "../table-data.ts";
import { wrap } from "../text/wrap.ts";
import type { Paint } from "./paint.ts";

const INDENT = 2;

/** A titled block: a table or sentences under it, indented; null parts are left out. */
export function section(title: string, parts: readonly (TableData | string | null)[], paint: Paint): string {
  const margin = " ".repeat(INDENT);
  const blocks = parts.flatMap((part): [string, boolean][] => {
    if (part === null) return [];
    if (typeof part === "string") return [[wrap(part, margin, `${margin}  `), false]];
    return [[renderTable(narrow(part), { indent: INDENT, mute: paint.faint }), true]];
  });
  // a second table keeps its distance, sentences follow closely
  const body = blocks.map(([text, isTable], i) => (isTable && i > 0 ? `\n${text}` : text));
  return [paint.strong(title), ...body].join("\n");
}
