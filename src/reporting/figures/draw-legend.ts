import type { SKRSContext2D } from "@napi-rs/canvas";
import { drawRuns } from "./draw-text.ts";
import type { Corner, Marker, Trace } from "./figure-spec.ts";
import type { Rect } from "./layout.ts";
import { LEGEND, legendBox, legendEntries, legendSize } from "./legend.ts";
import { SIZE } from "./style.ts";

/** Draw the legend: for each name a sample of line and marker as they stand in the panel. `frame` in px, `px` pixels per pt. */
export function drawLegend(
  ctx: SKRSContext2D,
  traces: readonly Trace[],
  corner: Corner,
  frame: Rect,
  px: number,
): void {
  const entries = legendEntries(traces);
  const inPt = { left: frame.left / px, top: frame.top / px, right: frame.right / px, bottom: frame.bottom / px };
  const box = legendBox(inPt, corner, legendSize(entries));
  entries.forEach(({ name, traces: of }, i) => {
    const y = (box.top + LEGEND.padding + (i + 0.5) * LEGEND.row) * px;
    const left = (box.left + LEGEND.padding) * px;
    const right = left + LEGEND.sample * px;
    for (const trace of of) drawSample(ctx, trace, left, right, y, px);
    const place = { x: right + LEGEND.gap * px, y, align: "left", baseline: "middle", sizePt: SIZE.small } as const;
    drawRuns(ctx, [{ text: name }], place, px);
  });
}

function drawSample(ctx: SKRSContext2D, trace: Trace, left: number, right: number, y: number, px: number): void {
  ctx.save();
  ctx.strokeStyle = ctx.fillStyle = trace.colour;
  if (trace.kind === "area") {
    ctx.globalAlpha = trace.opacity;
    ctx.fillRect(left, y - 3 * px, right - left, 6 * px);
  } else if (trace.kind === "line") {
    ctx.lineWidth = trace.widthPt * px;
    ctx.setLineDash(trace.dashPt.map((length) => length * px));
    ctx.beginPath();
    ctx.moveTo(left, y);
    ctx.lineTo(right, y);
    ctx.stroke();
  } else {
    drawMarker(ctx, trace.marker, (left + right) / 2, y, (trace.sizePt / 2) * px, trace.filled, px);
  }
  ctx.restore();
}

function drawMarker(
  ctx: SKRSContext2D,
  marker: Marker,
  x: number,
  y: number,
  radius: number,
  filled: boolean,
  px: number,
): void {
  const r = radius * 1.15;
  const paths: Record<Marker, readonly (readonly [number, number])[] | null> = {
    circle: null,
    square: [
      [-0.77, -0.77],
      [0.77, -0.77],
      [0.77, 0.77],
      [-0.77, 0.77],
    ],
    triangle: [
      [0, -1],
      [0.87, 0.5],
      [-0.87, 0.5],
    ],
    diamond: [
      [0, -1],
      [1, 0],
      [0, 1],
      [-1, 0],
    ],
    cross: [
      [-0.77, -0.77],
      [0.77, 0.77],
      [-0.77, 0.77],
      [0.77, -0.77],
    ],
    plus: [
      [-1, 0],
      [1, 0],
      [0, -1],
      [0, 1],
    ],
  };
  const path = paths[marker];
  const strokes = marker === "cross" || marker === "plus";
  ctx.beginPath();
  if (path === null) ctx.arc(x, y, radius, 0, 2 * Math.PI);
  else
    path.forEach(([dx, dy], i) => {
      if (i === 0 || (strokes && i === 2)) ctx.moveTo(x + dx * r, y + dy * r);
      else ctx.lineTo(x + dx * r, y + dy * r);
    });
  ctx.lineWidth = (strokes ? SIZE.line : SIZE.thin) * px;
  if (!strokes) {
    ctx.closePath();
    if (!filled) ctx.fillStyle = "#FFFFFF";
    ctx.fill();
  }
  ctx.stroke();
}
