import { EXIT, formatFault, InputError } from "../messages/index.ts";
import { colourise, wantsColour } from "./colour.ts";
import type { Console } from "./job.ts";
import { openOutput } from "./output.ts";
import { parse } from "./program.ts";

/** Run one command line; every outcome ends as an exit code. */
export async function run(words: readonly string[]): Promise<number> {
  const output = openOutput(1);
  const errors = openOutput(2);
  const { write: out } = output;
  const { write: err } = errors;
  const debug = words.includes("--debug");
  try {
    if (words.length === 0) return await usage(out, err);
    const chosen = await parse(words, { out, err });
    if (chosen === null) return EXIT.done;
    const { options } = chosen.asked;
    const plain = options["no-color"] === true;
    const console: Console = {
      out,
      settled: output.settled,
      err,
      colourOut: !plain && wantsColour(output),
      colourErr: !plain && wantsColour(errors),
      quiet: options.quiet === true,
    };
    const job = await chosen.entry.load();
    return await job(chosen.asked, console);
  } catch (error) {
    return report(error, err, debug, !words.includes("--no-color") && wantsColour(errors));
  }
}

/** Help on standard error, when nothing was asked. */
async function usage(_: (s: string) => void, err: (s: string) => void): Promise<number> {
  await parse(["--help"], { out: err, err }).catch(() => null);
  return EXIT.wrongInput;
}

function report(error: unknown, err: (s: string) => void, debug: boolean, colour: boolean): number {
  if (error instanceof InputError) {
    const word = colourise("error:", "red", colour);
    err(`${error.faults.map((fault) => `${word} ${formatFault(fault)}`).join("\n")}\n`);
    return error.exit;
  }
  if (isCommanderError(error)) {
    // Help and version end here too; commander has printed everything already.
    return error.exitCode === 0 ? EXIT.done : EXIT.wrongInput;
  }
  const message = error instanceof Error ? error.message : String(error);
  err(`error: something failed inside Rungwise: ${message}; run again with --debug for a trace\n`);
  if (debug && error instanceof Error) err(`${error.stack}\n`);
  return EXIT.ourFault;
}

function isCommanderError(error: unknown): error is { exitCode: number } {
  return (
    error instanceof Error && "code" in error && String(error.code).startsWith("commander.") && "exitCode" in error
  );
}
