import type { ModelOptions } from "../model.ts";
import { type LevelName, namesOf } from "./ladder.ts";

/** A level asked for: one name, or where ± are not known the one of that place from below among both. */
export interface Resolved {
  readonly total: number;
  readonly among: readonly LevelName[];
  readonly place: number;
}

/** What a label means, or why it means nothing. */
export type Meaning =
  | { readonly upper: Resolved; readonly lower: Resolved | null }
  | { readonly what: string; readonly mend: string };

/** More quanta than this are surely a slip. */
const MOST_QUANTA = 30;

const understood = new Map<string, Meaning>();

/** Read `20+`, `11`, `210E#2`, `10.0+` or `20+ from 10-`. */
export function readLabel(label: string, bonds: ModelOptions["bonds"]): Meaning {
  const key = `${bonds} ${label}`;
  let meaning = understood.get(key);
  if (meaning === undefined) {
    meaning = read(label, bonds);
    understood.set(key, meaning);
  }
  return meaning;
}

function read(label: string, bonds: ModelOptions["bonds"]): Meaning {
  const [upperText, lowerText, ...more] = label.trim().split(/\s+from\s+/i);
  if (more.length > 0) return { what: `"${label}" names more than two levels`, mend: "write it as in 20+ from 10-" };
  const upper = readLevel(upperText!, bonds);
  if ("what" in upper) return upper;
  if (lowerText === undefined || /^0+(\.0+)*$/.test(lowerText)) return { upper, lower: null };
  const lower = readLevel(lowerText, bonds);
  if ("what" in lower) return lower;
  if (upper.total === lower.total && upper.among[0]!.label === lower.among[0]!.label && upper.place === lower.place)
    return { what: `"${label}" names the same level twice`, mend: "write two different levels" };
  return { upper, lower };
}

type Read = Resolved | { readonly what: string; readonly mend: string };

function readLevel(text: string, bonds: ModelOptions["bonds"]): Read {
  const size = bonds === "unlike" ? 2 : (bonds ?? 2);
  const [, state, ending = "", nth = ""] =
    /^([\d.]+)([+-]|[ABEF][12]?)?(?:#(\d+))?$/.exec(text.trim().replace(/[−–]/g, "-").replace(/\s+/g, "")) ?? [];
  const example = { 2: "20+, 20- or 11", 3: "200A1, 210E or 210E#2", 4: "2000A1 or 2100F2" }[size]!;
  const form = bonds === "unlike" ? "1.0, 0.1 or 2.1" : example;
  const wrong = (what: string, mend = `write the quanta in each bond and the species, such as ${form}`): Read => ({
    what,
    mend,
  });
  if (state === undefined) return wrong(`"${text}" is not the label of a level of ${count(size)}`);
  const written = state.includes(".") ? state.split(".").map(Number) : [...state].map(Number);
  if (written.length !== size || !written.every(Number.isInteger))
    return wrong(
      `"${text}" has the quanta of ${written.length} bond${written.length === 1 ? "" : "s"}, not of ${size}`,
    );
  const total = written.reduce((sum, v) => sum + v, 0);
  if (total === 0)
    return wrong(`"${text}" is the ground state`, "leave it out: bands start there unless another level is named");
  if (total > MOST_QUANTA) return wrong(`"${text}" has ${total} quanta`, `write at most ${MOST_QUANTA}`);
  const quanta = bonds === "unlike" ? written : [...written].sort((a, b) => b - a);
  const names = namesOf(bonds, total).filter((name) => name.quanta.every((v, i) => v === quanta[i]));
  const species = { "+": "A1", "-": "B2" }[ending] ?? ending;
  const place = nth === "" ? 0 : Number(nth) - 1;
  const choices = names.map(({ label }) => label).join(", ");
  if (bonds === "unlike" || (species === "" && bonds === 2)) {
    if (species !== "")
      return wrong(`"${text}" has a species, which unlike bonds do not have`, `write ${names[0]!.label}`);
    if (place >= names.length)
      return wrong(`there is no "${text}"`, `there ${names.length === 1 ? "is" : "are"} ${choices}`);
    return { total, among: names, place };
  }
  const all = [...new Set(namesOf(bonds, total).map((name) => name.species))];
  if (species !== "" && !["A1", "A2", "B2", "E", "F1", "F2"].includes(species))
    return wrong(`"${ending}" is no species of ${count(size)}`, `those with ${total} quanta are ${all.join(", ")}`);
  const found = names.filter((name) => name.species === species || (species === "" && names.length === 1));
  if (species === "" && names.length > 1)
    return wrong(`"${text}" does not say which level of several`, `write one of ${choices}`);
  if (found[place] === undefined)
    return wrong(`there is no level "${text}"`, `the levels of those quanta are ${choices}`);
  return { total, among: [found[place]!], place: 0 };
}

const count = (bonds: number) => ({ 2: "two bonds", 3: "three bonds", 4: "four bonds" })[bonds] ?? `${bonds} bonds`;
