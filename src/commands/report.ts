import type { FitDocument } from "../analysis/index.ts";
import { type FigureAssets, figuresFor, renderFigures } from "../reporting/figures/index.ts";
import { bandsCsv, constantsCsv, predictionsCsv, renderJson, renderReport } from "../reporting/index.ts";
import { documentHead, fitEach } from "./fit.ts";
import { gather } from "./gather.ts";
import { type FitRequest, type InputText, requestSettings } from "./request.ts";
import { settingsToml } from "./settings-toml.ts";

/** What `report` may be told beside the fit. */
export interface ReportRequest extends FitRequest {
  /** width of the figures in mm, 85 or 171; @default 85 */
  readonly width?: number;
}

/** A file of a report, named relative to its folder. */
export interface ReportFile {
  readonly name: string;
  readonly content: string | Uint8Array;
}

/** A report: the document behind it and its files. */
export interface Report {
  readonly document: FitDocument;
  readonly files: readonly ReportFile[];
}

/**
 * Fit, and compose a report folder: report.md, figures, tables, result.json and a copy of the input. Nothing is written.
 * Identical requests give identical bytes.
 * @throws InputError as `fit`
 */
export async function report(request: ReportRequest, assets?: FigureAssets): Promise<Report> {
  const { width = 85, ...rest } = request;
  // Faults name what the user gave; the document names what the report keeps, so that it can be made again to the byte.
  await gather(rest);
  const { request: kept, input, again } = reproducible(rest);
  const gathered = await gather(kept);
  const head = await documentHead(gathered, kept);
  const document: FitDocument = { ...head, series: [...fitEach(gathered)] };
  const { notation, symbols } = gathered.options;
  const specs = figuresFor(document.series, { widthMm: width, notation }, document.comparisons);
  const pictures = await renderFigures(specs, assets);
  const figures = specs.map(({ name, caption, alt }) => ({ name, file: `figures/${name}.png`, caption, alt }));
  return {
    document,
    files: [
      {
        name: "report.md",
        content: renderReport(document, {
          commandLine: again,
          figures,
          notation,
          symbols,
          modelReferences: gathered.options.model.references,
          ...(gathered.options.model.definition === undefined
            ? {}
            : { modelDefinition: gathered.options.model.definition }),
        }),
      },
      ...pictures.map((content, i) => ({ name: figures[i]!.file, content })),
      { name: "bands.csv", content: bandsCsv(document) },
      { name: "constants.csv", content: constantsCsv(document) },
      { name: "predictions.csv", content: predictionsCsv(document) },
      { name: "result.json", content: renderJson(document) },
      { name: input.source, content: input.text },
    ],
  };
}

/** The request with the input under the name it has in the report, and the command that makes the report again from there. */
function reproducible(request: FitRequest): { request: FitRequest; input: InputText; again: string } {
  const { input, ...flags } = request;
  if (input === undefined) {
    const source = "input.toml";
    const toml: InputText = { text: settingsToml(requestSettings(request)), source, format: "toml" };
    return {
      request: { input: toml },
      input: toml,
      again: `rungwise report ${source} --out again`,
    };
  }
  const source = `input.${input.format}`;
  const words = [...requestSettings(flags)].map(([name, { value }]) => `--${name} ${quoted(value)}`);
  const named = { ...input, source };
  return {
    request: { ...flags, input: named },
    input: named,
    again: ["rungwise report", source, ...words, "--out again"].join(" "),
  };
}

/** A word as a POSIX shell takes it. */
const quoted = (word: string) => (/^[\w.,:=+/-]+$/.test(word) ? word : `'${word.replaceAll("'", String.raw`'\''`)}'`);
