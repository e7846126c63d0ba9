import { styleText } from "node:util";

/** How terminal text is set off: weights and one colour; every word reads the same without them. */
export interface Paint {
  readonly strong: (text: string) => string;
  readonly faint: (text: string) => string;
  readonly alert: (text: string) => string;
}

const plain = (text: string) => text;

/** Styles, or none. The caller has decided for its stream, so the stream is not asked again. */
export function paintWith(colour: boolean): Paint {
  if (!colour) return { strong: plain, faint: plain, alert: plain };
  const style = (format: "bold" | "dim" | "yellow") => (text: string) =>
    styleText(format, text, { validateStream: false });
  return { strong: style("bold"), faint: style("dim"), alert: style("yellow") };
}
