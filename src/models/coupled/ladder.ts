import { symmetricEigen } from "../eigen.ts";
import type { MixedLevel, Part } from "../manifold.ts";
import type { ModelOptions } from "../model.ts";
import { blocksOf, type Orbit } from "./basis.ts";

/** A level before it has numbers: where it stands in its block, and what it is called. */
export interface LevelName {
  readonly label: string;
  readonly total: number;
  /** species, or "" for unlike bonds */
  readonly species: string;
  readonly degeneracy: number;
  /** place from below among the levels of that species with V quanta */
  readonly order: number;
  /** of the local state that leads where bonds are not coupled */
  readonly quanta: readonly number[];
}

/** The matrices of one block: H = Σ p_k·parts[k], levels from below. */
interface Matrices {
  readonly species: string;
  readonly degeneracy: number;
  readonly states: readonly string[];
  readonly parts: readonly (readonly (readonly number[])[])[];
}

const SIGNS: Readonly<Record<string, string>> = { A1: "+", B2: "-" };

/** Digits of a state: 210, or with points from ten quanta on, 10.0; unlike bonds always with points. */
export const digits = (quanta: readonly number[], bonds: ModelOptions["bonds"]) =>
  quanta.join(bonds === "unlike" || quanta.some((v) => v > 9) ? "." : "");

/** Names of all levels with V quanta, from below within each species. */
export function namesOf(bonds: ModelOptions["bonds"], total: number): readonly LevelName[] {
  const key = `${bonds} ${total}`;
  let names = remembered.get(key);
  if (names === undefined) {
    names = bonds === "unlike" ? unlikeNames(total) : equivalentNames(bonds ?? 2, total);
    remembered.set(key, names);
  }
  return names;
}

const remembered = new Map<string, readonly LevelName[]>();

function equivalentNames(bonds: number, total: number): LevelName[] {
  const blocks = blocksOf(bonds, total);
  const speciesOfOrbit = (orbit: Orbit) =>
    blocks.filter(({ orbits }) => orbits.some((other) => same(other, orbit))).length;
  return blocks.flatMap(({ species, orbits }) =>
    orbits.map((orbit, order) => {
      const text = digits(orbit.quanta, bonds);
      const before = orbits.slice(0, order).filter((other) => same(other, orbit)).length;
      const alone = speciesOfOrbit(orbit) === 1 && bonds === 2;
      const ending = bonds === 2 ? (alone ? "" : SIGNS[species.name]!) : species.name;
      return {
        label: `${text}${ending}${before === 0 ? "" : `#${before + 1}`}`,
        total,
        species: species.name,
        degeneracy: species.degeneracy,
        order,
        quanta: orbit.quanta,
      };
    }),
  );
}

const same = (a: Orbit, b: Orbit) => a.quanta.every((v, i) => v === b.quanta[i]);

/** Unlike bonds are named by their leading state, which depends on the constants: see `unlikeOrder`. */
function unlikeNames(total: number): LevelName[] {
  return Array.from({ length: total + 1 }, (_, second) => {
    const quanta = [total - second, second];
    return { label: digits(quanta, "unlike"), total, species: "", degeneracy: 1, order: second, quanta };
  });
}

/** Everything about one block at given constants. */
export interface SolvedBlock {
  readonly species: string;
  readonly degeneracy: number;
  readonly states: readonly string[];
  readonly energies: readonly number[];
  readonly vectors: readonly (readonly number[])[];
  /** dE/dp of each level (Hellmann–Feynman) */
  readonly gradients: readonly (readonly number[])[];
}

/** The blocks of V quanta, solved. `keys` tells which constants p holds. */
export function solveBlocks(
  bonds: ModelOptions["bonds"],
  total: number,
  keys: readonly string[],
  p: readonly number[],
): SolvedBlock[] {
  return matricesOf(bonds, total, keys).map(({ species, degeneracy, states, parts }) => {
    const n = states.length;
    const hamiltonian = Array.from({ length: n }, (_, i) =>
      Array.from({ length: n }, (_, j) => parts.reduce((sum, part, k) => sum + p[k]! * part[i]![j]!, 0)),
    );
    const { values, vectors } = symmetricEigen(hamiltonian);
    return {
      species,
      degeneracy,
      states,
      energies: values,
      vectors,
      gradients: vectors.map((c) => parts.map((part) => expectation(part, c))),
    };
  });
}

function expectation(matrix: readonly (readonly number[])[], c: readonly number[]): number {
  let sum = 0;
  for (let i = 0; i < c.length; i++) {
    const row = matrix[i]!;
    let inner = 0;
    for (let j = 0; j < c.length; j++) inner += row[j]! * c[j]!;
    sum += c[i]! * inner;
  }
  return sum;
}

const built = new Map<string, readonly Matrices[]>();

