import { markdownTable } from "markdown-table";
import type { Column, TableData } from "../table-data.ts";
import { displayWidth } from "../text/display-width.ts";
import { quotient } from "../text/units.ts";
import { groupDigits, holdUnits, verbatim } from "./typeset.ts";

/** A table in Markdown with its notes below; cells of words are escaped, numbers get thin groups of digits. */
export function table({ columns, rows, notes }: TableData): string {
  const heads = columns.map(({ quantity, unit }) =>
    holdUnits(unit === undefined ? quantity : quotient(quantity, unit)),
  );
  const cells = rows.map((row) => row.cells.map((cell, i) => (isNumber(columns[i]!) ? number(cell) : words(cell))));
  const text = markdownTable([heads, ...cells], {
    align: columns.map(({ align }) => (align === "left" ? "left" : "right")),
    stringLength: displayWidth,
  });
  const below = notes.length === 1 ? notes.map(sentence) : notes.map((note) => `- ${sentence(note)}`);
  return below.length === 0 ? text : `${text}\n\n${below.join("\n")}`;
}

const isNumber = ({ align }: Column) => align === "point" || align === "interval";

const number = (cell: string) =>
  holdUnits(groupDigits(cell)).replace(/^< /u, "&lt;\u00a0").replace(/^> /u, "&gt;\u00a0");

/** Words from outside as they are, with no-break spaces between numbers and units. */
export const words = (text: string): string => holdUnits(verbatim(text));

/** A sentence of ours: as `words`, and thin groups in long numbers. */
export const sentence = (text: string): string => holdUnits(groupDigits(verbatim(text)));
