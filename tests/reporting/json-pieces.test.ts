import { describe, expect, it } from "vitest";
import { renderJson, renderJsonPieces } from "../../src/reporting/json.ts";

describe("JSON piece by piece", () => {
  it.each([[[]], [[{ name: "a", rows: [1, null] }]], [[{ name: "a" }, { name: "b\n", deep: { x: [] } }]]])(
    "gives the bytes of the whole document: %j",
    (series) => {
      const head = { schemaVersion: 1, warnings: [] };
      expect([...renderJsonPieces(head, series)].join("")).toBe(renderJson({ ...head, series }));
    },
  );

  it("refuses a number that JSON cannot hold", () => {
    expect(() => [...renderJsonPieces({}, [{ a: { b: [1, Number.NaN] } }])]).toThrow("document.series.a.b[1]");
  });
});
