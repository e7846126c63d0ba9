import { report } from "../../commands/report.ts";
import { EXIT } from "../../messages/index.ts";
import type { Job } from "../job.ts";
import { fault } from "../load-input.ts";
import { checkFolder, writeFolder } from "../report-folder.ts";
import { requestOf, textOption } from "../request-of.ts";
import { tell } from "../tell.ts";

const WIDTHS = ["85", "171"];

/** `rungwise report` */
export const reportJob: Job = async (asked, console) => {
  const { options } = asked;
  const out = textOption(options.out);
  if (out === undefined || out.trim() === "")
    throw fault("--out", "no-folder", "a report needs a folder to go to", "write --out DIR");
  const width = textOption(options.width) ?? "85";
  if (!WIDTHS.includes(width))
    throw fault("--width", "unknown-width", `"${width}" is not a width`, `write ${WIDTHS.join(" or ")}`);
  checkFolder(out, options.force === true);
  const { document, files } = await report({ ...requestOf(asked), width: Number(width) });
  writeFolder(out, files);
  if (options.json === true) {
    const { renderJson } = await import("../../reporting/json.ts");
    console.out(renderJson(document));
  } else {
    console.out(`${out}/report.md\n`);
  }
  tell(document, console);
  return EXIT.done;
};
