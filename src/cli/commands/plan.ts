import { type PlanRequest, plan } from "../../commands/plan.ts";
import { EXIT } from "../../messages/index.ts";
import { renderPlan } from "../../reporting/terminal/index.ts";
import type { Job } from "../job.ts";
import { readText } from "../load-input.ts";
import { requestOf, textOption } from "../request-of.ts";
import { tell } from "../tell.ts";

/** `rungwise plan` */
export const planJob: Job = async (asked, console) => {
  const hot = textOption(asked.options.hot);
  const [file] = asked.argument;
  const stored = file?.toLowerCase().endsWith(".json") ? { text: readText(file), source: file } : null;
  const request = requestOf(stored === null ? asked : { ...asked, argument: [] }) as PlanRequest;
  const document = await plan({
    ...request,
    ...(stored === null ? {} : { stored }),
    ...(hot === undefined ? {} : { hot }),
  });
  if (asked.options.json === true) {
    const { renderJson } = await import("../../reporting/json.ts");
    console.out(renderJson(document));
  } else console.out(renderPlan(document, { colour: console.colourOut }));
  tell(document, console);
  return EXIT.done;
};
