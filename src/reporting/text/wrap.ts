import { displayWidth } from "./display-width.ts";

/** Widest line of terminal text, in columns. */
export const LINE_WIDTH = 80;

/**
 * Break a text at spaces into lines of at most `width` columns. The first line begins with `first`, the others with `rest`;
 * no-break spaces hold (and come out as spaces), and a single longer word stays whole.
 */
export function wrap(text: string, first = "", rest = first, width = LINE_WIDTH): string {
  const lines: string[] = [];
  let line = first;
  let empty = true;
  for (const word of text.split(/[ \n\t]+/u).filter((part) => part !== "")) {
    const next = empty ? line + word : `${line} ${word}`;
    if (!empty && displayWidth(next) > width) {
      lines.push(line);
      line = rest + word;
    } else line = next;
    empty = false;
  }
  return [...lines, line.trimEnd()].join("\n").replaceAll("\u00a0", " ");
}
