import type { SeriesResult } from "../../analysis/index.ts";
import { notDetermined } from "../../quantity/index.ts";
import { type Symbols, symbolOf } from "../symbols.ts";
import type { Column, TableData } from "../table-data.ts";
import { probability, quantity, size, statistic } from "../text/cells.ts";
import { methodNames } from "../text/method-names.ts";

/** Constants of several series side by side, one series a row. */
export function constantsComparison(all: readonly SeriesResult[], symbols: Symbols): TableData {
  const keys = [...new Set(all.flatMap(({ constants }) => Object.keys(constants)))];
  const sigmas = all.some(({ quality }) => quality.chiSquare !== null);
  const open = all.some(({ constants }) => keys.some((key) => constants[key] === undefined));
  return {
    columns: [
      { quantity: "series", align: "left" },
      ...keys.map(
        (key) =>
          ({
            quantity: symbolOf(symbols, key),
            unit: all.find(({ constants }) => constants[key])!.constants[key]!.unit,
            align: "point",
          }) satisfies Column,
      ),
      { quantity: "D0, Morse", unit: "cm-1", align: "point" },
      sigmas ? { quantity: "reduced χ²", align: "point" } : { quantity: "rms", unit: "cm-1", align: "point" },
    ],
    rows: all.map(({ name, constants, dissociation, quality }) => ({
      cells: [
        name,
        ...keys.map((key) => quantity(constants[key] ?? null)),
        quantity(dissociation[0]?.d0 ?? null),
        sigmas ? statistic(quality.reducedChiSquare) : size(quality.rms),
      ],
    })),
    notes: open ? ["Constants —: not part of that series' model."] : [],
  };
}

/** D0 of several series side by side, by method. */
export function dissociationComparison(all: readonly SeriesResult[]): TableData {
  const methods = [...new Set(all.flatMap(({ dissociation }) => dissociation.map(({ method }) => method)))];
  return {
    columns: [
      { quantity: "series", align: "left" },
      ...methods.map(
        (method) => ({ quantity: `D0, ${methodNames[method]}`, unit: "cm-1", align: "point" }) satisfies Column,
      ),
    ],
    rows: all.map(({ name, dissociation }) => ({
      cells: [
        name,
        ...methods.map((method) => quantity(dissociation.find((row) => row.method === method)?.d0 ?? null)),
      ],
    })),
    notes: [],
  };
}

/** Numbers of terms side by side, as `--terms auto` compared them; null when they were given. */
export function termsTable({ comparison }: SeriesResult): TableData | null {
  if (comparison === null) return null;
  const corrected = comparison.some(({ aicc }) => aicc !== null);
  const test = comparison.find(({ step }) => step !== null)?.step?.kind ?? null;
  return {
    columns: [
      { quantity: "terms", align: "left" },
      { quantity: "deg. of freedom", align: "right" },
      { quantity: "χ²", align: "point" },
      { quantity: "probability", align: "point" },
      { quantity: "rms", unit: "cm-1", align: "point" },
      { quantity: corrected ? "AICc" : "AIC", align: "point", reportOnly: true },
      { quantity: "left-out rms", unit: "cm-1", align: "point", reportOnly: true },
      { quantity: "P of the step", align: "point" },
    ],
    rows: comparison.map((row) => ({
      cells: [
        row.chosen ? `${row.terms}, chosen` : String(row.terms),
        String(row.degreesOfFreedom),
        statistic(row.chiSquare),
        probability(row.probability),
        row.rms < 1e-6 ? "< 10⁻⁶" : size(row.rms),
        statistic(corrected ? row.aicc : row.aic),
        size(row.leaveOneOutRms),
        row.step === null ? notDetermined : probability(row.step.probability),
      ],
    })),
    notes:
      test === null
        ? []
        : [`P of the step: probability that chance alone improves on one term fewer as much (${test} test).`],
  };
}
