import { type Canvas, createCanvas, GlobalFonts } from "@napi-rs/canvas";
import { ChartJSNodeCanvas } from "chartjs-node-canvas";
import { chartConfiguration } from "./chart-configuration.ts";
import { FAMILY } from "./draw-text.ts";
import type { FigureSpec, Panel } from "./figure-spec.ts";
import type { FigureAssets } from "./font-files.ts";
import { layOut, type Rect } from "./layout.ts";
import { panelPlugin } from "./panel-plugin.ts";

/**
 * chart.js over a canvas of any size. ChartJSNodeCanvas fixes one size in its constructor and writes no density into the PNG, so
 * only its chart class and its canvases are taken; the file is encoded here.
 */
class PanelCanvas extends ChartJSNodeCanvas {
  /** Draw a panel into `target`; its strip of the picture begins at `top`, `frame` is counted from there. All in px. */
  drawInto(target: Canvas, panel: Panel, top: number, bottom: number, frame: Rect, px: number): void {
    const strip = { left: 0, top: 0, right: target.width, bottom: bottom - top };
    const canvas = this._createCanvas(strip.right, strip.bottom) as unknown as Canvas & { style?: object };
    canvas.style = {}; // chart.js looks there for a size given by CSS
    const plugin = panelPlugin(panel, strip, frame, px);
    const configuration = chartConfiguration(panel, strip, frame, px, [plugin]);
    const chart = new this._chartJs(canvas.getContext("2d") as never, configuration);
    target.getContext("2d").drawImage(canvas, 0, top);
    chart.destroy();
  }
}

let shared: PanelCanvas | null = null;
const registered = new Set<string>();

function register(path: string, family: string): void {
  if (registered.has(path)) return;
  if (GlobalFonts.registerFromPath(path, family) === null) throw new Error(`no font could be read from ${path}`);
  registered.add(path);
}

/**
 * Draw a figure as PNG: exactly round(mm/25.4·dpi) pixels wide and high, opaque white ground, density written into the file.
 * The same figure gives the same bytes.
 */
export async function renderFigure(figure: FigureSpec, assets: FigureAssets): Promise<Buffer> {
  register(assets.regularFont, FAMILY.roman);
  register(assets.italicFont, FAMILY.italic);
  shared ??= new PanelCanvas({ width: 1, height: 1 });
  const toPx = (mm: number) => Math.round((mm / 25.4) * figure.dpi);
  const px = figure.dpi / 72;
  const width = toPx(figure.widthMm);
  const height = toPx(figure.heightMm);
  const canvas = createCanvas(width, height);
  const ctx = canvas.getContext("2d");
  ctx.fillStyle = "#FFFFFF";
  ctx.fillRect(0, 0, width, height);
  const places = layOut(figure);
  figure.panels.forEach((panel, i) => {
    const { strip, frame } = places[i]!;
    const top = Math.round(strip.top * px);
    const bottom = i === places.length - 1 ? height : Math.round(strip.bottom * px);
    const inStrip = {
      left: Math.round(frame.left * px),
      right: Math.round(frame.right * px),
      top: Math.round(frame.top * px) - top,
      bottom: Math.round(frame.bottom * px) - top,
    };
    shared!.drawInto(canvas, panel, top, bottom, inStrip, px);
  });
  return canvas.encode("png", { resolution: figure.dpi });
}
