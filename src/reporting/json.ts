/**
 * A document as JSON: two spaces, full double precision, keys in the order of the document, a newline at the end; the same
 * document gives the same bytes. Throws on NaN and infinities, which JSON would turn into null unsaid.
 */
export function renderJson(document: object): string {
  refuseNonFinite(document, "document");
  return `${JSON.stringify(document, null, 2)}\n`;
}

const OPENING = '{\n  "series": [\n';
const CLOSING = "\n  ]\n}";

/** The same bytes piece by piece, for a document whose last key `series` is a list too long to hold. */
export function* renderJsonPieces(head: object, series: Iterable<object>): Generator<string> {
  refuseNonFinite(head, "document");
  yield `${JSON.stringify(head, null, 2).slice(0, -2)},\n  "series": [`;
  let separator = "\n";
  for (const one of series) {
    refuseNonFinite(one, "document.series");
    // Stringified inside a list of its own it comes with the right indentation.
    yield separator + JSON.stringify({ series: [one] }, null, 2).slice(OPENING.length, -CLOSING.length);
    separator = ",\n";
  }
  yield `${separator === "\n" ? "" : "\n  "}]\n}\n`;
}

function refuseNonFinite(value: unknown, path: string): void {
  if (typeof value === "number") {
    if (!Number.isFinite(value)) throw new Error(`${path} is ${value}, which JSON cannot hold`);
    return;
  }
  if (typeof value !== "object" || value === null) return;
  if (Array.isArray(value)) {
    for (let i = 0; i < value.length; i++) if (typeof value[i] !== "string") refuseNonFinite(value[i], `${path}[${i}]`);
    return;
  }
  for (const key in value) refuseNonFinite((value as Record<string, unknown>)[key], `${path}.${key}`);
}
