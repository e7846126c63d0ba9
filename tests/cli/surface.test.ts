import { readFileSync } from "node:fs";
import { describe, expect, it } from "vitest";
import { catalogue } from "../../src/cli/catalogue.ts";
import { emptyFolder, rungwise, shellWords } from "./run.ts";

const { version } = JSON.parse(readFileSync("package.json", "utf8"));

describe("help and version", () => {
  it("prints the bare version of package.json", () => {
    for (const flag of ["--version", "-V"]) expect(rungwise([flag])).toEqual({ code: 0, out: `${version}\n`, err: "" });
  });

  it.each([[], ...catalogue.map(({ name }) => [name])])(
    "help of %s goes to standard output, exits 0 and is at most 80 columns wide",
    (...words) => {
      for (const asked of [
        [...words, "--help"],
        ["help", ...words],
      ]) {
        const { code, out, err } = rungwise(asked);
        expect(code).toBe(0);
        expect(err).toBe("");
        expect(out).toContain("Usage: rungwise");
        expect(out).toContain("xample");
        expect(out.split("\n").filter((line) => [...line].length > 80)).toEqual([]);
      }
    },
  );

  it("without arguments prints help on standard error and exits 2", () => {
    const { code, out, err } = rungwise([]);
    expect([code, out]).toEqual([2, ""]);
    expect(err).toContain("Usage: rungwise");
  });

  it("suggests the nearest command and option", () => {
    expect(rungwise(["fti"])).toMatchObject({ code: 2, out: "" });
    expect(rungwise(["fti"]).err).toContain("fit");
    const { code, err } = rungwise(["fit", "--serie", "1"]);
    expect(code).toBe(2);
    expect(err).toContain("--series");
  });

  it("every option has help and a placeholder, and appears in the help of its command", () => {
    for (const { name, groups } of catalogue) {
      const { out } = rungwise([name, "--help"]);
      for (const flag of groups.flatMap(({ flags }) => flags)) {
        expect(flag.help.length).toBeGreaterThan(5);
        expect(out).toContain(`--${flag.name}`);
      }
    }
  });

  it.each(catalogue.flatMap(({ examples }) => examples))("the example works as it stands: %s", (line) => {
    const [program, ...words] = shellWords(line);
    expect(program).toBe("rungwise");
    const cwd = emptyFolder();
    // `check` looks at the report that the example of `report` leaves.
    if (words[0] === "check") rungwise(["report", "--series", "2885.98 5667.98 8346.78", "--out", words[1]!], { cwd });
    expect(rungwise(words, { cwd }).code).toBe(0);
  });
});

describe("streams", () => {
  const words = ["fit", "--series", "2885.98 5667.98 8346.78", "--bond", "1H 35Cl"];

  it("--json prints one document and nothing else on standard output; warnings go to standard error and are in the document", () => {
    const { code, out, err } = rungwise([...words, "--json"]);
    expect(code).toBe(0);
    const document = JSON.parse(out);
    expect(document.schemaVersion).toBe(1);
    expect(document.tool).toEqual({ name: "rungwise", version });
    expect(document.series[0].warnings.length).toBeGreaterThan(0);
    expect(err).not.toBe("");
    expect(rungwise([...words, "--json", "--quiet"]).err).toBe("");
  });

  it("is plain when piped or with NO_COLOR, coloured with FORCE_COLOR, and reads the same without colour", () => {
    const plain = rungwise(words).out;
    // biome-ignore lint/suspicious/noControlCharactersInRegex: escape sequences are what is looked for
    const sequence = /\u001b\[\d+m/g;
    expect(plain).not.toMatch(sequence);
    const coloured = rungwise(words, { env: { FORCE_COLOR: "1" } }).out;
    expect(coloured).toMatch(sequence);
    expect(coloured.replace(sequence, "")).toBe(plain);
    expect(rungwise(words, { env: { FORCE_COLOR: "1", NO_COLOR: "1" } }).out).toBe(plain);
  });

  it("gives the same bytes twice, whatever the locale and the time zone", () => {
    const once = rungwise([...words, "--json"]).out;
    for (const env of [
      { LC_ALL: "de_DE.UTF-8", TZ: "Asia/Tokyo" },
      { LANG: "tr_TR.UTF-8", TZ: "UTC" },
    ] as Record<string, string>[])
      expect(rungwise([...words, "--json"], { env }).out).toBe(once);
  });

  it("takes options in any order and with =", () => {
    const once = rungwise([...words, "--json", "--quiet"]).out;
    const other = ["fit", "--json", "--quiet", "--bond=1H 35Cl", "--series=2885.98 5667.98 8346.78"];
    expect(rungwise(other).out).toBe(once);
  });
});

describe("the built command", () => {
  it("keeps characters outside ASCII whole, in regular expressions too: minus signs stand under their digits", () => {
    const { out } = rungwise(["convert", "--constants", "c1=2938.1(3) c2=-52.8(1)", "--to", "polynomial"]);
    const lines = out.split("\n").filter((line) => /^ {2}c\d/.test(line));
    expect(lines).toHaveLength(2);
    expect(new Set(lines.map((line) => [...line].indexOf("."))).size).toBe(1);
    expect(lines[1]).toContain("−52.80(10)");
  });
});
