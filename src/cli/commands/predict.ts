import { type PredictRequest, predict } from "../../commands/predict.ts";
import { EXIT } from "../../messages/index.ts";
import { renderPredictions } from "../../reporting/terminal/index.ts";
import type { Job } from "../job.ts";
import { fault, readText } from "../load-input.ts";
import { requestOf, textOption } from "../request-of.ts";
import { tell } from "../tell.ts";

/** `rungwise predict` */
export const predictJob: Job = async (asked, console) => {
  const [file] = asked.argument;
  const stored = file?.toLowerCase().endsWith(".json") ? { text: readText(file), source: file } : null;
  const hot = textOption(asked.options.hot) ?? "0";
  if (!/^\d{1,3}$/.test(hot))
    throw fault("--hot", "not-a-level", `"${hot}" is not a level`, "write a whole number such as 1");
  const request: PredictRequest = {
    ...requestOf(stored === null ? asked : { ...asked, argument: [] }),
    ...(stored === null ? {} : { stored }),
    hot: Number(hot),
  };
  const document = await predict(request);
  if (asked.options.json === true) {
    const { renderJson } = await import("../../reporting/json.ts");
    console.out(renderJson(document));
  } else console.out(renderPredictions(document, { colour: console.colourOut }));
  tell(document, console);
  return EXIT.done;
};
