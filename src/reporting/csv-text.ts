/** A cell of a CSV file: numbers in full double precision with an ASCII minus, null and undefined empty. */
export type CsvCell = string | number | boolean | null | undefined;

function written(cell: CsvCell): string {
  if (cell === null || cell === undefined) return "";
  if (typeof cell === "boolean") return cell ? "yes" : "no";
  if (typeof cell === "number") {
    if (!Number.isFinite(cell)) throw new Error(`a CSV cell is ${cell}`);
    return String(cell);
  }
  return /[",\r\n#]|^\s|\s$/u.test(cell) ? `"${cell.replaceAll('"', '""')}"` : cell;
}

/** Comment lines, a head and rows as CSV (RFC 4180 quoting, lines end in a newline). */
export function csvText(
  comments: readonly string[],
  head: readonly string[],
  rows: readonly (readonly CsvCell[])[],
): string {
  const above = comments.map((comment) => `# ${comment.replace(/[\r\n]+/gu, " ")}`);
  return `${[...above, ...[head, ...rows].map((row) => row.map(written).join(","))].join("\n")}\n`;
}
