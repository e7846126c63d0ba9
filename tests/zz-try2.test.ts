import { test } from "vitest";
import { readFileSync } from "node:fs";
import { fit } from "../src/commands/fit.ts";
import { predict } from "../src/commands/predict.ts";
import { report } from "../src/commands/report.ts";
test("x", async () => {
  const X = (v: number, n=5, H=0.15460650, vd=87.35, D=4318.51) => D - (H * (vd - v)) ** (2*n/(n-2));
  const bands = Array.from({length: 12},(_, i)=>`${69+i}-0 ${X(69+i).toFixed(4)}`).join(", ");
  const r = { bands, bond: "127I 127I", model: "near-limit", power: 5 };
  console.log((await predict({ ...r, hot: 72 })).predictions.map((p) => p.label).join(" "));
  const text = JSON.stringify(await fit(r));
  console.log((await predict({ stored: { text, source: "s" }, upTo: 83 })).predictions.map((p) => [p.label, p.position.value, p.position.standardUncertainty]).join("\n"));
  for (const q of [{ ...r, hot: 2, constants: "d=1" , bands: undefined}, { input: { text: readFileSync("datasets/h2.csv", "utf8"), source: "h2.csv", format: "csv" as const }, model: "near-limit", power: 6 }])
    try { console.log(JSON.stringify(await predict(q as any)).slice(0,300)); } catch (e: any) { console.log(e.exit, e.faults ?? e); }
  const rep = await report({ ...r } as any);
  console.log(Object.keys(rep), (rep as any).files?.map((f: any) => f.name), (rep as any).files?.find((f: any) => f.name.endsWith(".md"))?.content ?? "");
  const files = (rep as any).files;
  for (const f of files) console.log(f.path ?? f.name, String(f.text ?? f.content ?? f.data).slice(0, 6000));
}, 60000);
