import type { FitDocument, SeriesResult } from "../analysis/index.ts";
import { type CsvCell, csvText } from "./csv-text.ts";

/** Who wrote a file, from which bytes; no colon, so that it is no setting when the file is read again. */
function origin({ tool, input }: FitDocument): string {
  const from = input === null ? "from a request without a file" : `from ${input.source} with sha256 ${input.sha256}`;
  return `written by ${tool.name} ${tool.version} ${from.replaceAll(":", " ")}`;
}

/** Settings that say how bands are fitted, not how positions are read (those are in cm-1 and vacuum here). */
const CARRIED = [
  "model",
  "terms",
  "fix",
  "spacings",
  "air",
  "phase",
  "be",
  "alpha-e",
  "re",
  "excess",
  "scatter",
  "coverage",
];
const ALSO_CARRIED = ["notation", "up-to"];

/** What gives the same fit when the file is read again, as `name: value`. */
function settings({ series, request }: FitDocument): string[] {
  const [first] = series;
  const bond = first !== undefined && series.every((one) => one.bond === first.bond) ? first.bond : null;
  const paired = bond !== null && !bond.startsWith("reduced mass");
  const mass = bond !== null && !paired ? first!.reducedMass : null;
  return [
    ...(paired ? [`bond: ${bond}`] : []),
    ...(mass === null ? [] : [`reduced-mass: ${mass}`]),
    ...[...CARRIED, ...ALSO_CARRIED].flatMap((name) =>
      request[name] === undefined ? [] : [`${name}: ${request[name]}`],
    ),
  ];
}

/**
 * Bands as used beside their calculated positions, in cm-1 and vacuum. The first eight columns and the settings above them
 * are input again; the shared part of the uncertainty is not among them. A band corrected for a companion stands there as corrected.
 */
export function bandsCsv(document: FitDocument): string {
  const head = ["band", "position", "unit", "medium", "sigma", "series", "use", "note"];
  const more = ["calculated", "residual", "studentized_residual", "leverage", "left_out_residual"];
  const read = ["as_read", "as_read_sigma", "as_read_unit", "as_read_medium"];
  const corrected = document.series.some(({ bands }) => bands.some(({ twoLevels }) => twoLevels !== null));
  const rows = document.series.flatMap(({ name, bands }) =>
    bands.map((band): CsvCell[] => [
      ...[band.label, band.observed, "cm-1", "vacuum", band.standardUncertainty, name, band.used, band.note],
      ...[band.calculated, band.residual, band.studentizedResidual, band.leverage, band.leftOutResidual],
      ...[band.asRead.text, band.asRead.sigmaText, band.asRead.unit, band.asRead.medium],
      ...(corrected ? companionCells(band.twoLevels) : []),
    ]),
  );
  return csvText(
    [origin(document), ...settings(document)],
    [...head, ...more, ...read, ...(corrected ? COMPANION_COLUMNS : [])],
    rows,
  );
}

/** Only where a band was corrected for a companion: `position` is then the corrected one, `measured_position` that before it. */
const COMPANION_COLUMNS = [
  "measured_position",
  "measured_sigma",
  "companion_position",
  "companion_sigma",
  "companion_ratio",
  "companion_ratio_sigma",
  "companion_coupling",
  "companion_coupling_sigma",
  "companion_shift",
  "companion_shift_sigma",
  "as_read_companion",
  "as_read_ratio",
];

function companionCells(pair: SeriesResult["bands"][number]["twoLevels"]): CsvCell[] {
  if (pair === null) return COMPANION_COLUMNS.map(() => null);
  return [
    ...[pair.measured, pair.measuredSigma, pair.companion, pair.companionSigma, pair.ratio, pair.ratioSigma],
    ...[pair.coupling, pair.couplingSigma, pair.shift, pair.shiftSigma, pair.asRead.companion, pair.asRead.ratio],
  ];
}

/** Constants with their covariance, one column `covariance_KEY` a constant (unit: product of both units). */
export function constantsCsv(document: FitDocument): string {
  const keys = [...new Set(document.series.flatMap(({ constants }) => Object.keys(constants)))];
  const head = [
    "series",
    "constant",
    "value",
    "standard_uncertainty",
    "interval95_low",
    "interval95_high",
    "unit",
    "held",
  ];
  const rows = document.series.flatMap(({ name, constants, held, correlation, covariance }) =>
    Object.entries(constants).map(([key, q]): CsvCell[] => {
      const at = correlation?.order.indexOf(key) ?? -1;
      const line = keys.map((other) => covariance?.[at]?.[correlation?.order.indexOf(other) ?? -1]);
      const interval = [q.interval95?.[0], q.interval95?.[1]];
      return [name, key, q.value, q.standardUncertainty, ...interval, q.unit, held.includes(key), ...line];
    }),
  );
  return csvText([origin(document)], [...head, ...keys.map((key) => `covariance_${key}`)], rows);
}

/** Every predicted band, those observed too; positions in cm-1 and vacuum, wavelengths in nm. */
export function predictionsCsv(document: FitDocument): string {
  const head = [
    "series",
    "band",
    "position",
    "unit",
    "medium",
    "standard_uncertainty",
    "interval95_low",
    "interval95_high",
  ];
  const more = ["last_band_out", "vacuum_wavelength_nm", "air_wavelength_nm", "observed"];
  const rows = document.series.flatMap(({ name, predictions }) =>
    predictions.map(({ label, position: q, lastBandOut, vacuumWavelength, airWavelength, observed }): CsvCell[] => [
      ...[name, label, q.value, "cm-1", "vacuum", q.standardUncertainty, q.interval95?.[0], q.interval95?.[1]],
      ...[lastBandOut, vacuumWavelength, airWavelength, observed],
    ]),
  );
  return csvText([origin(document)], [...head, ...more], rows);
}
