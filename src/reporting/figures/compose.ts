import type { Axis, FigureSpec, Panel, Run } from "./figure-spec.ts";
import { layOut, type Rect } from "./layout.ts";
import { withLegend } from "./legend.ts";
import { axis } from "./ticks.ts";

/** Line drawings are printed with 600 dots per inch (RSC, AIP). */
const DPI = 600;

/** No taller than a page allows (RSC: 233 mm), with room left for the caption. */
const TALLEST_MM = 200;

/** Height in mm that suits a width, for panels of so many heights of a plain one together. */
export function heightFor(widthMm: number, panels: number): number {
  const one = widthMm < 120 ? 0.76 * widthMm : 0.52 * widthMm;
  return Math.min(TALLEST_MM, Math.round(one * panels));
}

/** An axis as it is wanted; its ticks are chosen when its length is known. */
export interface AxisPlan {
  readonly label: readonly Run[];
  readonly range: readonly [number, number];
  /** smallest step between ticks: 1 for quantum numbers */
  readonly least?: number;
  /** ready made, such as logarithmic or shared with the panel below without text */
  readonly ready?: Axis;
}

export type PanelPlan = Omit<Panel, "x" | "y" | "legend"> & {
  readonly x: AxisPlan;
  readonly y: AxisPlan;
  /** false: no legend in this panel */
  readonly legend: boolean;
};

/** Distance between ticks in pt: labels of an x axis are wide, those of a y axis low. */
const APART = { x: 34, y: 22 } as const;

function ticked({ label, range, least, ready }: AxisPlan, length: number, apart: number): Axis {
  return ready ?? axis(label, range[0], range[1], Math.max(2, Math.round(length / apart)), least);
}

/** Choose ticks for the true size of every panel, and free places for the legends. */
export function compose(figure: Omit<FigureSpec, "panels" | "dpi">, plans: readonly PanelPlan[]): FigureSpec {
  const rough = plans.map((plan) => ({
    ...plan,
    x: ticked(plan.x, 200, APART.x),
    y: ticked(plan.y, 100, APART.y),
    legend: null,
  }));
  const frames = layOut({ ...figure, panels: rough }).map(({ frame }) => frame);
  const panels = plans.map((plan, i) => {
    const frame = frames[i]!;
    const y = (min: number, max: number) => ticked({ ...plan.y, range: [min, max] }, frame.bottom - frame.top, APART.y);
    const panel = {
      ...plan,
      x: ticked(plan.x, frame.right - frame.left, APART.x),
      y: y(...plan.y.range),
      legend: null,
    };
    return plan.legend ? withLegend(panel, frame, y) : panel;
  });
  return { ...figure, dpi: DPI, panels };
}

/** Frames of the panels as planned, in pt, to place texts by. */
export function plannedFrames(
  size: Pick<FigureSpec, "widthMm" | "heightMm">,
  plans: readonly PanelPlan[],
): readonly Rect[] {
  const panels = plans.map((plan) => ({
    ...plan,
    x: ticked(plan.x, 200, APART.x),
    y: ticked(plan.y, 100, APART.y),
    legend: null,
  }));
  return layOut({ ...size, panels }).map(({ frame }) => frame);
}
