import { symmetricEigen } from "../eigen.ts";

/** A block of polyad number N and angular momentum l: states by falling v_s; its matrices have entries on and beside the diagonal only. */
interface Block {
  readonly states: readonly { readonly s: number; readonly b: number }[];
  /** diagonals, one a constant but the last, k */
  readonly diagonals: readonly (readonly number[])[];
  /** the matrix of k between one state and the next */
  readonly coupling: readonly number[];
}

/** A block at given constants, levels from the highest down, as they are numbered. */
export interface SolvedBlock {
  readonly states: Block["states"];
  readonly energies: readonly number[];
  /** the same without the coupling */
  readonly uncoupled: readonly number[];
  readonly vectors: readonly (readonly number[])[];
  /** dE/dp (Hellmann–Feynman) */
  readonly gradients: readonly (readonly number[])[];
}

const remembered = new Map<string, Block>();

/**
 * ⟨v_s-1, v_b+2|H|v_s, v_b⟩ over k: -½·√(½·v_s·(v_b-l+2)(v_b+l+2)) for a degenerate bend (Dübal & Quack 1984), with k_sbb·q_s·(q_x² + q_y²) in
 * dimensionless normal coordinates; for a single bend -½·√(½·v_s·(v_b+1)(v_b+2)), with k_sbb·q_s·q_b².
 */
export function couplingElement(s: number, b: number, l: number, single: boolean): number {
  return -Math.sqrt((s * (single ? (b + 1) * (b + 2) : (b - l + 2) * (b + l + 2))) / 2) / 2;
}

/** Number of levels of a block: v_s from 0 up while v_b = 2(N - v_s) is not below l. */
export const sizeOf = (n: number, l: number) => Math.floor(n - l / 2 + 1e-9) + 1;

function blockOf(n: number, l: number, single: boolean): Block {
  const key = `${n} ${l} ${single}`;
  let block = remembered.get(key);
  if (block === undefined) {
    const size = sizeOf(n, l);
    const states = Array.from({ length: size }, (_, i) => ({ s: size - 1 - i, b: 2 * (n - (size - 1 - i)) }));
    const diagonal = (of: (s: number, b: number) => number) => states.map(({ s, b }) => of(s, b));
    block = {
      states,
      diagonals: [
        diagonal((s) => s),
        diagonal((_, b) => b),
        diagonal((s) => s * s),
        diagonal((_, b) => b * b),
        diagonal((s, b) => s * b),
        ...(single ? [] : [diagonal(() => l * l)]),
      ],
      coupling: states.slice(0, -1).map(({ s, b }) => couplingElement(s, b, l, single)),
    };
    remembered.set(key, block);
  }
  return block;
}

/** Levels of the block with N and l, the highest first. */
export function solveBlock(n: number, l: number, single: boolean, p: readonly number[]): SolvedBlock {
  const { states, diagonals, coupling } = blockOf(n, l, single);
  const k = p[diagonals.length]!;
  const diagonal = states.map((_, i) => diagonals.reduce((sum, of, c) => sum + p[c]! * of[i]!, 0));
  const { values, vectors } = symmetricEigen(
    states.map((_, i) =>
      states.map((__, j) => (i === j ? diagonal[i]! : Math.abs(i - j) === 1 ? k * coupling[Math.min(i, j)]! : 0)),
    ),
  );
  const down = [...vectors].reverse();
  return {
    states,
    energies: [...values].reverse(),
    uncoupled: [...diagonal].sort((a, b) => b - a),
    vectors: down,
    gradients: down.map((c) => [
      ...diagonals.map((of) => of.reduce((sum, x, i) => sum + x * c[i]! * c[i]!, 0)),
      coupling.reduce((sum, w, i) => sum + 2 * w * c[i]! * c[i + 1]!, 0),
    ]),
  };
}