function matricesOf(bonds: ModelOptions["bonds"], total: number, keys: readonly string[]): readonly Matrices[] {
  const key = `${bonds} ${total} ${keys.length}`;
  let matrices = built.get(key);
  if (matrices === undefined) {
    matrices = bonds === "unlike" ? [unlikeMatrices(total)] : equivalentMatrices(bonds ?? 2, total, keys);
    built.set(key, matrices);
  }
  return matrices;
}

const diagonal = (entries: readonly number[]) => entries.map((x, i) => entries.map((_, j) => (i === j ? x : 0)));

function equivalentMatrices(bonds: number, total: number, keys: readonly string[]): Matrices[] {
  return blocksOf(bonds, total).map(({ species, orbits, coupling }) => ({
    species: species.name,
    degeneracy: species.degeneracy,
    states: orbits.map(({ quanta }) => digits(quanta, bonds)),
    parts: [
      diagonal(orbits.map(() => total)),
      diagonal(orbits.map(({ anharmonic }) => -anharmonic)),
      coupling,
      ...(keys.includes("wxcross") ? [diagonal(orbits.map(({ cross }) => -cross))] : []),
    ],
  }));
}

/** |v1 v2⟩ of two unlike bonds with one coupling; constants w1 wx1 w2 wx2 lambda. */
function unlikeMatrices(total: number): Matrices {
  const first = Array.from({ length: total + 1 }, (_, second) => total - second);
  const second = first.map((v) => total - v);
  const hop = first.map((_, i) =>
    first.map((__, j) =>
      Math.abs(i - j) === 1 ? Math.sqrt(Math.max(first[i]!, first[j]!) * Math.max(second[i]!, second[j]!)) : 0,
    ),
  );
  return {
    species: "",
    degeneracy: 1,
    states: first.map((v, i) => digits([v, second[i]!], "unlike")),
    parts: [
      diagonal(first),
      diagonal(first.map((v) => -v * (v + 1))),
      diagonal(second),
      diagonal(second.map((v) => -v * (v + 1))),
      hop,
    ],
  };
}

/** Place from below of each state of unlike bonds as named by its quanta: the order of the energies without coupling. */
export function unlikeOrder(total: number, p: readonly number[]): number[] {
  const [w1, wx1, w2, wx2] = p as [number, number, number, number];
  const energy = (second: number) => {
    const first = total - second;
    return w1 * first - wx1 * first * (first + 1) + w2 * second - wx2 * second * (second + 1);
  };
  const sorted = Array.from({ length: total + 1 }, (_, second) => second).sort((a, b) => energy(a) - energy(b));
  return sorted.map((_, second) => sorted.indexOf(second));
}

/** All levels with 1 … upTo quanta, by V and then from below. */
export function levelsUpTo(
  options: ModelOptions,
  keys: readonly string[],
  p: readonly number[],
  upTo: number,
): MixedLevel[] {
  const { bonds } = options;
  return Array.from({ length: upTo }, (_, v) => v + 1).flatMap((total) => {
    const solved = solveBlocks(bonds, total, keys, p);
    const order = bonds === "unlike" ? unlikeOrder(total, p) : null;
    const levels = namesOf(bonds, total).map((name, i): MixedLevel => {
      const block = solved.find(({ species }) => species === name.species)!;
      const at = order === null ? name.order : order[i]!;
      const composition = compositionOf(block, at);
      return {
        label: name.label,
        numbers: { V: total, ...(bonds === "unlike" ? {} : { species: name.species }) },
        degeneracy: name.degeneracy,
        energy: block.energies[at]!,
        uncoupled: uncoupledEnergy(keys, p, name.quanta),
        gradient: block.gradients[at]!,
        share: composition.find(({ state }) => state === digits(name.quanta, bonds))?.weight ?? 0,
        composition,
      };
    });
    return levels.sort((a, b) => a.energy - b.energy);
  });
}

function uncoupledEnergy(keys: readonly string[], p: readonly number[], quanta: readonly number[]): number {
  const of = (key: string) => p[keys.indexOf(key)] ?? 0;
  const pair = quanta.flatMap((v, i) => quanta.slice(i + 1).map((u) => u * v)).reduce((sum, x) => sum + x, 0);
  const each = quanta.map((v, i) => {
    const ending = keys.includes("w1") ? String(i + 1) : "";
    return v * of(`w${ending}`) - v * (v + 1) * of(`wx${ending}`);
  });
  return each.reduce((sum, x) => sum + x, 0) - pair * of("wxcross");
}

/** Weights by local state, equal digits together, largest first; below 1e-6 left out. */
function compositionOf({ states, vectors }: SolvedBlock, at: number): Part[] {
  const weights = new Map<string, number>();
  vectors[at]!.forEach((c, i) => {
    weights.set(states[i]!, (weights.get(states[i]!) ?? 0) + c * c);
  });
  return [...weights]
    .map(([state, weight]) => ({ state, weight }))
    .filter(({ weight }) => weight > 1e-6)
    .sort((a, b) => b.weight - a.weight);
}
