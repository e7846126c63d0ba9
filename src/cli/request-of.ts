import type { FitRequest } from "../commands/request.ts";
import type { Asked } from "./job.ts";
import { loadInput } from "./load-input.ts";

/** Options that are about the command itself and no setting of a fit. */
const OWN = new Set([
  "json",
  "quiet",
  "no-color",
  "debug",
  "format",
  "out",
  "force",
  "width",
  "hot",
  "to",
  "to-medium",
]);

/** The request a command line makes. */
export function requestOf({ argument, options }: Asked): FitRequest {
  const input = loadInput(argument, textOption(options.format));
  const settings = Object.entries(options).filter(([name]) => !OWN.has(name));
  return {
    ...(input === null ? {} : { input }),
    ...Object.fromEntries(settings.map(([name, value]) => [camel(name), value])),
  };
}

/** The value of an option that takes one. */
export const textOption = (value: string | true | undefined): string | undefined =>
  typeof value === "string" ? value : undefined;

const camel = (name: string) => name.replace(/-([a-z])/g, (_, letter: string) => letter.toUpperCase());
