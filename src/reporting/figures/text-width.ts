/** Advance widths in thousandths of the text size, of a sans serif with the usual metrics; characters of one width together. */
const WIDTHS: readonly (readonly [number, string])[] = [
  [0, "\u0303\u0302\u0301\u0300\u0308"],
  [191, "'′"],
  [222, "ijl‘’"],
  [278, " !,./:;I[\\]ft\u00a0"],
  [333, "()-`r“”"],
  [355, '"″'],
  [469, "^"],
  [500, "Jckszvxy"],
  [556, "#$?0123456789L_abdeghnopqu–λν"],
  [584, "+<=>−×±~"],
  [611, "FTZ"],
  [667, "&ABEKPSVXYÅΔ"],
  [722, "CDHNRUw"],
  [778, "GOQω"],
  [834, "½¼"],
  [833, "mM"],
  [889, "%"],
  [944, "W"],
  [1000, "—…"],
];

const BY_CHARACTER = new Map(WIDTHS.flatMap(([width, all]) => [...all].map((one) => [one, width] as const)));

/** Characters not in the table: Latin letters of other languages are near 600, East Asian ones a full em. */
const widthOf = (character: string) =>
  BY_CHARACTER.get(character) ?? (character.codePointAt(0)! >= 0x2e80 ? 1000 : 610);

/** Width of a text in pt at a size in pt, near enough to keep things apart; the renderer measures for itself. */
export function textWidth(text: string, sizePt: number): number {
  let total = 0;
  for (const character of text) total += widthOf(character);
  return (total * sizePt) / 1000;
}

/** The text itself, or its beginning and end around an ellipsis, no wider than `widthPt`. */
export function shortened(text: string, widthPt: number, sizePt: number): string {
  if (textWidth(text, sizePt) <= widthPt) return text;
  const letters = [...text];
  for (let keep = letters.length - 1; keep > 1; keep--) {
    const head = letters
      .slice(0, Math.ceil(keep / 2))
      .join("")
      .trimEnd();
    const tail = letters
      .slice(letters.length - Math.floor(keep / 2))
      .join("")
      .trimStart();
    const cut = `${head}…${tail}`;
    if (textWidth(cut, sizePt) <= widthPt) return cut;
  }
  return `${letters[0] ?? ""}…`;
}

/** Names no wider than `widthPt` that still differ: where shortening in the middle makes two alike, what all share is cut instead. */
export function distinctNames(names: readonly string[], widthPt: number, sizePt: number): readonly string[] {
  const cut = names.map((name) => shortened(name, widthPt, sizePt));
  if (new Set(cut).size === new Set(names).size) return cut;
  const shared = (a: string, b: string) => {
    let length = 0;
    while (length < Math.min(a.length, b.length) && a[length] === b[length]) length++;
    return length;
  };
  const common = Math.min(...names.map((name) => shared(name, names[0]!)));
  const start = Math.max(0, common - 3);
  return names.map((name) => {
    const rest = start === 0 ? name : `…${name.slice(start)}`;
    for (let keep = rest.length; keep > 1; keep--) {
      const head = keep === rest.length ? rest : `${rest.slice(0, keep)}…`;
      if (textWidth(head, sizePt) <= widthPt) return head;
    }
    return rest;
  });
}
