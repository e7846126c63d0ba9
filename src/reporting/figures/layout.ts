import type { FigureSpec, Panel } from "./figure-spec.ts";
import { SIZE } from "./style.ts";
import { textWidth } from "./text-width.ts";
import { tickTexts } from "./ticks.ts";

/** A rectangle in pt from the upper left of the figure, y downwards. */
export interface Rect {
  readonly left: number;
  readonly top: number;
  readonly right: number;
  readonly bottom: number;
}

/** Where a panel stands: `strip` is its share of the picture, `frame` the box the data lie in. */
export interface Place {
  readonly strip: Rect;
  readonly frame: Rect;
}

export const PT_PER_MM = 72 / 25.4;

/** Distances in pt. */
export const GAP = {
  edge: 2,
  /** between tick and its label */
  tick: 2,
  /** between tick labels and the label of the axis */
  label: 3,
  /** line of text at the size of labels (with its subscripts), and of tick labels */
  labelLine: 10,
  tickLine: 7,
  /** above a panel when nothing stands there */
  bare: 5,
  /** line of a panel's tag, when it has no second axis */
  tag: 11,
} as const;

type Shape = Pick<FigureSpec, "widthMm" | "heightMm"> & {
  readonly panels: readonly Pick<Panel, "tag" | "weight" | "x" | "y" | "x2">[];
};

/** Frames of all panels: they share their left and right edges, so that axes stand one under the other. */
export function layOut(figure: Shape): readonly Place[] {
  const width = figure.widthMm * PT_PER_MM;
  const height = figure.heightMm * PT_PER_MM;
  const left = Math.max(...figure.panels.map(leftMargin));
  const right = width - Math.max(...figure.panels.map((panel) => rightMargin(panel, width - left)));
  const margins = figure.panels.map((panel) => ({ above: above(panel), below: below(panel) }));
  const spent = margins.reduce((sum, margin) => sum + margin.above + margin.below, 0);
  const weights = figure.panels.reduce((sum, panel) => sum + panel.weight, 0);
  let y = 0;
  return figure.panels.map((panel, i) => {
    const inner = ((height - spent) * panel.weight) / weights;
    const top = y + margins[i]!.above;
    const bottom = top + inner;
    const strip = { left: 0, top: y, right: width, bottom: bottom + margins[i]!.below };
    y = strip.bottom;
    return { strip, frame: { left, top, right, bottom } };
  });
}

function leftMargin({ y }: Shape["panels"][number]): number {
  const widest = Math.max(0, ...tickTexts(y).map((text) => textWidth(text, SIZE.small)));
  const label = y.label.length === 0 ? 0 : GAP.labelLine + GAP.label;
  return GAP.edge + label + (widest === 0 ? 0 : widest + GAP.tick) + SIZE.tick;
}

/** Room for the half of the last label that reaches beyond the frame. */
function rightMargin({ x, x2 }: Shape["panels"][number], room: number): number {
  const overhang = (at: number, text: string) => {
    const share = x.reversed ? (at - x.min) / (x.max - x.min) : (x.max - at) / (x.max - x.min);
    return textWidth(text, SIZE.small) / 2 - share * room * 0.9;
  };
  const texts = tickTexts(x);
  const ends = [
    ...x.ticks.map((at, i) => overhang(at, texts[i]!)),
    ...(x2?.ticks ?? []).map(({ at, text }) => overhang(at, text)),
  ];
  return GAP.edge + Math.max(2, ...ends);
}

function below({ x }: Shape["panels"][number]): number {
  const labels = tickTexts(x).some((text) => text !== "");
  const label = x.label.length === 0 ? 0 : GAP.label + GAP.labelLine;
  return SIZE.tick + (labels ? GAP.tick + GAP.tickLine : 0) + label + GAP.edge;
}

function above({ x2, tag }: Shape["panels"][number]): number {
  if (x2 !== undefined) return GAP.edge + GAP.labelLine + GAP.label + GAP.tickLine + GAP.tick + SIZE.tick;
  return tag === null ? GAP.bare : GAP.tag;
}
