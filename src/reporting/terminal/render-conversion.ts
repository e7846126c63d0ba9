import { renderTable } from "../table.ts";
import { measured } from "../text/cells.ts";
import { unitSymbol } from "../text/units.ts";

/** What `convert` found. */
export interface Conversions {
  readonly results: readonly {
    readonly input: string;
    readonly value: number;
    readonly standardUncertainty: number | null;
    readonly unit: string;
    readonly medium: "vacuum" | "air";
  }[];
}

/** A value without uncertainty keeps nine digits: a conversion must not coarsen what was typed. */
const nineDigits = (value: number) => String(Number(value.toPrecision(9)));

/** Converted positions for a terminal, input beside result; ends with a newline. */
export function renderConversion({ results }: Conversions): string {
  const first = results[0];
  if (first === undefined) return "";
  const isLength = first.unit === "nm" || first.unit === "um";
  return `${renderTable({
    columns: [
      { quantity: "input", align: "left" },
      {
        quantity: isLength ? `λ in ${first.medium} / ${unitSymbol(first.unit)}` : `in ${unitSymbol(first.unit)}`,
        align: "point",
      },
    ],
    rows: results.map(({ input, value, standardUncertainty: u }) => ({
      cells: [input, u === null ? nineDigits(value) : measured(value, u)],
    })),
    notes: [],
  })}\n`;
}
