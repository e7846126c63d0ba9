interface Checked {
  readonly ok: boolean;
  readonly differences: readonly { readonly where: string; readonly stored: unknown; readonly recomputed: unknown }[];
}

/** Whether a stored result comes out again, and where it does not. */
export function renderCheck({ ok, differences }: Checked, file: string): string {
  if (ok) return `${file}: every number comes out again\n`;
  const lines = differences.map(
    ({ where, stored, recomputed }) =>
      `  ${where}: stored ${JSON.stringify(stored)}, now ${JSON.stringify(recomputed)}`,
  );
  return `${file}: ${differences.length} difference${differences.length === 1 ? "" : "s"}\n${lines.join("\n")}\n`;
}
