/**
 * A document as JSON: two spaces, full double precision, keys in the order of the document, a newline at the end; the same
 * document gives the same bytes. Throws on NaN and infinities, which JSON would turn into null unsaid.
 */
export function renderJson(document: object): string {
  refuseNonFinite(document, "document");
  return `${JSON.stringify(document, null, 2)}\n`;
}

function refuseNonFinite(value: unknown, path: string): void {
  if (typeof value === "number" && !Number.isFinite(value))
    throw new Error(`${path} is ${value}, which JSON cannot hold`);
  if (typeof value !== "object" || value === null) return;
  for (const [key, part] of Object.entries(value)) {
    refuseNonFinite(part, Array.isArray(value) ? `${path}[${key}]` : `${path}.${key}`);
  }
}
