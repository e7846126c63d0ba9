import type { Column, TableData } from "./table-data.ts";
import { displayWidth, pad } from "./text/display-width.ts";
import { divisor, quotient } from "./text/units.ts";
import { LINE_WIDTH, wrap } from "./text/wrap.ts";

export interface TableOptions {
  /** columns of the terminal; wider tables continue below with their first column repeated; @default 80 */
  readonly width?: number;
  /** spaces before every line; @default 0 */
  readonly indent?: number;
  /** how muted rows are set */
  readonly mute?: (line: string) => string;
}

/** Spaces between columns; the narrow gap where only that keeps a table in one piece. */
const GAPS = { wide: 3, narrow: 2 };

/** Heads stand in one line, quantity over unit; in two where one line would widen a column. */
interface SetColumn {
  readonly head: readonly [string, string];
  readonly cells: readonly string[];
  readonly width: number;
  readonly align: "left" | "right";
}

/**
 * Set a table in plain text: a head, a rule under it, rows with numbers aligned on their decimal points, then the notes.
 * Ends without a newline; no line carries trailing spaces.
 */
export function renderTable({ columns, rows, notes }: TableData, options: TableOptions = {}): string {
  const { width = LINE_WIDTH, indent = 0, mute = (line) => line } = options;
  const margin = " ".repeat(indent);
  const bodies = columns.map(({ align }, i) => {
    const cells = rows.map((row) => row.cells[i]!);
    return align === "point" ? alignPoints(cells) : align === "interval" ? alignIntervals(cells) : cells;
  });
  const split = columns.some((column, i) => displayWidth(wholeHead(column)) > widest(bodies[i]!) + 2);
  const set = columns.map((column, i) => setColumn(column, bodies[i]!, split));
  const room = width - indent;
  const squeezed = spanOf(set, GAPS.wide) > room && spanOf(set, GAPS.narrow) <= room;
  const gap = squeezed ? GAPS.narrow : GAPS.wide;
  const blocks = blocksOf(set, room, gap).map((block) => {
    const line = (texts: readonly string[]) =>
      (
        margin +
        block.map((c, i) => pad(texts[i]!, c.width, c.align === "left" ? "right" : "left")).join(" ".repeat(gap))
      ).trimEnd();
    const heads = block.some(({ head }) => head[1] !== "")
      ? [
          line(block.map(({ head }) => (head[1] === "" ? "" : head[0]))),
          line(block.map(({ head }) => head[1] || head[0])),
        ]
      : [line(block.map(({ head }) => head[0]))];
    const rule = margin + "─".repeat(spanOf(block, gap));
    const body = rows.map((row, r) => {
      const text = line(block.map(({ cells }) => cells[r]!));
      return row.muted === true ? mute(text) : text;
    });
    return [...heads, rule, ...body].join("\n");
  });
  const below = notes.map((note) => wrap(note, margin, `${margin}  `, width));
  return [blocks.join("\n\n"), ...below].join("\n");
}

const widest = (cells: readonly string[]) => Math.max(0, ...cells.map(displayWidth));

const wholeHead = ({ quantity, unit }: Column) => (unit === undefined ? quantity : quotient(quantity, unit));

/** Words stand flush left; blocks of numbers flush right under their head, kept together. */
function setColumn(column: Column, cells: readonly string[], split: boolean): SetColumn {
  const { quantity, unit, align } = column;
  const head =
    split && unit !== undefined ? ([`${quantity} /`, divisor(unit)] as const) : ([wholeHead(column), ""] as const);
  const body = widest(cells);
  return {
    head,
    cells: align === "left" ? cells : cells.map((cell) => pad(cell, body, align === "right" ? "left" : "right")),
    width: Math.max(body, ...head.map(displayWidth)),
    align: align === "left" ? "left" : "right",
  };
}

/** Fill up cells so that their decimal points (or the end of their whole numbers) stand in one column. */
export function alignPoints(cells: readonly string[]): string[] {
  const parts = cells.map((cell) => {
    const whole = /^[<>]?\s?[−+-]?\d*/u.exec(cell)![0];
    return whole === "" ? ([cell, ""] as const) : ([whole, cell.slice(whole.length)] as const);
  });
  const before = Math.max(0, ...parts.map(([head]) => displayWidth(head)));
  const after = Math.max(0, ...parts.map(([, tail]) => displayWidth(tail)));
  return parts.map(([head, tail]) => pad(head, before, "left") + pad(tail, after, "right"));
}

function alignIntervals(cells: readonly string[]): string[] {
  const parts = cells.map((cell) => cell.split(" to "));
  const low = alignPoints(parts.map(([from]) => from!));
  const high = alignPoints(parts.map(([, to]) => to ?? ""));
  return parts.map((part, i) => (part.length === 2 ? `${low[i]} to ${high[i]}` : low[i]!));
}

const spanOf = (columns: readonly SetColumn[], gap: number) => columns.reduce((sum, c) => sum + c.width + gap, -gap);

/** All columns side by side, or in as few blocks as fit, of about equal width, each with the first column before it. */
function blocksOf(columns: readonly SetColumn[], room: number, gap: number): readonly (readonly SetColumn[])[] {
  const blocks = filled(columns, room, gap);
  if (blocks.length < 2) return blocks;
  for (let less = room - 1; less > 0; less--) {
    const narrower = filled(columns, less, gap);
    if (narrower.length > blocks.length || narrower.some((block) => spanOf(block, gap) > less))
      return filled(columns, less + 1, gap);
  }
  return blocks;
}

function filled([first, ...others]: readonly SetColumn[], room: number, gap: number): SetColumn[][] {
  if (first === undefined) return [];
  const blocks: SetColumn[][] = [[first]];
  let span = first.width;
  for (const column of others) {
    const last = blocks.at(-1)!;
    const wider = span + gap + column.width;
    if (last.length === 1 || wider <= room) {
      last.push(column);
      span = wider;
    } else {
      blocks.push([first, column]);
      span = first.width + gap + column.width;
    }
  }
  return blocks;
}
