import type { Run } from "./figure-spec.ts";

const roman = (text: string): Run => ({ text });
const italic = (text: string): Run => ({ text, italic: true });
const sub = (text: string): Run => ({ text, script: "sub" });

/** U+0303, the combining tilde: it sits right over the italic letters of the font that ships. */
const TILDE = "\u0303";
const NU = italic(`ν${TILDE}`);
const OMEGA = italic(`ω${TILDE}`);

/** Symbols of quantities as runs: quantities italic, descriptive subscripts roman. */
export const SYMBOL = {
  wavenumber: [NU],
  observedMinusCalculated: [NU, sub("obs"), roman(" − "), NU, sub("calc")],
  wavenumberOverLevel: [NU, roman("/"), italic("v")],
  level: [italic("v")],
  upperLevel: [italic("v"), roman("′")],
  levelPlusHalf: [italic("v"), roman(" + ½")],
  spacing: [roman("Δ"), italic("G"), roman("("), italic("v"), roman(" + ½)")],
  termValue: [italic("G"), roman("("), italic("v"), roman(")")],
  potential: [italic("V")],
  distance: [italic("r")],
  displacement: [italic("r"), roman(" − "), italic("r"), sub("e")],
  vacuumWavelength: [italic("λ"), sub("vac")],
  standardUncertainty: [italic("u"), roman("("), NU, roman(")")],
  harmonic: [italic("ω"), sub("e")],
  anharmonic: [italic("ω"), sub("e"), italic("x"), sub("e")],
  localHarmonic: [OMEGA],
  localAnharmonic: [OMEGA, italic("x")],
  wellDepth: [italic("D"), sub("e")],
  dissociationEnergy: [italic("D"), sub("0")],
} as const satisfies Record<string, readonly Run[]>;

/** Symbols of units, upright. */
export const UNIT = {
  wavenumber: [roman("cm"), { text: "−1", script: "super" }],
  nanometre: [roman("nm")],
  angstrom: [roman("Å")],
} as const satisfies Record<string, readonly Run[]>;

/** Quantity over unit, the label of an axis (IUPAC quantity calculus): `ν̃ / cm⁻¹`; a difference is put in parentheses. */
export function quotient(quantity: readonly Run[], unit: readonly Run[]): readonly Run[] {
  const bare = quantity.some(({ text }) => text.includes(" − ") || text === "/");
  const upper = bare ? [roman("("), ...quantity, roman(")")] : quantity;
  return [...upper, roman(" / "), ...unit];
}

/** Plain text as runs. */
export function plain(text: string): readonly Run[] {
  return [roman(text)];
}
