import { convert } from "../../commands/convert.ts";
import { EXIT } from "../../messages/index.ts";
import { renderConversion } from "../../reporting/terminal/index.ts";
import type { Job } from "../job.ts";
import { textOption } from "../request-of.ts";
import { tell } from "../tell.ts";

/** `rungwise convert` */
export const convertJob: Job = async ({ argument, options }, console) => {
  const given = Object.entries({
    to: textOption(options.to),
    unit: textOption(options.unit),
    medium: textOption(options.medium),
    toMedium: textOption(options["to-medium"]),
    air: textOption(options.air),
    sigma: textOption(options.sigma),
  }).filter(([, value]) => value !== undefined);
  const document = convert({ to: "", ...Object.fromEntries(given), values: argument });
  if (options.json === true) {
    const { renderJson } = await import("../../reporting/json.ts");
    console.out(renderJson(document));
  } else console.out(renderConversion(document));
  tell(document, console);
  return EXIT.done;
};
