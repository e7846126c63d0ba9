import { spawnSync } from "node:child_process";
import { cpSync, existsSync, readdirSync, readFileSync, writeFileSync } from "node:fs";
import { dirname, join } from "node:path";
import { describe, expect, it } from "vitest";
import { emptyFolder, rungwise, shellWords } from "../cli/run.ts";

const pages = [
  "README.md",
  ...readdirSync("docs")
    .filter((file) => file.endsWith(".md"))
    .map((file) => `docs/${file}`),
];
const write = process.env.RUNGWISE_WRITE_DOCS === "1";

/** A block of shell lines and the text block right after it, if there is one. */
interface Block {
  readonly page: string;
  readonly lines: readonly string[];
  readonly output: string | null;
  readonly whole: string;
}

const blocks = pages.flatMap((page): Block[] =>
  [...readFileSync(page, "utf8").matchAll(/```sh\n([\s\S]*?)```(?:\n\n```text\n([\s\S]*?)```)?/g)].map((found) => ({
    page,
    lines: found[1]!.trim().split("\n"),
    output: found[2] ?? null,
    whole: found[0],
  })),
);

describe("command blocks", () => {
  it.each(blocks.map((block) => [block.page, block.lines[0]!, block] as const))(
    "%s: %s",
    (_, __, { page, lines, output, whole }) => {
      const cwd = emptyFolder();
      cpSync("datasets", join(cwd, "datasets"), { recursive: true });
      let expected = 0;
      let printed = "";
      for (const line of lines) {
        const exit = /^# exit (\d)$/.exec(line);
        if (exit !== null) expected = Number(exit[1]);
        if (!line.startsWith("rungwise ")) continue;
        const { code, out, err } = rungwise(shellWords(line).slice(1), { cwd });
        expect([line, code, code === expected ? "" : err]).toEqual([line, expected, ""]);
        printed += out;
        expected = 0;
      }
      if (output === null) return;
      if (write) {
        const text = readFileSync(page, "utf8");
        writeFileSync(
          page,
          text.replace(
            whole,
            whole.replace(/```text\n[\s\S]*?```$/, () => `\`\`\`text\n${printed}\`\`\``),
          ),
        );
      } else expect(printed).toBe(output);
    },
  );
});

describe("library blocks", () => {
  const programs = pages.flatMap((page) =>
    [...readFileSync(page, "utf8").matchAll(/```ts\n([\s\S]*?)```/g)].map((found) => [page, found[1]!] as const),
  );

  it("there is one at least", () => expect(programs.length).toBeGreaterThan(0));

  it.each(programs)("of %s run as they stand", (_, program) => {
    // Types apart they are JavaScript, and the package can name itself.
    const { status, stderr } = spawnSync(process.execPath, ["--input-type=module", "-e", program], {
      encoding: "utf8",
    });
    expect([status, stderr]).toEqual([0, ""]);
  });
});

/** Anchors of a page, as headings become them. */
const anchors = (text: string) =>
  [...text.matchAll(/^#+ (.+)$/gm)].map((found) =>
    found[1]!
      .toLowerCase()
      .replace(/[^\p{L}\p{N}\s-]/gu, "")
      .trim()
      .replace(/\s+/g, "-"),
  );

describe("links", () => {
  it.each([...pages, "DEVELOPERS.md", "datasets/README.md", "datasets/demo/README.md"])(
    "of %s lead somewhere",
    (page) => {
      const text = readFileSync(page, "utf8");
      for (const [, target] of text.matchAll(/\]\(([^)\s]+)\)/g)) {
        if (/^[a-z]+:/.test(target!)) continue;
        const [file = "", anchor] = target!.split("#");
        const path = file === "" ? page : join(dirname(page), file);
        expect([target, existsSync(path)]).toEqual([target, true]);
        if (anchor !== undefined) expect(anchors(readFileSync(path, "utf8"))).toContain(anchor);
      }
    },
  );
});
