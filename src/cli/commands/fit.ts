import { documentHead, fitEach } from "../../commands/fit.ts";
import { gather } from "../../commands/gather.ts";
import { EXIT } from "../../messages/index.ts";
import { renderFit } from "../../reporting/terminal/index.ts";
import type { Job } from "../job.ts";
import { requestOf } from "../request-of.ts";
import { tell } from "../tell.ts";

/** `rungwise fit` */
export const fitJob: Job = async (asked, console) => {
  const request = requestOf(asked);
  const gathered = await gather(request);
  const head = await documentHead(gathered, request);
  const document = { ...head, series: [...fitEach(gathered)] };
  if (asked.options.json === true) {
    const { renderJson } = await import("../../reporting/json.ts");
    console.out(renderJson(document));
  } else {
    console.out(
      renderFit(document, {
        colour: console.colourOut,
        notation: gathered.options.notation,
        quiet: console.quiet,
        symbols: gathered.options.symbols,
      }),
    );
  }
  tell(document, console);
  return EXIT.done;
};
