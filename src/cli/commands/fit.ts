import type { FitDocument, SeriesResult } from "../../analysis/index.ts";
import { documentHead, fitEach } from "../../commands/fit.ts";
import { type Gathered, gather } from "../../commands/gather.ts";
import { EXIT, type Warning } from "../../messages/index.ts";
import { renderFit } from "../../reporting/terminal/index.ts";
import type { Console, Job } from "../job.ts";
import { requestOf } from "../request-of.ts";
import { tell } from "../tell.ts";

/** More series than this are printed as they come, so that memory stays flat; fewer only when all of them could be fitted. */
const HELD = 200;

/** `rungwise fit` */
export const fitJob: Job = async (asked, console) => {
  const request = requestOf(asked);
  const gathered = await gather(request);
  const head = await documentHead(gathered, request);
  const told: { name: string; warnings: readonly Warning[] }[] = [];
  const results = gathered.series.length > HELD ? fitEach(gathered) : [...fitEach(gathered)];
  if (asked.options.json === true) {
    const { renderJsonPieces } = await import("../../reporting/json.ts");
    for (const piece of renderJsonPieces(head, noting(results, told))) {
      console.out(piece);
      await console.settled();
    }
  } else await print(gathered, head.comparisons, results, told, console);
  tell({ warnings: head.warnings, series: told }, console);
  return EXIT.done;
};

/** Remember what is to be told of each result, and nothing else of it. */
function* noting(
  results: Iterable<SeriesResult>,
  told: { name: string; warnings: readonly Warning[] }[],
): Generator<SeriesResult> {
  for (const result of results) {
    told.push({ name: result.name, warnings: result.warnings });
    yield result;
  }
}

async function print(
  { options: { notation, symbols } }: Gathered,
  comparisons: FitDocument["comparisons"],
  results: Iterable<SeriesResult>,
  told: { name: string; warnings: readonly Warning[] }[],
  console: Console,
): Promise<void> {
  const options = { colour: console.colourOut, notation, quiet: console.quiet, symbols };
  if (Array.isArray(results)) {
    console.out(renderFit({ series: [...noting(results, told)], comparisons }, options));
    return;
  }
  for (const result of noting(results, told)) {
    console.out(`${renderFit({ series: [result], comparisons: [] }, options)}\n`);
    await console.settled();
  }
}
