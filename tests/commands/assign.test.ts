import { describe, expect, it } from "vitest";
import { type AssignRequest, assign } from "../../src/commands/assign.ts";
import { InputError } from "../../src/messages/index.ts";

const fault = async (request: AssignRequest) => {
  const error = await assign(request).catch((wrong: unknown) => wrong);
  expect(error).toBeInstanceOf(InputError);
  const { faults, exit } = error as InputError;
  return { codes: faults.map(({ code }) => code), exit, mends: faults.map(({ mend }) => mend) };
};
const labels = async (request: AssignRequest) =>
  (await assign(request)).hypotheses[0]!.labels.map(({ label }) => label);

/** H35Cl, Rank, Rao & Wiggins 1965 (from memory). */
const hcl = "2885.98 5667.98 8346.78 10922.8";

describe("assign reads peaks as fit reads bands", () => {
  it("split by spaces, commas or newlines, with uncertainties of their own", async () => {
    const expected = ["1-0", "2-0", "3-0", "4-0"];
    for (const peaks of [hcl, hcl.replaceAll(" ", ", "), hcl.replaceAll(" ", "\n"), hcl.replaceAll(" ", "(50) ")])
      expect(await labels({ peaks })).toEqual(expected);
  });

  it("in wavelengths, in air, and as Raman shifts", async () => {
    const inNm = hcl
      .split(" ")
      .map((position) => (1e7 / Number(position)).toFixed(3))
      .join(" ");
    expect(await labels({ peaks: inNm, unit: "nm" })).toEqual(["1-0", "2-0", "3-0", "4-0"]);
    expect(await labels({ peaks: inNm, unit: "nm", medium: "air", sigma: "0.5 nm" })).toEqual([
      "1-0",
      "2-0",
      "3-0",
      "4-0",
    ]);
  });

  it("from a table with a column position; labels there are left aside, and use: no leaves a peak out", async () => {
    const text = "band,position,use\nx,2885.98,yes\ny,5667.98,yes\n,6000,no\n9-0,8346.78,yes\n";
    expect(await labels({ input: { text, source: "peaks.csv", format: "csv" } })).toEqual(["1-0", "2-0", "3-0"]);
    const bare = "position\n2885.98\n5667.98\n8346.78\n";
    expect(await labels({ input: { text: bare, source: "peaks.csv", format: "csv" } })).toEqual(["1-0", "2-0", "3-0"]);
  });

  it("says what it assumed where no σ was stated", async () => {
    expect((await assign({ peaks: hcl })).warnings.map(({ code }) => code)).toEqual(["sigma-assumed"]);
    expect((await assign({ peaks: hcl, sigma: 1 })).warnings).toEqual([]);
  });

  it("keeps to what is expected", async () => {
    expect(await labels({ peaks: hcl, expect: "2-0 2800..2900", limits: "omega=500..4500 ratio=0.001..0.05" })).toEqual(
      ["2-0", "4-0", "6-0", "8-0"],
    );
  });
});

describe("assign refuses", () => {
  it.each<[string, AssignRequest, string, 2 | 3]>([
    ["nothing", {}, "no-peaks", 2],
    ["an empty list", { peaks: " " }, "no-peaks", 2],
    ["two peaks", { peaks: "2886 5668" }, "too-few-peaks", 2],
    ["equal peaks", { peaks: "2886 2886 2886 2886" }, "too-few-peaks", 2],
    ["words", { peaks: "2886 56x8 8347" }, "position", 2],
    ["decimal commas", { peaks: "2886,5 5668,2 8347,1" }, "decimal-comma", 2],
    ["limits that exclude everything", { peaks: hcl, limits: "omega=600..700" }, "no-ladder", 3],
    ["limits that are none", { peaks: hcl, limits: "omega=4500..500" }, "limits", 2],
    ["other words as limits", { peaks: hcl, limits: "we 500 4500" }, "limits", 2],
    ["an expectation without a range", { peaks: hcl, expect: "1-0 2900" }, "expect", 2],
    ["an expectation of a hot band", { peaks: hcl, expect: "2-1 2700..2800" }, "expect", 2],
    ["an expectation that nothing meets", { peaks: hcl, expect: "1-0 100..110" }, "no-ladder", 3],
    ["three ladders", { peaks: hcl, ladders: 3 }, "out-of-range", 2],
    ["two ladders in three peaks", { peaks: "2886 5668 8347", ladders: 2 }, "no-ladder", 3],
    [
      "peaks twice",
      { peaks: hcl, input: { text: "position\n1\n2\n3\n", source: "p.csv", format: "csv" } },
      "peaks-twice",
      2,
    ],
  ])("%s", async (_, request, code, exit) => {
    const wrong = await fault(request);
    expect([[...new Set(wrong.codes)], wrong.exit]).toEqual([[code], exit]);
    for (const mend of wrong.mends) expect(mend.length).toBeGreaterThan(8);
  });
});
