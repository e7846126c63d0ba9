/** A piece of a label: symbols of quantities italic, units and numbers roman; `script` raises or lowers it. */
export interface Run {
  readonly text: string;
  readonly italic?: boolean;
  readonly script?: "sub" | "super";
}

export interface Axis {
  readonly label: readonly Run[];
  readonly min: number;
  readonly max: number;
  /** places of the ticks; labels carry `decimals` digits after the point, minus U+2212, no thousands separator */
  readonly ticks: readonly number[];
  readonly decimals: number;
  /** an own text for each tick in place of the number; all empty: ticks without labels, as between panels that share an axis */
  readonly tickLabels?: readonly string[];
  readonly reversed?: boolean;
}

export type Marker = "circle" | "square" | "triangle" | "diamond" | "cross" | "plus";

export type Side = "above" | "below" | "left" | "right";

export interface Point {
  readonly x: number;
  readonly y: number;
  /** half-length of the capped bar in y (or in x) */
  readonly yError?: number;
  readonly xError?: number;
  /** text beside the point, kept clear of other marks by the builder */
  readonly text?: readonly Run[];
  /** where that text stands; default above */
  readonly textSide?: Side;
}

/** Later traces lie over earlier ones; traces of one name share one entry of the legend, null has none. */
export type Trace =
  | {
      readonly kind: "points";
      readonly name: string | null;
      readonly colour: string;
      readonly marker: Marker;
      readonly filled: boolean;
      readonly sizePt: number;
      readonly points: readonly Point[];
    }
  | {
      readonly kind: "line";
      readonly name: string | null;
      readonly colour: string;
      readonly widthPt: number;
      readonly dashPt: readonly number[];
      readonly points: readonly { readonly x: number; readonly y: number }[];
    }
  | {
      readonly kind: "area";
      readonly name: string | null;
      readonly colour: string;
      readonly opacity: number;
      readonly points: readonly { readonly x: number; readonly low: number; readonly high: number }[];
    };

export interface Panel {
  /** "(a)" upper left, when there are several */
  readonly tag: string | null;
  /** share of the height, relative to the other panels */
  readonly weight: number;
  readonly x: Axis;
  readonly y: Axis;
  /** a second axis on the far side: values in other units at places given in units of the first */
  readonly x2?: {
    readonly label: readonly Run[];
    readonly ticks: readonly { readonly at: number; readonly text: string }[];
  };
  readonly traces: readonly Trace[];
  readonly texts: readonly {
    readonly x: number;
    readonly y: number;
    readonly runs: readonly Run[];
    readonly align: "left" | "center" | "right";
    readonly baseline: "top" | "middle" | "bottom";
  }[];
  readonly legend: Corner | null;
}

export type Corner = "top-left" | "top-right" | "bottom-left" | "bottom-right";

/** A picture as plain data; the renderer only draws it. Panels stand one below the other and share nothing but the width. */
export interface FigureSpec {
  /** file name without extension, kebab-case */
  readonly name: string;
  readonly widthMm: number;
  readonly heightMm: number;
  readonly dpi: number;
  readonly panels: readonly Panel[];
  readonly caption: string;
  readonly alt: string;
}
