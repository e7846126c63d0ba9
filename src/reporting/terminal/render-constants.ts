import { forms } from "../../analysis/index.ts";
import type { Quantity } from "../../quantity/index.ts";
import { quantity } from "../text/cells.ts";
import { paintWith } from "./paint.ts";
import { section } from "./section.ts";

/** What `convert` found of constants. */
export interface FormedConstants {
  readonly constants: readonly {
    readonly name: string | null;
    readonly to: string;
    readonly constants: Readonly<Record<string, Quantity>>;
    readonly correlation: { readonly order: readonly string[]; readonly matrix: readonly (readonly number[])[] } | null;
  }[];
}

/** Constants in another form for a terminal; ends with a newline. */
export function renderConstants({ constants: all }: FormedConstants, { colour }: { readonly colour: boolean }): string {
  const paint = paintWith(colour);
  const blocks = all.map(({ name, to, constants, correlation }) => {
    const form = forms.find((one) => one.name === to)!;
    const rows = Object.entries(constants).map(([key, q]) => {
      const value =
        q.standardUncertainty === null ? String(Number(q.value.toPrecision(12))).replace("-", "−") : quantity(q);
      return { cells: [form.symbols[form.keys.indexOf(key)]!, value] };
    });
    const pairs =
      correlation === null
        ? []
        : correlation.order.flatMap((a, i) =>
            correlation.order
              .slice(i + 1)
              .map(
                (b, j) =>
                  `${symbol(form, a)}, ${symbol(form, b)}: ${correlation.matrix[i]![i + 1 + j]!.toFixed(4).replace("-", "−")}`,
              ),
          );
    return section(
      name === null ? form.title : `${name}: ${form.title}`,
      [
        {
          columns: [
            { quantity: "constant", align: "left" },
            { quantity: "value", unit: "cm-1", align: "point" },
          ],
          rows,
          notes: pairs.length === 0 ? [] : [`Correlation ${pairs.join("; ")}`],
        },
      ],
      paint,
    );
  });
  return `${blocks.join("\n\n")}\n`;
}

const symbol = (form: (typeof forms)[number], key: string) => form.symbols[form.keys.indexOf(key)]!;
