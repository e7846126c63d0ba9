import { analyse, compareAll, type FitDocument, type SeriesResult } from "../analysis/index.ts";
import type { Series } from "../bands/index.ts";
import { InputError } from "../messages/index.ts";
import { type Gathered, gather } from "./gather.ts";
import type { FitRequest } from "./request.ts";
import { tool } from "./tool.ts";

/**
 * Fit every series of a request and derive everything that follows: constants, dissociation, predictions, stability.
 * @returns the document that `rungwise fit --json` prints; energies in cm-1
 * @throws InputError exit 2 for a wrong request or input, exit 3 when the data do not determine the constants
 */
export async function fit(request: FitRequest): Promise<FitDocument> {
  const gathered = await gather(request);
  return { ...(await documentHead(gathered, request)), series: [...fitEach(gathered)] };
}

/** The results one after the other, so that long files need not be held whole. */
export function* fitEach({ series, options, optionsOf }: Gathered): Generator<SeriesResult> {
  for (const one of series) yield named(one, () => analyse(one, options.model, optionsOf(one)));
}

/** Everything of the document but the series. */
export async function documentHead(gathered: Gathered, request: FitRequest): Promise<Omit<FitDocument, "series">> {
  const { comparisons, warnings } = compareAll(
    gathered.series,
    gathered.options.model,
    gathered.optionsOf,
    gathered.given,
  );
  return {
    schemaVersion: 1,
    tool,
    request: Object.fromEntries(
      [...gathered.settings].map(([name, { value }]) => [name, value] as const).sort(([a], [b]) => (a < b ? -1 : 1)),
    ),
    input: request.input === undefined ? null : await identify(request.input.source, request.input.text),
    warnings: [...gathered.warnings, ...warnings],
    comparisons,
  };
}

async function identify(source: string, text: string): Promise<FitDocument["input"]> {
  const { createHash } = await import("node:crypto");
  return { source, sha256: createHash("sha256").update(text).digest("hex") };
}

/** A fault inside one of several series says which. */
function named(series: Series, work: () => SeriesResult): SeriesResult {
  try {
    return work();
  } catch (error) {
    if (error instanceof InputError || !(error instanceof Error)) throw error;
    error.message = `series "${series.name}": ${error.message}`;
    throw error;
  }
}
