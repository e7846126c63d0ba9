/** Marks that combine with the letter before them, and characters that only steer the text: no columns. */
const weightless = /[\p{Mn}\p{Me}\p{Cf}]/u;

/** Whether a terminal gives a character two columns: East Asian scripts, full-width forms and pictographs (Unicode annex 11). */
function isWide(codePoint: number): boolean {
  return (
    (codePoint >= 0x1100 && codePoint <= 0x115f) ||
    (codePoint >= 0x2e80 && codePoint <= 0xa4cf) ||
    (codePoint >= 0xac00 && codePoint <= 0xd7a3) ||
    (codePoint >= 0xf900 && codePoint <= 0xfaff) ||
    (codePoint >= 0xfe30 && codePoint <= 0xfe6f) ||
    (codePoint >= 0xff00 && codePoint <= 0xff60) ||
    (codePoint >= 0x1f300 && codePoint <= 0x1faff)
  );
}

/** Columns a text takes in a terminal; `ω̃` takes one although it is two characters. */
export function displayWidth(text: string): number {
  let columns = 0;
  for (const character of text) {
    if (weightless.test(character)) continue;
    columns += isWide(character.codePointAt(0)!) ? 2 : 1;
  }
  return columns;
}

/** Fill up with spaces to a width in columns; a longer text stays as it is. */
export function pad(text: string, width: number, side: "left" | "right"): string {
  const fill = " ".repeat(Math.max(0, width - displayWidth(text)));
  return side === "right" ? text + fill : fill + text;
}
