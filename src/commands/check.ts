import type { FitDocument } from "../analysis/index.ts";
import { InputError } from "../messages/index.ts";
import { fit } from "./fit.ts";
import type { InputText } from "./request.ts";
import { tool } from "./tool.ts";

/** What `check` may be told: a stored result and the input it was made from. */
export interface CheckRequest {
  readonly stored: { readonly text: string; readonly source: string };
  readonly input: InputText;
}

/** One place where the stored result and the one computed now differ. */
export interface Difference {
  /** path in the document, such as series[0].constants.we.value */
  readonly where: string;
  readonly stored: unknown;
  readonly recomputed: unknown;
}

/** The document of `check`. */
export interface CheckDocument {
  readonly schemaVersion: 1;
  readonly tool: { readonly name: string; readonly version: string };
  readonly ok: boolean;
  readonly differences: readonly Difference[];
}

/** Numbers agree when they differ by no more than this share: machines round differently in the last digits, and iterations stop at 1e-10. */
const SHARE = 1e-8;
/** Differences listed; more than these tell nothing new. */
const MOST = 100;

/**
 * Compute a stored result anew from its input and its settings and compare every number and word of its series and of their differences.
 * @throws InputError exit 2 when there is no result to check, or as `fit`
 */
export async function check({ stored, input }: CheckRequest): Promise<CheckDocument> {
  const document = readResult(stored);
  const flags = Object.entries(document.request).map(([name, value]) => [camel(name), value]);
  // Bands typed as flags stand in the input the report kept, so the file alone must not be beaten by itself.
  const rest = flags.filter(([name]) => name !== "series" && name !== "bands");
  const again = await fit({ ...Object.fromEntries(rest), input });
  const differences: Difference[] = [];
  compare(document.input?.sha256, again.input?.sha256, "input.sha256", differences);
  compare(document.comparisons, again.comparisons, "comparisons", differences);
  compare(document.series, again.series, "series", differences);
  return { schemaVersion: 1, tool, ok: differences.length === 0, differences: differences.slice(0, MOST) };
}

const camel = (name: string) => name.replace(/-([a-z])/g, (_, letter: string) => letter.toUpperCase());

function readResult({ text, source }: CheckRequest["stored"]): FitDocument {
  const fault = (what: string) =>
    new InputError([
      { code: "not-a-result", place: { source }, what, mend: "name the folder of a report, or its result.json" },
    ]);
  let document: Partial<FitDocument> | null;
  try {
    document = JSON.parse(text);
  } catch {
    throw fault("is not JSON");
  }
  if (document?.schemaVersion !== 1 || !Array.isArray(document.series) || typeof document.request !== "object")
    throw fault("holds no result of fit");
  return document as FitDocument;
}

/** Walk both trees; numbers to within SHARE, everything else exactly. */
function compare(stored: unknown, now: unknown, where: string, differences: Difference[]): void {
  if (typeof stored === "number" && typeof now === "number") {
    const scale = Math.max(Math.abs(stored), Math.abs(now));
    // Residuals are differences of large numbers: what rounding leaves of them is below 1e-8 of a cm-1.
    if (Math.abs(stored - now) > SHARE * Math.max(scale, 1)) differences.push({ where, stored, recomputed: now });
    return;
  }
  if (typeof stored !== "object" || typeof now !== "object" || stored === null || now === null) {
    if (stored !== now) differences.push({ where, stored, recomputed: now });
    return;
  }
  const list = Array.isArray(stored);
  for (const key of new Set([...Object.keys(stored), ...Object.keys(now)])) {
    const [a, b] = [(stored as Record<string, unknown>)[key], (now as Record<string, unknown>)[key]];
    compare(a, b, list ? `${where}[${key}]` : `${where}.${key}`, differences);
  }
}
