import { statSync } from "node:fs";
import { dirname, join } from "node:path";
import { formatOf } from "../../bands/index.ts";
import { check } from "../../commands/check.ts";
import { EXIT } from "../../messages/index.ts";
import { renderCheck } from "../../reporting/terminal/index.ts";
import type { Job } from "../job.ts";
import { fault, readText } from "../load-input.ts";

/** `rungwise check`: a report made again in memory and compared. */
export const checkJob: Job = async ({ argument, options }, console) => {
  const asked = argument[0] ?? ".";
  const folder = statSync(asked, { throwIfNoEntry: false })?.isDirectory() === true;
  const result = folder ? join(asked, "result.json") : asked;
  const stored = { text: readText(result), source: result };
  const name = inputName(stored.text);
  if (name === null)
    throw fault(result, "no-input", "names no input beside it", "check a report, which keeps its input");
  const source = join(dirname(result), name);
  const document = await check({
    stored,
    input: { text: readText(source), source: name, format: formatOf(name) ?? "csv" },
  });
  if (options.json === true) {
    const { renderJson } = await import("../../reporting/json.ts");
    console.out(renderJson(document));
  } else console.out(renderCheck(document, result));
  return document.ok ? EXIT.done : EXIT.wrongInput;
};

/** The input a stored result names; null where it names none. What is no JSON is found out later. */
function inputName(text: string): string | null {
  try {
    const source = JSON.parse(text)?.input?.source;
    return typeof source === "string" && /^[\w.-]+$/.test(source) ? source : null;
  } catch {
    return "input.toml";
  }
}
