import { symmetricEigen } from "../eigen.ts";

/** A block of polyad number N and angular momentum l: states by falling v_s, matrices by constant. */
interface Block {
  readonly states: readonly { readonly s: number; readonly b: number }[];
  readonly parts: readonly (readonly (readonly number[])[])[];
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
    const diagonal = (of: (s: number, b: number) => number) =>
      states.map(({ s, b }, i) => states.map((_, j) => (i === j ? of(s, b) : 0)));
    const coupling = states.map((left, i) =>
      states.map((right, j) => {
        if (Math.abs(i - j) !== 1) return 0;
        const { s, b } = i < j ? left : right;
        return couplingElement(s, b, l, single);
      }),
    );
    block = {
      states,
      parts: [
        diagonal((s) => s),
        diagonal((_, b) => b),
        diagonal((s) => s * s),
        diagonal((_, b) => b * b),
        diagonal((s, b) => s * b),
        ...(single ? [] : [diagonal(() => l * l)]),
        coupling,
      ],
    };
    remembered.set(key, block);
  }
  return block;
}

/** Levels of the block with N and l, the highest first. */
export function solveBlock(n: number, l: number, single: boolean, p: readonly number[]): SolvedBlock {
  const { states, parts } = blockOf(n, l, single);
  const hamiltonian = states.map((_, i) =>
    states.map((__, j) => parts.reduce((sum, part, k) => sum + p[k]! * part[i]![j]!, 0)),
  );
  const { values, vectors } = symmetricEigen(hamiltonian);
  const down = [...vectors].reverse();
  return {
    states,
    energies: [...values].reverse(),
    uncoupled: hamiltonian.map((row, i) => row[i]!).sort((a, b) => b - a),
    vectors: down,
    gradients: down.map((c) =>
      parts.map((part) => c.reduce((sum, x, i) => sum + x * c.reduce((inner, y, j) => inner + part[i]![j]! * y, 0), 0)),
    ),
  };
}
