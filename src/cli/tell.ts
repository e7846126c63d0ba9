import type { Warning } from "../messages/index.ts";
import { renderWarnings } from "../reporting/terminal/index.ts";
import type { Console } from "./job.ts";

/** Warnings to standard error, each series' under its name when there are several; nothing with --quiet. */
export function tell(
  document: {
    readonly warnings: readonly Warning[];
    readonly series?: readonly { readonly name: string; readonly warnings: readonly Warning[] }[];
  },
  console: Console,
): void {
  if (console.quiet) return;
  const several = (document.series?.length ?? 0) > 1;
  const blocks = [
    { head: "", warnings: document.warnings },
    ...(document.series ?? []).map(({ name, warnings }) => ({ head: several ? `${name}\n` : "", warnings })),
  ];
  for (const { head, warnings } of blocks)
    if (warnings.length > 0) console.err(`\n${head}${renderWarnings(warnings, { colour: console.colourErr })}`);
}
