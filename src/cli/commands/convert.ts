import { convert } from "../../commands/convert.ts";
import { convertConstants } from "../../commands/convert-constants.ts";
import { EXIT } from "../../messages/index.ts";
import { renderConstants, renderConversion } from "../../reporting/terminal/index.ts";
import type { Job } from "../job.ts";
import { fault, readText } from "../load-input.ts";
import { textOption } from "../request-of.ts";
import { tell } from "../tell.ts";

/** `rungwise convert` */
export const convertJob: Job = async ({ argument, options }, console) => {
  const [file] = argument;
  const isStored = file?.toLowerCase().endsWith(".json") === true;
  const constants = textOption(options.constants);
  if (constants !== undefined || isStored) {
    if (argument.length > (isStored ? 1 : 0) || (isStored && constants !== undefined))
      throw fault(
        "convert",
        "source-twice",
        "positions and constants stand side by side",
        "convert one of them at a time",
      );
    const correlation = textOption(options.correlation);
    const document = convertConstants({
      to: textOption(options.to) ?? "",
      ...(constants === undefined ? {} : { constants }),
      ...(correlation === undefined ? {} : { correlation }),
      ...(isStored ? { stored: { text: readText(file!), source: file! } } : {}),
    });
    if (options.json === true) {
      const { renderJson } = await import("../../reporting/json.ts");
      console.out(renderJson(document));
    } else console.out(renderConstants(document, { colour: console.colourOut }));
    tell(document, console);
    return EXIT.done;
  }
  if (argument.length === 0)
    throw fault(
      "convert",
      "nothing-to-convert",
      "there is nothing to convert",
      "give positions, --constants, or a result.json",
    );
  if (options.correlation !== undefined)
    throw fault(
      "--correlation",
      "correlation-alone",
      "positions have no correlation here",
      "leave it out, or give --constants",
    );
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
