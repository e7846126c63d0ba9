import type { Corner, Panel, Trace } from "./figure-spec.ts";
import type { Rect } from "./layout.ts";
import { SIZE } from "./style.ts";
import { textWidth } from "./text-width.ts";

/** Lengths in pt. */
export const LEGEND = { inset: 3, padding: 2.5, sample: 17, gap: 3.5, row: 9.5 } as const;

export interface LegendEntry {
  readonly name: string;
  /** all traces of that name: a marker and a line make one sample */
  readonly traces: readonly Trace[];
}

/** Entries in the order of the traces, one a name. */
export function legendEntries(traces: readonly Trace[]): readonly LegendEntry[] {
  const byName = new Map<string, Trace[]>();
  for (const trace of traces) {
    if (trace.name === null) continue;
    const known = byName.get(trace.name);
    if (known === undefined) byName.set(trace.name, [trace]);
    else known.push(trace);
  }
  return [...byName].map(([name, of]) => ({ name, traces: of }));
}

/** Width and height of the box in pt. */
export function legendSize(entries: readonly LegendEntry[]): { readonly width: number; readonly height: number } {
  const text = Math.max(0, ...entries.map(({ name }) => textWidth(name, SIZE.small)));
  return {
    width: 2 * LEGEND.padding + LEGEND.sample + LEGEND.gap + text,
    height: 2 * LEGEND.padding + LEGEND.row * entries.length,
  };
}

/** The box in a corner of a frame. */
export function legendBox(
  frame: Rect,
  corner: Corner,
  size: { readonly width: number; readonly height: number },
): Rect {
  const left = corner.endsWith("left") ? frame.left + LEGEND.inset : frame.right - LEGEND.inset - size.width;
  const top = corner.startsWith("top") ? frame.top + LEGEND.inset : frame.bottom - LEGEND.inset - size.height;
  return { left, top, right: left + size.width, bottom: top + size.height };
}

const CORNERS: readonly Corner[] = ["top-right", "top-left", "bottom-left", "bottom-right"];

/** A panel with its legend in a corner free of data; where none is free the y axis grows upwards and makes one. */
export function withLegend(panel: Panel, frame: Rect, rescale: (min: number, max: number) => Panel["y"]): Panel {
  const entries = legendEntries(panel.traces);
  if (entries.length === 0) return { ...panel, legend: null };
  const size = legendSize(entries);
  const free = CORNERS.find((corner) => {
    const box = legendBox(frame, corner, size);
    return occupied(panel, frame).every((taken) => !overlap(taken, box));
  });
  if (free !== undefined) return { ...panel, legend: free };
  const height = frame.bottom - frame.top;
  const share = Math.min(0.6, (size.height + 2 * LEGEND.inset) / height);
  const max = panel.y.min + (panel.y.max - panel.y.min) / (1 - share);
  return { ...panel, y: rescale(panel.y.min, max), legend: "top-right" };
}

export function overlap(a: Rect, b: Rect): boolean {
  return a.left < b.right && b.left < a.right && a.top < b.bottom && b.top < a.bottom;
}

/** Small boxes around everything drawn for the data: markers with their bars, lines and edges of areas in short pieces. */
export function occupied(panel: Panel, frame: Rect): readonly Rect[] {
  const { x, y } = panel;
  const across = (value: number) => {
    const share = (value - x.min) / (x.max - x.min);
    return frame.left + (x.reversed ? 1 - share : share) * (frame.right - frame.left);
  };
  const up = (value: number) => frame.bottom - ((value - y.min) / (y.max - y.min)) * (frame.bottom - frame.top);
  const around = (x1: number, y1: number, x2: number, y2: number, half: number): Rect => ({
    left: Math.min(x1, x2) - half,
    right: Math.max(x1, x2) + half,
    top: Math.min(y1, y2) - half,
    bottom: Math.max(y1, y2) + half,
  });
  const along = (points: readonly { readonly x: number; readonly y: number }[]): Rect[] => {
    const pieces: Rect[] = [];
    for (let i = 1; i < points.length; i++) {
      const [a, b] = [points[i - 1]!, points[i]!];
      const [ax, ay, bx, by] = [across(a.x), up(a.y), across(b.x), up(b.y)];
      const cuts = Math.min(200, Math.max(1, Math.ceil(Math.hypot(bx - ax, by - ay) / 4)));
      for (let k = 0; k < cuts; k++) {
        const at = (share: number) => [ax + share * (bx - ax), ay + share * (by - ay)] as const;
        const [p, q] = [at(k / cuts), at((k + 1) / cuts)];
        pieces.push(around(p[0], p[1], q[0], q[1], 1));
      }
    }
    return pieces;
  };
  const boxes: Rect[] = [];
  for (const trace of panel.traces) {
    if (trace.kind === "line") boxes.push(...along(trace.points));
    else if (trace.kind === "area") {
      boxes.push(...along(trace.points.map(({ x: at, low }) => ({ x: at, y: low }))));
      boxes.push(...along(trace.points.map(({ x: at, high }) => ({ x: at, y: high }))));
    } else {
      for (const point of trace.points) {
        const [px, py] = [across(point.x), up(point.y)];
        boxes.push(around(px, py, px, py, trace.sizePt / 2 + 1));
        if (point.yError !== undefined) {
          boxes.push(around(px, up(point.y - point.yError), px, up(point.y + point.yError), SIZE.cap / 2));
        }
        if (point.xError !== undefined) {
          boxes.push(around(across(point.x - point.xError), py, across(point.x + point.xError), py, SIZE.cap / 2));
        }
      }
    }
  }
  return boxes;
}
