/** `we=2990.9(1) wexe = 52.8` as pairs; commas and semicolons may stand between them. A word without `=` has the value null. */
export function readAssignments(text: string): { key: string; value: string | null }[] {
  return text
    .replace(/\s*=\s*/g, "=")
    .split(/[\s,;]+/)
    .filter((word) => word !== "")
    .map((word) => {
      const at = word.indexOf("=");
      return at < 0 ? { key: word, value: null } : { key: word.slice(0, at), value: word.slice(at + 1) };
    });
}
