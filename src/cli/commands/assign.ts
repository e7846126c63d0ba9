import { type AssignRequest, assign } from "../../commands/assign.ts";
import { EXIT } from "../../messages/index.ts";
import { renderAssignment } from "../../reporting/terminal/index.ts";
import type { Job } from "../job.ts";
import { requestOf } from "../request-of.ts";
import { tell } from "../tell.ts";

/** `rungwise assign` */
export const assignJob: Job = async (asked, console) => {
  const document = await assign(requestOf(asked) as AssignRequest);
  if (asked.options.json === true) {
    const { renderJson } = await import("../../reporting/json.ts");
    console.out(renderJson(document));
  } else console.out(renderAssignment(document, { colour: console.colourOut }));
  tell(document, console);
  return EXIT.done;
};
