import { type UnitName, unitNames } from "./units.ts";

/** Other spellings, after `simplify`. */
const spellings: Readonly<Record<string, UnitName>> = {
  "1/cm": "cm-1",
  "cm^-1": "cm-1",
  "cm**-1": "cm-1",
  "kj mol-1": "kJ/mol",
  "kj mol^-1": "kJ/mol",
  "kcal mol-1": "kcal/mol",
  "kcal mol^-1": "kcal/mol",
};

/** Words that are no unit here but say which one is probably meant. */
const hints: Readonly<Record<string, UnitName>> = {
  wavenumber: "cm-1",
  wavenumbers: "cm-1",
  cm: "cm-1",
  micron: "um",
  microns: "um",
  micrometre: "um",
  nanometre: "nm",
  kj: "kJ/mol",
  kcal: "kcal/mol",
};

const known: ReadonlyMap<string, UnitName> = new Map([
  ...unitNames.map((name) => [name.toLowerCase(), name] as const),
  ...Object.entries(spellings),
]);

/** One form for the many ways to type a unit: compatibility forms (µ, ⁻¹) folded, minus as `-`, lower case. */
function simplify(text: string): string {
  return text
    .trim()
    .normalize("NFKC")
    .replace(/[−‐‑–]/gu, "-")
    .replace(/μ/gu, "u")
    .replace(/\s+/gu, " ")
    .toLowerCase();
}

/**
 * Read a unit: any of `unitNames` in any case, `cm^-1`, `cm⁻¹`, `1/cm`, `µm`, `kJ mol-1`. `null` if it is none of them;
 * `MeV` is none (a million times `meV`).
 */
export function readUnit(text: string): UnitName | null {
  if (/^\s*M/u.test(text)) return null;
  return known.get(simplify(text)) ?? null;
}

/** The unit probably meant by a text that is none, for a suggestion; `null` if nothing is near. */
export function nearestUnit(text: string): UnitName | null {
  const wanted = simplify(text);
  const hint = hints[wanted];
  if (hint !== undefined) return hint;
  let best: UnitName | null = null;
  // two slips at most, and fewer than the word is long
  let least = Math.min(3, wanted.length);
  for (const [spelling, name] of known) {
    const slips = editDistance(wanted, spelling);
    if (slips < least) {
      least = slips;
      best = name;
    }
  }
  return best;
}

/** Smallest number of letters to insert, delete or replace between two words (Levenshtein 1966). */
function editDistance(a: string, b: string): number {
  let row = Array.from({ length: b.length + 1 }, (_, j) => j);
  for (let i = 1; i <= a.length; i++) {
    const next = [i];
    for (let j = 1; j <= b.length; j++) {
      next.push(Math.min(row[j]! + 1, next[j - 1]! + 1, row[j - 1]! + (a[i - 1] === b[j - 1] ? 0 : 1)));
    }
    row = next;
  }
  return row[b.length]!;
}

/**
 * Take the unit off the end of a value: `970.056(10) nm` → `970.056(10)` and `nm`. `unit` is null where none stands
 * there; `number` is then the whole text.
 */
export function splitUnit(text: string): { readonly number: string; readonly unit: UnitName | null } {
  const whole = text.trim();
  for (const { index } of whole.matchAll(/(?<=[\d.)])\s*(?=\D)|(?<=[\d.)])\s+(?=1\/)/gu)) {
    const unit = readUnit(whole.slice(index));
    if (unit !== null) return { number: whole.slice(0, index), unit };
  }
  return { number: whole, unit: null };
}
