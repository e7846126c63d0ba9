import type { SKRSContext2D } from "@napi-rs/canvas";
import type { Run } from "./figure-spec.ts";
import { SIZE } from "./style.ts";

/** Private family names, so that no installed font can stand in. */
export const FAMILY = { roman: "Rungwise Roman", italic: "Rungwise Italic" } as const;

export interface TextPlace {
  readonly x: number;
  readonly y: number;
  readonly align: "left" | "center" | "right";
  readonly baseline: "top" | "middle" | "bottom";
  readonly sizePt: number;
  readonly colour?: string;
  /** a quarter turn to the left, for the label of a vertical axis */
  readonly upright?: boolean;
}

/** Heights as shares of the text size: capital letters, and how far scripts are moved. */
const CAPITAL = 0.72;
const DESCENT = 0.21;
const RAISED = 0.36;
const LOWERED = 0.16;

/** Draw runs as one line of text; `px` is pixels per pt. */
export function drawRuns(ctx: SKRSContext2D, runs: readonly Run[], place: TextPlace, px: number): void {
  const size = place.sizePt * px;
  const font = ({ italic, script }: Run) =>
    `${script === undefined ? size : SIZE.script * px}px "${italic ? FAMILY.italic : FAMILY.roman}"`;
  ctx.save();
  ctx.fillStyle = place.colour ?? "#000000";
  ctx.textAlign = "left";
  ctx.textBaseline = "alphabetic";
  ctx.translate(place.x, place.y);
  if (place.upright) ctx.rotate(-Math.PI / 2);
  const widths = runs.map((run) => {
    ctx.font = font(run);
    return ctx.measureText(run.text).width;
  });
  const total = widths.reduce((sum, width) => sum + width, 0);
  let x = place.align === "left" ? 0 : place.align === "center" ? -total / 2 : -total;
  const line = { top: CAPITAL * size, middle: (CAPITAL / 2) * size, bottom: -DESCENT * size }[place.baseline];
  runs.forEach((run, i) => {
    ctx.font = font(run);
    const shift = run.script === "super" ? -RAISED : run.script === "sub" ? LOWERED : 0;
    ctx.fillText(run.text, x, line + shift * size);
    x += widths[i]!;
  });
  ctx.restore();
}
