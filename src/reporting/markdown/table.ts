import { markdownTable } from "markdown-table";
import type { TableData } from "../table-data.ts";
import { displayWidth } from "../text/display-width.ts";
import { quotient } from "../text/units.ts";
import { escape, groupDigits, holdUnits } from "./typeset.ts";

/** A table in Markdown with its notes below; cells of words are escaped, numbers get thin groups of digits. */
export function table({ columns, rows, notes }: TableData): string {
  const heads = columns.map(({ quantity, unit }) =>
    holdUnits(unit === undefined ? quantity : quotient(quantity, unit)),
  );
  const cells = rows.map((row) =>
    row.cells.map((cell, i) => (columns[i]!.align === "left" ? holdUnits(escape(cell)) : number(cell))),
  );
  const text = markdownTable([heads, ...cells], {
    align: columns.map(({ align }) => (align === "left" ? "left" : "right")),
    stringLength: displayWidth,
  });
  return [text, ...notes.map(sentence)].join("\n\n");
}

const number = (cell: string) =>
  holdUnits(groupDigits(cell)).replace(/^< /u, "&lt;\u00a0").replace(/^> /u, "&gt;\u00a0");

/** A sentence of ours or from a result, with no-break spaces and thin groups of digits. */
export const sentence = (text: string): string => holdUnits(groupDigits(escape(text)));
