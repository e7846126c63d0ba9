import type { Warning } from "../../messages/index.ts";
import { printUnits } from "../text/units.ts";
import { LINE_WIDTH, wrap } from "../text/wrap.ts";
import { paintWith } from "./paint.ts";

/** Warnings one below the other, each `warning: …` and wrapped; empty for none, otherwise ends with a newline. */
export function renderWarnings(warnings: readonly Warning[], { colour }: { readonly colour: boolean }): string {
  const { alert } = paintWith(colour);
  const word = "warning:";
  return warnings
    .map(({ message }) => {
      const text = wrap(printUnits(message), `${word} `, "  ", LINE_WIDTH);
      return `${alert(word)}${text.slice(word.length)}\n`;
    })
    .join("");
}
