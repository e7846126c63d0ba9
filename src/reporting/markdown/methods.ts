import type { FitDocument, SeriesResult } from "../../analysis/index.ts";
import type { Notation } from "../../models/index.ts";
import { constantsSet } from "../../quantity/index.ts";
import { isReference } from "../references.ts";
import { type Symbols, symbolOf } from "../symbols.ts";
import type { Citations } from "./citations.ts";
import { howItWasFitted } from "./methods-of-fitting.ts";
import { sentence } from "./table.ts";

/** What the methods paragraph is written from. */
export interface Methods {
  readonly document: FitDocument;
  readonly notation: Notation;
  readonly symbols: Symbols;
  readonly citations: Citations;
  /** keys of the works that describe the model */
  readonly modelReferences: readonly string[];
  /** how the model defines its constants; null where the works say it */
  readonly modelDefinition: string | null;
}

const RAISED = ["", "", "²", "³", "⁴", "⁵", "⁶"];

/** G(v) as a sum, from the symbols of the constants; only the second carries a minus. */
function termValues(keys: readonly string[], symbols: Symbols): string {
  const parts = keys.map(
    (key, k) => `${k === 0 ? "" : k === 1 ? " − " : " + "}${symbolOf(symbols, key)}(v + ½)${RAISED[k + 1]}`,
  );
  return `G(v) = ${parts.join("")}`;
}

/** Equations and works that were really used, and nothing else. */
export function methods({ document, notation, symbols, citations, modelReferences, modelDefinition }: Methods): string {
  const { series, request } = document;
  const { cite } = citations;
  const any = (test: (one: SeriesResult) => boolean) => series.some(test);
  const row = (method: string) =>
    any(({ dissociation }) => dissociation.some((r) => r.method === method && r.d0 !== null));
  const longest = series.reduce<string[]>((keys, { constants }) => {
    const own = Object.keys(constants);
    return own.length > keys.length ? own : keys;
  }, []);
  const [first, second] = longest.map((key) => symbolOf(symbols, key));
  const works = modelReferences.filter(isReference);
  const text: string[] = [];
  if (any(({ terms }) => terms !== null))
    text.push(
      `Term values: ${termValues(longest, symbols)}${series.length > 1 ? " with as many terms as each series has" : ""}; a band v′-v″ lies at G(v′) − G(v″) ${cite(...works)}.`,
    );
  else if (works.length > 0) text.push(`The model is that of ${cite(...works)}.`);
  if (modelDefinition !== null) text.push(`${modelDefinition}.`);
  if (notation === "local" && any(({ terms }) => terms !== null))
    text.push(
      `Local-mode notation, the same algebra: for two terms ν̃(0 → v) = v ω̃ − v(v + 1) ω̃x ${cite("henry1977")}.`,
    );
  text.push(...howItWasFitted(series, request, cite));
  const mixed = any(({ levels }) => levels !== null);
  const [omega, omegaX] = mixed ? ["ω̃", "ω̃x"] : [first, second];
  if (row("morse")) text.push(`Morse relation: De = ${omega}²/(4${omegaX}), D0 = De − G(0) ${cite("morse1929")}.`);
  if (any(({ deperturbation }) => deperturbation !== null))
    text.push("Of the pure stretch, ω̃x = −xss and ω̃ = ν̃s + ω̃x.");
  if (row("spacing-sum"))
    text.push(
      `Spacing sum: the highest observed level and a straight-line remainder of the spacings beyond it ${cite("birge1926")}.`,
    );
  if (any(({ dissociation }) => dissociation.some((r) => r.empirical != null)))
    text.push(
      "Empirical ranges: the same number of terms fitted to known wells at the same covered fraction; the spread of the error of their extrapolated part (docs/empirical-error.md of the package).",
    );
  if (row("turning-point")) text.push("Turning point: G(v) where dG/dv = 0 past the highest observed level.");
  if (row("near-limit")) text.push(`Near the limit: the long-range form of ${cite("lerouybernstein1970")}.`);
  if (any(({ derived }) => derived !== null && derived.forceConstant !== null))
    text.push(`Force constant: k = (2πc${first})²μ.`);
  if (any(({ derived }) => derived !== null && derived.morseA !== null))
    text.push(`Morse a: a = √(8π²cμ${second}/h) ${cite("morse1929")}.`);
  if (any(({ derived }) => derived !== null && derived.y00 !== null))
    text.push(
      `Y00 = (Be − ${second})/4 + αe${first}/(12Be) + (αe${first})²/(144Be³), included in De and the zero-point energy ${cite("dunham1932")}.`,
    );
  const airUsed = any(
    ({ bands, predictions }) =>
      bands.some(({ asRead }) => asRead.medium === "air") || predictions.some((p) => p.airWavelength !== null),
  );
  if (airUsed)
    text.push(
      `Wavelengths in air and vacuum are linked by the refractive index of dry air, ${request.air ?? "15 °C, 101325 Pa"} ${cite("ciddor1996")}.`,
    );
  text.push(`Units are converted with the constants of ${constantsSet} ${cite("codata2022")}.`);
  if (any(({ bond }) => bond !== null && !bond.startsWith("reduced mass")))
    text.push(
      `Isotope masses: AME2020 ${cite("ame2020")} for H, D, T, 11B, Cl, Br and I, an earlier evaluation alike to 2e-8 for the others.`,
    );
  return text.map((one) => unescapeCitations(sentence(one))).join(" ");
}

/** Square brackets of citations are ours and need no verbatim. */
const unescapeCitations = (text: string) => text.replace(/\\\[([\d, ]+)\\\]/gu, "[$1]");
