import type { FitDocument } from "../../analysis/index.ts";
import { constantsSet } from "../../quantity/index.ts";
import { table } from "./table.ts";
import { fenced, verbatim } from "./typeset.ts";

/** How to get the same again: command line, version, input with its hash, constants, masses, settings. */
export function reproduction({ tool, input, request, series }: FitDocument, commandLine: string): string {
  const masses = series.some(({ bond }) => bond !== null && !bond.startsWith("reduced mass"));
  const facts = [
    `- version: ${verbatim(tool.name)} ${verbatim(tool.version)}`,
    `- input: ${input === null ? "settings alone" : `${verbatim(input.source)}, sha256 \`${input.sha256}\``}`,
    `- constants: ${constantsSet}`,
    ...(masses
      ? [
          "- isotope masses: AME2020 for H, D, T, 11B, Cl, Br and I; an earlier evaluation, alike to 2e-8, for the others",
        ]
      : []),
  ];
  const settings = Object.entries(request);
  return [
    fenced(commandLine, "sh"),
    facts.join("\n"),
    ...(settings.length === 0
      ? []
      : [
          table({
            columns: [
              { quantity: "setting", align: "left" },
              { quantity: "value", align: "left" },
            ],
            rows: settings.map(([name, value]) => ({ cells: [name, value] })),
            notes: [],
          }),
        ]),
    "The same command, version and input give the same bytes. Full precision stands in result.json, bands.csv, constants.csv (with the covariance) and predictions.csv.",
  ].join("\n\n");
}
