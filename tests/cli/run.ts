import { spawnSync } from "node:child_process";
import { mkdtempSync, rmSync } from "node:fs";
import { tmpdir } from "node:os";
import { join, resolve } from "node:path";
import { afterAll } from "vitest";

/** What a run of the built command left. */
export interface Ran {
  readonly code: number | null;
  readonly out: string;
  readonly err: string;
}

const command = resolve("dist/rungwise.cjs");

/** Run the built command as a child process; `npm test` builds it first. */
export function rungwise(
  words: readonly string[],
  options: { readonly input?: string; readonly cwd?: string; readonly env?: Record<string, string> } = {},
): Ran {
  const { status, stdout, stderr } = spawnSync(process.execPath, [command, ...words], {
    encoding: "utf8",
    input: options.input ?? "",
    cwd: options.cwd ?? process.cwd(),
    env: { PATH: process.env.PATH, HOME: "/nonexistent", ...options.env } as NodeJS.ProcessEnv,
    maxBuffer: 1 << 28,
  });
  return { code: status, out: stdout, err: stderr };
}

const folders: string[] = [];
afterAll(() => {
  for (const folder of folders) rmSync(folder, { recursive: true, force: true });
});

/** A new empty folder; gone when the tests of the file are over. */
export function emptyFolder(): string {
  const folder = mkdtempSync(join(tmpdir(), "rungwise-test-"));
  folders.push(folder);
  return folder;
}

/** Split a command line of the help or the README into words, as a shell does for plain and quoted words. */
export function shellWords(line: string): string[] {
  return [...line.matchAll(/"([^"]*)"|'([^']*)'|(\S+)/g)].map((found) => found[1] ?? found[2] ?? found[3]!);
}
