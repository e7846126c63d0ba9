/** Eigenvalues in rising order and their vectors: `vectors[k]` belongs to `values[k]`, of length 1, largest entry positive. */
export interface Eigen {
  readonly values: readonly number[];
  readonly vectors: readonly (readonly number[])[];
}

/** Sweeps after which rotations have always ended; six to ten are usual. */
const MOST_SWEEPS = 60;

/**
 * Eigenvalues and vectors of a real symmetric matrix by cyclic Jacobi rotations (Jacobi 1846; Golub & Van Loan): the blocks here are small, and
 * small eigenvalues keep their relative precision. The matrix is not changed.
 */
export function symmetricEigen(matrix: readonly (readonly number[])[]): Eigen {
  const n = matrix.length;
  const a = matrix.map((row) => [...row]);
  const v = matrix.map((_, i) => matrix.map((_, j) => (i === j ? 1 : 0)));
  for (let sweep = 0; sweep < MOST_SWEEPS; sweep++) {
    let rotated = false;
    for (let p = 0; p < n - 1; p++)
      for (let q = p + 1; q < n; q++) {
        const apq = a[p]![q]!;
        // Below rounding of both diagonals a rotation changes nothing.
        if (Math.abs(apq) <= 1e-17 * Math.sqrt(Math.abs(a[p]![p]! * a[q]![q]!)) || apq === 0) continue;
        rotated = true;
        rotate(a, v, p, q, n);
      }
    if (!rotated) break;
  }
  const order = a.map((_, k) => k).sort((i, j) => a[i]![i]! - a[j]![j]!);
  return {
    values: order.map((k) => a[k]![k]!),
    vectors: order.map((k) => {
      const column = v.map((row) => row[k]!);
      const largest = column.reduce((best, x) => (Math.abs(x) > Math.abs(best) + 1e-12 ? x : best), 0);
      return largest < 0 ? column.map((x) => -x) : column;
    }),
  };
}

function rotate(a: number[][], v: number[][], p: number, q: number, n: number): void {
  const theta = (a[q]![q]! - a[p]![p]!) / (2 * a[p]![q]!);
  const t = (theta >= 0 ? 1 : -1) / (Math.abs(theta) + Math.hypot(theta, 1));
  const c = 1 / Math.hypot(t, 1);
  const s = t * c;
  const apq = a[p]![q]!;
  a[p]![p]! -= t * apq;
  a[q]![q]! += t * apq;
  a[p]![q] = 0;
  a[q]![p] = 0;
  for (let k = 0; k < n; k++) {
    if (k !== p && k !== q) {
      const [akp, akq] = [a[k]![p]!, a[k]![q]!];
      a[k]![p] = akp * c - akq * s;
      a[p]![k] = a[k]![p]!;
      a[k]![q] = akq * c + akp * s;
      a[q]![k] = a[k]![q]!;
    }
    const [vkp, vkq] = [v[k]![p]!, v[k]![q]!];
    v[k]![p] = vkp * c - vkq * s;
    v[k]![q] = vkq * c + vkp * s;
  }
}
