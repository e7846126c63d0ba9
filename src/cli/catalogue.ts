import {
  assignFlags,
  bandFlags,
  commonFlags,
  convertFlags,
  type Flag,
  fitFlags,
  moleculeFlags,
  planFlags,
  predictFlags,
  reportFlags,
} from "./flags.ts";
import type { Job } from "./job.ts";

/** A command: what help says of it, and where its work is found when it is asked for. */
export interface Entry {
  readonly name: string;
  readonly summary: string;
  readonly argument: string | null;
  readonly groups: readonly { readonly title: string; readonly flags: readonly Flag[] }[];
  /** tried by the tests as they stand */
  readonly examples: readonly string[];
  readonly load: () => Promise<Job>;
}

const bands = { title: "Bands:", flags: bandFlags };
const molecule = { title: "Molecule:", flags: moleculeFlags };
const fitting = { title: "Fit:", flags: fitFlags };
/** Resonances are looked for where a fit is shown; a plan has windows of its own. */
const fittingAlone = { title: "Fit:", flags: fitFlags.filter(({ name }) => name !== "window" && name !== "modes") };
const common = { title: "Output:", flags: commonFlags };

export const catalogue: readonly Entry[] = [
  {
    name: "fit",
    summary: "fit a band series: constants, dissociation energies, predictions",
    argument: "[FILE]",
    groups: [bands, molecule, fitting, common],
    examples: [
      'rungwise fit --series "2885.98 5667.98 8346.78" --bond "1H 35Cl"',
      'rungwise fit --bands "1-0 2885.98(2), 3-0 8346.78(5), 2-1 2782.0(1)" --json',
    ],
    load: async () => (await import("./commands/fit.ts")).fitJob,
  },
  {
    name: "report",
    summary: "fit, and write a folder with report.md, figures and tables",
    argument: "[FILE]",
    groups: [{ title: "Folder:", flags: reportFlags }, bands, molecule, fitting, common],
    examples: ['rungwise report --series "2885.98 5667.98 8346.78" --bond "1H 35Cl" --out hcl'],
    load: async () => (await import("./commands/report.ts")).reportJob,
  },
  {
    name: "predict",
    summary: "band positions from bands, a stored result.json, or constants",
    argument: "[FILE]",
    groups: [{ title: "Predictions:", flags: predictFlags }, bands, molecule, fittingAlone, common],
    examples: [
      'rungwise predict --constants "we=2990.95(1) wexe=52.82(1)" --up-to 7',
      'rungwise predict --series "2885.98 5667.98 8346.78" --up-to 6 --hot 1',
    ],
    load: async () => (await import("./commands/predict.ts")).predictJob,
  },
  {
    name: "assign",
    summary: "label peaks of which only positions are known",
    argument: "[FILE]",
    groups: [{ title: "Peaks:", flags: assignFlags }, common],
    examples: [
      'rungwise assign --peaks "2886 5668 6120 8347 9900 10923" --sigma 1',
      'rungwise assign --peaks "3600 3527 7035 6881 10306 10061" --ladders 2',
    ],
    load: async () => (await import("./commands/assign.ts")).assignJob,
  },
  {
    name: "plan",
    summary: "which band to measure next, and where to look for it",
    argument: "[FILE]",
    groups: [{ title: "Plan:", flags: planFlags }, bands, molecule, fittingAlone, common],
    examples: [
      'rungwise plan --series "2885.98 5667.98" --sigma 0.02 --aim wexe',
      'rungwise plan --series "2885.98 5667.98" --sigma 0.02 --aim d0 --up-to 7',
    ],
    load: async () => (await import("./commands/plan.ts")).planJob,
  },
  {
    name: "convert",
    summary: "positions to another unit or medium, constants to another form",
    argument: "[VALUE...]",
    groups: [{ title: "Conversion:", flags: convertFlags }, common],
    examples: [
      "rungwise convert 1197.7 745.286(10) --unit nm --medium air --to cm-1",
      'rungwise convert "8347.05(7)" --to nm --to-medium air',
      'rungwise convert --constants "we=2990.9(1) wexe=52.8(1)" --to polynomial',
    ],
    load: async () => (await import("./commands/convert.ts")).convertJob,
  },
  {
    name: "check",
    summary: "make a stored report again in memory and compare every number",
    argument: "[DIR]",
    groups: [common],
    examples: ["rungwise check hcl"],
    load: async () => (await import("./commands/check.ts")).checkJob,
  },
  {
    name: "datasets",
    summary: "list the published series that come along, or print one",
    argument: "[NAME]",
    groups: [common],
    examples: ["rungwise datasets", "rungwise datasets hcl-h35cl"],
    load: async () => (await import("./commands/datasets.ts")).datasetsJob,
  },
];
