import { readFileSync, statSync } from "node:fs";
import { formatOf } from "../bands/index.ts";
import type { InputText } from "../commands/request.ts";
import { InputError } from "../messages/index.ts";

const FORMATS = ["csv", "tsv", "toml"] as const;

/** Read FILE (`-`: standard input); null when none was named. Throws InputError with the place and the mend. */
export function loadInput(argument: readonly string[], format: string | undefined): InputText | null {
  const [file] = argument;
  const chosen = FORMATS.find((name) => name === format);
  if (format !== undefined && chosen === undefined)
    throw fault("--format", "unknown-format", `"${format}" is not a format`, "write csv, tsv or toml");
  if (file === undefined) return null;
  if (file === "-") return { text: readFileSync(0, "utf8"), source: "standard input", format: chosen ?? "csv" };
  return { text: readText(file), source: file, format: chosen ?? formatByName(file) };
}

function formatByName(file: string): InputText["format"] {
  const format = formatOf(file);
  if (format === null)
    throw fault(
      file,
      "unknown-format",
      "the ending does not say how to read it",
      "use .csv, .tsv or .toml, or say --format csv",
    );
  return format;
}

/** The text of a file; what cannot be read is a fault of the request. */
export function readText(file: string): string {
  const about = statSync(file, { throwIfNoEntry: false });
  if (about === undefined)
    throw fault(file, "no-such-file", "there is no such file", "check the name, or run in the folder that holds it");
  if (about.isDirectory()) throw fault(file, "directory", "is a directory", "name a .csv, .tsv or .toml file in it");
  try {
    return readFileSync(file, "utf8");
  } catch (error) {
    throw fault(
      file,
      "unreadable",
      `cannot be read (${(error as NodeJS.ErrnoException).code})`,
      "check its permissions",
    );
  }
}

/** An InputError of one fault. */
export function fault(source: string, code: string, what: string, mend: string): InputError {
  return new InputError([{ code, place: { source }, what, mend }]);
}
