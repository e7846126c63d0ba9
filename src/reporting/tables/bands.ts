import type { SeriesResult } from "../../analysis/index.ts";
import { notDetermined } from "../../quantity/index.ts";
import type { TableData } from "../table-data.ts";
import { bandDecimals } from "../text/band-decimals.ts";
import { fixed, measured } from "../text/cells.ts";
import { andList } from "../text/lists.ts";

/** Observed beside calculated, with the corrected position where a companion was given; excluded bands are marked and muted. */
export function bandsTable({ bands }: SeriesResult): TableData {
  const anyOut = bands.some(({ used }) => !used);
  const anyCorrected = bands.some(({ twoLevels }) => twoLevels !== null);
  const rows = bands.map((band) => {
    const decimals = bandDecimals(band);
    const {
      observed,
      standardUncertainty: u,
      calculated,
      residual,
      studentizedResidual,
      leverage,
      leftOutResidual,
      twoLevels: pair,
    } = band;
    const cell = (value: number, sigma: number | null) =>
      sigma === null ? fixed(value, decimals) : measured(value, sigma);
    return {
      cells: [
        band.label,
        pair === null ? cell(observed, u) : cell(pair.measured, pair.measuredSigma),
        ...(anyCorrected ? [pair === null ? "" : cell(observed, u)] : []),
        fixed(calculated, decimals),
        fixed(residual, decimals),
        fixed(studentizedResidual, 2),
        fixed(leverage, 2),
        fixed(leftOutResidual, decimals),
        ...(anyOut ? [band.used ? "" : "not used"] : []),
      ],
      muted: !band.used,
    };
  });
  return {
    columns: [
      { quantity: "band", align: "left" },
      { quantity: "observed", unit: "cm-1", align: "point" },
      ...(anyCorrected ? [{ quantity: "corrected", unit: "cm-1", align: "point" } as const] : []),
      { quantity: "calculated", unit: "cm-1", align: "point" },
      { quantity: "obs − calc", unit: "cm-1", align: "point" },
      { quantity: "studentised", align: "point" },
      { quantity: "leverage", align: "point", reportOnly: true },
      { quantity: "obs − calc, left out", unit: "cm-1", align: "point", reportOnly: true },
      ...(anyOut ? [{ quantity: "", align: "left" } as const] : []),
    ],
    rows,
    notes: bandNotes(bands),
  };
}

function bandNotes(bands: SeriesResult["bands"]): string[] {
  return [...correctedNotes(bands), ...openNotes(bands)];
}

function correctedNotes(bands: SeriesResult["bands"]): string[] {
  const corrected = bands.filter(({ twoLevels }) => twoLevels !== null).map(({ label }) => label);
  if (corrected.length === 0) return [];
  return [`Corrected for a companion: ${andList(corrected)}; what is fitted and compared is the corrected position.`];
}

function openNotes(bands: SeriesResult["bands"]): string[] {
  const open = bands.filter((band) => band.used && band.studentizedResidual === null);
  if (open.length === 0) return [];
  const which =
    open.length === bands.filter(({ used }) => used).length ? "" : ` of ${andList(open.map((b) => b.label))}`;
  return [
    `Studentised residual${which} ${notDetermined}: too few degrees of freedom, or the band alone fixes a constant.`,
  ];
}

/** A sentence for each band left out of the fit, with the reason the input gives. */
export function exclusions({ bands }: SeriesResult): string[] {
  return bands
    .filter(({ used }) => !used)
    .map(({ label, note }) => `${label} is not used: ${note ?? "no reason was noted"}.`);
}
