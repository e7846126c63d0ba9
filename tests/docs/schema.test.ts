import { readdirSync, readFileSync } from "node:fs";
import { Ajv2020 } from "ajv/dist/2020.js";
import { describe, expect, it } from "vitest";
import { assign, check, convert, convertConstants, fit, plan, predict, report } from "../../src/index.ts";

/** Every schema of docs/schema, strict: an unknown keyword or a reference that leads nowhere is an error. */
function schemas() {
  const ajv = new Ajv2020({ strict: true, strictRequired: false, allowUnionTypes: true, allErrors: true });
  for (const name of readdirSync("docs/schema"))
    ajv.addSchema(JSON.parse(readFileSync(`docs/schema/${name}`, "utf8")), name);
  return ajv;
}

/** What a schema finds wrong with a document as it is printed. */
function faults(name: string, document: object): string[] {
  const validate = schemas().getSchema(`${name}.schema.json`)!;
  validate(JSON.parse(JSON.stringify(document)));
  return (validate.errors ?? []).map(({ instancePath, message, params }) =>
    [instancePath, message, JSON.stringify(params)].join(" "),
  );
}

const hcl = { bands: "1-0 2885.98(2), 2-0 5667.98(2), 3-0 8346.78(5), 2-1 2782.0(5)", bond: "1H 35Cl" } as const;
const file = (name: string) => ({
  text: readFileSync(`datasets/${name}`, "utf8"),
  source: name,
  format: name.endsWith("toml") ? ("toml" as const) : ("csv" as const),
});

describe("the schemas describe every key of the documents, and no document has another", () => {
  it.each([
    ["flags", hcl],
    ["one band short of uncertainties", { series: "2885.98 5667.98", terms: 2 }],
    [
      "profiles, another coverage, an accepted value",
      { ...hcl, intervals: "profile", coverage: 0.9, accepted: "35759(5)" },
    ],
    ["draws", { ...hcl, intervals: "resample", resamples: 200, terms: 3 }],
    ["a robust fit", { ...hcl, robust: "tukey" }],
    ["an enthalpy", { ...hcl, diatomic: true, acceptedEnthalpy: "431.6(1)" }],
    ["coupled bonds", { input: file("coupled/h2o.csv"), model: "coupled", bonds: 2 }],
    [
      "unlike bonds",
      { bands: "1.0 3640, 0.1 3530, 2.0 7120, 0.2 6890, 1.1 7180, 3.0 10300", model: "coupled", bonds: "unlike" },
    ],
    [
      "a polyad",
      {
        bands: "1_1 3037.7, 1_2 2704.3, 2_1 5959.5, 2_2 5710, 2_3 5340.5, 3_1 8785.4, 3_2 8591.6",
        model: "polyad",
        fix: "gbb=5",
      },
    ],
    [
      "resonances and a companion",
      {
        input: {
          text: "band,position,sigma,companion,ratio\n1-0,3527.37,0.03,,\n2-0,6881.26,0.05,,\n3-0,10057.756,0.1,10086.006,6.7(3)\n4-0,13068.33,0.17,,\n",
          source: "b.csv",
          format: "csv" as const,
        },
        modes: "bend 1370, rock 1020(5)",
        window: 100,
      },
    ],
    ["groups and a mixture", { ...hcl, bond: "H Cl", sharedSigma: 0.01 }],
    ["a file of two bonds with excluded bands", { input: file("demo/bonds-a-and-b.csv") }],
    ["levels refused as not near the limit", { input: file("h2.csv"), model: "near-limit", power: 6 }],
  ])("fit: %s", async (_, request) => {
    expect(faults("fit", await fit(request))).toEqual([]);
  });

  it("predict", async () => {
    expect(faults("predict", await predict({ ...hcl, hot: 1 }))).toEqual([]);
    expect(faults("predict", await predict({ constants: "we=2990.95(1) wexe=52.82(1)" }))).toEqual([]);
    const bonds = { model: "coupled", bonds: 3, constants: "w=2200 wx=38.5 lambda=-3.7", upTo: 3 } as const;
    expect(faults("predict", await predict(bonds))).toEqual([]);
  });

  it("assign", async () => {
    expect(faults("assign", await assign({ peaks: "2886 5668 6120 8347 8349.5", sigma: 3 }))).toEqual([]);
    expect(faults("assign", await assign({ peaks: "3600 3527 7035 6881 10306 10061", ladders: 2 }))).toEqual([]);
  });

  it("plan", async () => {
    expect(faults("plan", await plan({ ...hcl, aim: "d0", window: "600..4000 nm" }))).toEqual([]);
    expect(faults("plan", await plan({ ...hcl, terms: 2, aim: "model" }))).toEqual([]);
  });

  it("convert", () => {
    expect(
      faults("convert", convert({ values: ["1197.7", "745.286(10)"], unit: "nm", medium: "air", to: "cm-1" })),
    ).toEqual([]);
  });

  it("convert, constants", async () => {
    expect(faults("convert", convertConstants({ constants: "we=2990.9(1) wexe=52.8(1)", to: "local" }))).toEqual([]);
    const stored = { text: JSON.stringify(await fit(hcl)), source: "result.json" };
    expect(faults("convert", convertConstants({ stored, to: "spacing-plot" }))).toEqual([]);
  });

  it("check, with and without differences", async () => {
    const { files } = await report(hcl);
    const of = (name: string) => String(files.find((one) => one.name === name)!.content);
    const input = { text: of("input.toml"), source: "input.toml", format: "toml" as const };
    const stored = { text: of("result.json"), source: "result.json" };
    const same = await check({ stored, input });
    expect(same.ok).toBe(true);
    expect(faults("check", same)).toEqual([]);
    const altered = await check({
      stored: { ...stored, text: stored.text.replace(/"value": 2/, '"value": 3') },
      input,
    });
    expect(altered.ok).toBe(false);
    expect(faults("check", altered)).toEqual([]);
  });

  it("finds a key that is not described", async () => {
    const document = await fit(hcl);
    expect(faults("fit", { ...document, surprise: 1 })).toHaveLength(1);
  });
});
