import { permutations, type Species, speciesOf } from "./permutations.ts";

/** States that permutations of the bonds turn into each other: the quanta in falling order, such as 210. */
export interface Orbit {
  readonly quanta: readonly number[];
  /** Σ v(v+1): the coefficient of -wx */
  readonly anharmonic: number;
  /** Σ v_i v_j over pairs: the coefficient of -wxcross */
  readonly cross: number;
}

/** A symmetry-adapted block of V quanta: one vector for each level of the species, each built from one orbit. */
export interface Block {
  readonly total: number;
  readonly species: Species;
  /** orbit of each basis vector */
  readonly orbits: readonly Orbit[];
  /** the coupling over λ, in this basis */
  readonly coupling: readonly (readonly number[])[];
}

const remembered = new Map<string, readonly Block[]>();

/**
 * Blocks of V quanta in N equivalent bonds, by species; those without levels are left out. Made once for each N and V: only the constants
 * change between evaluations. Basis vectors are projections of local states onto row 1 of each species, so a degenerate level stands once.
 */
export function blocksOf(bonds: number, total: number): readonly Block[] {
  const key = `${bonds} ${total}`;
  let blocks = remembered.get(key);
  if (blocks === undefined) {
    blocks = makeBlocks(bonds, total);
    remembered.set(key, blocks);
  }
  return blocks;
}

function makeBlocks(bonds: number, total: number): Block[] {
  const states = statesOf(bonds, total);
  const index = new Map(states.map((state, i) => [state.join(), i]));
  const group = permutations(bonds);
  const images = states.map((state) => group.map((g) => index.get(moved(state, g).join())!));
  const hops = states.map((state) =>
    neighbours(state).map(([to, element]) => [index.get(to.join())!, element] as const),
  );
  return speciesOf(bonds).flatMap((species) => {
    const vectors: { readonly orbit: Orbit; readonly vector: readonly number[] }[] = [];
    for (const orbit of orbitsOf(bonds, total)) {
      const kept: (readonly number[])[] = [];
      states.forEach((state, i) => {
        if (!sameOrbit(state, orbit)) return;
        const projected = new Array<number>(states.length).fill(0);
        images[i]!.forEach((to, g) => {
          projected[to]! += species.element[g]!;
        });
        const rest = orthogonal(projected, kept);
        if (rest !== null) kept.push(rest);
      });
      for (const vector of kept) vectors.push({ orbit, vector });
    }
    if (vectors.length === 0) return [];
    const applied = vectors.map(({ vector }) => apply(hops, vector));
    return [
      {
        total,
        species,
        orbits: vectors.map(({ orbit }) => orbit),
        coupling: vectors.map(({ vector }) => applied.map((image) => dot(vector, image))),
      },
    ];
  });
}

/** All ways to put V quanta into the bonds. */
function statesOf(bonds: number, total: number): number[][] {
  if (bonds === 1) return [[total]];
  return Array.from({ length: total + 1 }, (_, first) => total - first).flatMap((first) =>
    statesOf(bonds - 1, total - first).map((rest) => [first, ...rest]),
  );
}

/** Orbits in the order of their energies without coupling: most quanta in one bond lowest; equal ones by their digits. */
function orbitsOf(bonds: number, total: number): Orbit[] {
  return statesOf(bonds, total)
    .filter((state) => state.every((v, i) => i === 0 || v <= state[i - 1]!))
    .map((quanta) => ({
      quanta,
      anharmonic: quanta.reduce((sum, v) => sum + v * (v + 1), 0),
      cross: (total ** 2 - quanta.reduce((sum, v) => sum + v * v, 0)) / 2,
    }))
    .sort((a, b) => b.anharmonic - a.anharmonic || compare(b.quanta, a.quanta));
}

function compare(a: readonly number[], b: readonly number[]): number {
  const at = a.findIndex((v, i) => v !== b[i]);
  return at < 0 ? 0 : a[at]! - b[at]!;
}

const sameOrbit = (state: readonly number[], { quanta }: Orbit) =>
  [...state].sort((a, b) => b - a).every((v, i) => v === quanta[i]);

function moved(state: readonly number[], g: readonly number[]): number[] {
  const to = [...state];
  state.forEach((v, i) => {
    to[g[i]!] = v;
  });
  return to;
}

/** One quantum from bond j to bond i, √((v_i+1)·v_j) (Child & Lawton 1981). */
function neighbours(state: readonly number[]): (readonly [number[], number])[] {
  return state.flatMap((from, j) =>
    from === 0
      ? []
      : state.flatMap((into, i) => {
          if (i === j) return [];
          const to = [...state];
          to[j]! -= 1;
          to[i]! += 1;
          return [[to, Math.sqrt((into + 1) * from)] as const];
        }),
  );
}

function apply(hops: readonly (readonly (readonly [number, number])[])[], vector: readonly number[]): number[] {
  const image = new Array<number>(vector.length).fill(0);
  vector.forEach((x, i) => {
    if (x !== 0) for (const [to, element] of hops[i]!) image[to]! += element * x;
  });
  return image;
}

const dot = (a: readonly number[], b: readonly number[]) => a.reduce((sum, x, i) => sum + x * b[i]!, 0);

/** The part of a vector orthogonal to those kept, of length 1; null when nothing is left. Twice, so that rounding is gone. */
function orthogonal(vector: readonly number[], kept: readonly (readonly number[])[]): number[] | null {
  const size = Math.sqrt(dot(vector, vector));
  if (size < 1e-9) return null;
  let rest = vector.map((x) => x / size);
  for (let round = 0; round < 2; round++)
    for (const other of kept) {
      const share = dot(rest, other);
      rest = rest.map((x, i) => x - share * other[i]!);
    }
  const length = Math.sqrt(dot(rest, rest));
  return length < 1e-6 ? null : rest.map((x) => x / length);
}
