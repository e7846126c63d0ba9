import { Command, Option } from "commander";
import { tool } from "../commands/tool.ts";
import { catalogue, type Entry } from "./catalogue.ts";
import type { Asked } from "./job.ts";

const CLOSING = `
Results go to standard output, messages to standard error.
Exit codes: 0 done, 2 the request or the input is wrong, 3 the data cannot
determine what was asked, 1 a fault of Rungwise.`;

/** What a parse came to: a command to run. */
export interface Chosen {
  readonly entry: Entry;
  readonly asked: Asked;
}

/**
 * The command line as commander sees it. Options are added only to the command that is used: start-up stays short.
 * @throws CommanderError for help, version and usage faults
 */
export function parse(
  words: readonly string[],
  write: { out: (s: string) => void; err: (s: string) => void },
): Promise<Chosen | null> {
  let chosen: Chosen | null = null;
  const program = new Command("rungwise")
    .description(
      "From observed vibrational bands of a diatomic or a local-mode X-H bond to\nconstants, dissociation energies and predictions with honest uncertainties.",
    )
    .version(tool.version, "-V, --version", "print the version")
    .helpOption("-h, --help", "show help")
    .helpCommand("help [command]", "show help for a command")
    .addHelpText("after", `\nExample:\n  ${catalogue[0]!.examples[0]}\n${CLOSING}`)
    .configureHelp({ helpWidth: 80 })
    .configureOutput({ writeOut: write.out, writeErr: write.err, getOutHelpWidth: () => 80, getErrHelpWidth: () => 80 })
    .showSuggestionAfterError(true)
    .exitOverride();
  for (const entry of catalogue) {
    const command = program.command(`${entry.name}${entry.argument === null ? "" : ` ${entry.argument}`}`);
    command.summary(entry.summary).copyInheritedSettings(program);
    command.action((...given: unknown[]) => {
      const argument = entry.argument === null ? [] : [given[0]].flat();
      chosen = {
        entry,
        asked: {
          argument: argument.filter((word) => typeof word === "string"),
          options: longNames(command),
          words,
        },
      };
    });
  }
  program.hook("preSubcommand", (_, command) => {
    const entry = catalogue.find(({ name }) => name === command.name());
    if (entry !== undefined) describe(command, entry);
  });
  // `help fit` skips the hook that describes a command, `fit --help` does not.
  const [first, second] = words;
  const asked = first === "help" && second !== undefined ? [second, "--help"] : words;
  return program.parseAsync(asked as string[], { from: "user" }).then(() => chosen);
}

function describe(command: Command, entry: Entry): void {
  command.description(`${entry.summary.replace(/^./, (letter) => letter.toUpperCase())}.`);
  command.helpOption("-h, --help", "show help");
  for (const { title, flags } of entry.groups) {
    command.optionsGroup(title);
    for (const { name, short, value, help, repeats } of flags) {
      const words = `${short === undefined ? "" : `-${short}, `}--${name}${value === null ? "" : ` <${value}>`}`;
      const option = new Option(words, help);
      if (repeats === true)
        option.argParser<string>((next, before) => (before === undefined ? next : `${before}, ${next}`));
      command.addOption(option);
    }
  }
  const file = entry.argument === "[FILE]" ? "\nFILE is .csv, .tsv or .toml; - reads standard input.\n" : "";
  command.addHelpText("after", `${file}\nExamples:\n${entry.examples.map((line) => `  ${line}`).join("\n")}`);
}

/** Values by long name; a negated switch (`--no-color`) appears as `no-color`. */
function longNames(command: Command): Record<string, string | true> {
  const values: Record<string, string | true> = {};
  for (const option of command.options) {
    const value = command.getOptionValue(option.attributeName());
    const name = option.long!.slice(2);
    if (option.negate ? value === false : value !== undefined && value !== false)
      values[name] = option.negate ? true : value;
  }
  return values;
}
