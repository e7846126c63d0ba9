const CODES = { red: [31, 39], yellow: [33, 39], bold: [1, 22], dim: [2, 22] } as const;

/** Whether a stream should be coloured: a terminal that is not dumb and no NO_COLOR; FORCE_COLOR wins (no-color.org, force-color.org). */
export function wantsColour(stream: { readonly isTTY?: boolean }, environment = process.env): boolean {
  const { NO_COLOR: no, FORCE_COLOR: force, TERM: term } = environment;
  if (no !== undefined && no !== "") return false;
  if (force !== undefined && force !== "" && force !== "0") return true;
  return stream.isTTY === true && term !== "dumb";
}

/** Text in a colour or weight, or as it is. */
export function colourise(text: string, style: keyof typeof CODES, colour: boolean): string {
  const [open, close] = CODES[style];
  return colour ? `\u001b[${open}m${text}\u001b[${close}m` : text;
}
