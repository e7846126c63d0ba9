const RAISED = "⁰¹²³⁴⁵⁶⁷⁸⁹";

/** Two isotopes typed as `1H 35Cl`, printed `¹H³⁵Cl`; anything else as it is. */
export function bondText(text: string): string {
  const atoms = text.trim().split(/[\s-]+/u);
  if (atoms.length !== 2 || !atoms.every((atom) => /^\d{0,3}[A-Z][a-z]?$/u.test(atom))) return text;
  return atoms.join("").replace(/\d/gu, (digit) => RAISED[Number(digit)]!);
}
