import { type Explanation, readMeasurement } from "../quantity/index.ts";
import type { Bond } from "./bond.ts";
import { isElement } from "./isotopes.ts";
import { type Atom, readAtom } from "./read-atom.ts";

const mend = "write two atoms such as 1H 35Cl";

/**
 * Read a bond: two atoms, `1H 35Cl`, apart by space, comma, hyphen, or written together where that is unambiguous
 * (`1H35Cl`, `HCl`). Without a mass number an element means its abundance-weighted mean, except `H`, `D`, `T`, which are
 * 1H, 2H, 3H. `reducedMass` = m1·m2/(m1 + m2) in u, of neutral atoms; for an ion the electrons lost matter
 * (m − q·m_e, 5e-4 u each): give its reduced mass instead.
 */
export function readBond(text: string): Bond | Explanation {
  if (/\p{L}\d*[+\-−⁺⁻]$/u.test(text.trim())) {
    return {
      what: `"${text.trim()}" carries a charge`,
      mend: "write neutral atoms such as 1H 35Cl, or give the reduced mass",
    };
  }
  const words = text
    .trim()
    .split(/[\s,;·\-‐‑–−]+/u)
    .filter((word) => word !== "");
  if (words.length === 0) return { what: "the bond is missing", mend };
  const names = words.length === 1 ? takeApart(words[0]!) : words;
  if (names.length !== 2) {
    const few = names.length === 1 ? "names one atom" : `names ${names.length} atoms`;
    return { what: `"${text.trim()}" ${few}`, mend };
  }
  const [first, second] = [readAtom(names[0]!), readAtom(names[1]!)];
  if ("what" in first) return first;
  if ("what" in second) return second;
  return {
    text: text.trim(),
    atoms: [first.name, second.name],
    reducedMass: reducedMassOf(first, second),
  };
}

/** m1·m2/(m1 + m2) in u. */
export function reducedMassOf(first: Pick<Atom, "mass">, second: Pick<Atom, "mass">): number {
  return (first.mass * second.mass) / (first.mass + second.mass);
}

/** Split `1H35Cl` or `HCl` into its atoms; a word that is one atom, or cannot be split in one way only, stays whole. */
function takeApart(word: string): readonly string[] {
  const plain = word.normalize("NFKC");
  const known = (letters: string) => isElement(letters) || letters === "D" || letters === "T";
  if (/^\d*[A-Za-z]+$/u.test(plain) && known(plain.replace(/\d/gu, ""))) return [word];
  // an upper-case letter, or a mass number, begins an atom
  const atoms = plain.match(/\d*[A-Z][a-z]*/gu) ?? [];
  if (atoms.length >= 2 && atoms.join("") === plain) return atoms;
  const marked = plain.match(/\d*[A-Za-z]+/gu) ?? [];
  return marked.join("") === plain && marked.length > 1 ? marked : [word];
}

/** A bond known only by its reduced mass in u (a positive number without uncertainty). */
export function reducedMassBond(text: string): Bond | Explanation {
  const read = readMeasurement(text.trim().replace(/\s*u$/u, ""));
  if (!read.ok) return { what: read.what, mend: "write a reduced mass in u such as 0.9796" };
  if (read.sigma !== null) {
    return {
      what: `the reduced mass "${text.trim()}" carries an uncertainty`,
      mend: "write the number alone, such as 0.9796",
    };
  }
  if (read.value <= 0)
    return { what: `the reduced mass "${text.trim()}" is not positive`, mend: "write it in u, such as 0.9796" };
  return { text: `reduced mass ${read.value} u`, atoms: null, reducedMass: read.value };
}
