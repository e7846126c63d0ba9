import {
  accessSync,
  constants,
  existsSync,
  mkdirSync,
  readdirSync,
  renameSync,
  rmSync,
  statSync,
  writeFileSync,
} from "node:fs";
import { dirname, join, resolve } from "node:path";
import { fault } from "./load-input.ts";

/** A file of a report, named relative to its folder. */
export interface ReportFile {
  readonly name: string;
  readonly content: string | Uint8Array;
}

/** Check, before any work, that a report can be written to `out`. Throws InputError with the mend. */
export function checkFolder(out: string, force: boolean): void {
  const about = lookUp(out);
  if (about !== undefined) {
    if (!about.isDirectory())
      throw fault(out, "not-a-folder", "exists and is no folder", "name another folder with --out");
    const files = readdirSync(out);
    if (files.length > 0 && !force)
      throw fault(out, "folder-exists", "exists already", "name another folder, or replace it with --force");
    if (files.length > 0 && !(files.includes("report.md") && files.includes("result.json")))
      throw fault(
        out,
        "not-a-report",
        "holds other files than a report of ours, and --force would delete them",
        "name another folder with --out",
      );
  }
  const above = dirname(resolve(out));
  let existing = above;
  while (lookUp(existing) === undefined) existing = dirname(existing);
  if (!lookUp(existing)!.isDirectory())
    throw fault(out, "not-writable", `cannot be made: ${existing} is no folder`, "name another folder with --out");
  try {
    accessSync(existing, constants.W_OK);
  } catch {
    throw fault(
      out,
      "not-writable",
      `cannot be written: no permission in ${existing}`,
      "name another folder with --out",
    );
  }
}

/** What stands at a path; undefined also where a file stands in the place of a folder above it. */
function lookUp(path: string) {
  try {
    return statSync(path, { throwIfNoEntry: false });
  } catch {
    return undefined;
  }
}

/** Make a folder and those above it, one at a time: where the system refuses one, a recursive mkdir may try for ever. */
function makeFolder(path: string): void {
  if (existsSync(path)) return;
  makeFolder(dirname(path));
  mkdirSync(path);
}

/** Write a report beside its place and swap it in, so that an existing one is never half overwritten. */
export function writeFolder(out: string, files: readonly ReportFile[]): void {
  const place = resolve(out);
  const fresh = `${place}.new-${process.pid}`;
  const old = `${place}.old-${process.pid}`;
  try {
    makeFolder(dirname(place));
    makeFolder(fresh);
    for (const { name, content } of files) {
      makeFolder(dirname(join(fresh, name)));
      writeFileSync(join(fresh, name), content);
    }
    const replaced = existsSync(place);
    if (replaced) renameSync(place, old);
    renameSync(fresh, place);
    if (replaced) rmSync(old, { recursive: true, force: true });
  } catch (error) {
    rmSync(fresh, { recursive: true, force: true });
    if (existsSync(old) && !existsSync(place)) renameSync(old, place);
    throw fault(
      out,
      "not-writable",
      `could not be written (${(error as Error).message})`,
      "name another folder with --out",
    );
  }
}
