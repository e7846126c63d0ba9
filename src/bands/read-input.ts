import { InputError } from "../messages/index.ts";
import type { RawInput } from "./raw.ts";

export type InputFormat = "csv" | "tsv" | "toml";

/** The format a file name stands for, or null. */
export function formatOf(fileName: string): InputFormat | null {
  const ending = /\.(csv|tsv|toml)$/i.exec(fileName)?.[1]?.toLowerCase();
  return (ending as InputFormat | undefined) ?? null;
}

/**
 * Read the text of a band file into settings and rows; nothing is understood yet. The parsers are loaded when they are needed.
 * `labelled`: every row needs a label. Throws InputError with the place of everything wrong with its form.
 */
export async function readInput(text: string, source: string, format: InputFormat, labelled = true): Promise<RawInput> {
  const plain = text.replace(/^\uFEFF/, "");
  const fault = (code: string, what: string, mend: string, line?: number) =>
    new InputError([{ code, place: line === undefined ? { source } : { source, line }, what, mend }]);
  // NUL: a binary file or UTF-16; U+FFFD: bytes that are no UTF-8.
  // biome-ignore lint/suspicious/noControlCharactersInRegex: that is what is looked for
  const stray = plain.search(/[\u0000\uFFFD]/);
  if (stray >= 0)
    throw fault(
      "not-text",
      "is not a text file in UTF-8",
      "save it as plain text (UTF-8) in CSV, TSV or TOML",
      plain.slice(0, stray).split(/\r\n|\n|\r/).length,
    );
  if (plain.trim() === "")
    throw fault("empty-file", "is empty", "write a header such as band,position and one band a line");
  if (format === "toml") return (await import("./read-toml.ts")).readToml(plain, source);
  return (await import("./read-csv.ts")).readCsv(plain, source, format === "tsv" ? "\t" : ",", labelled);
}
