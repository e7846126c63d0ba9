/** Solve and invert normal equations of rows and right-hand sides by Gauss–Jordan: an independent check of QR, good to nine digits or so. */
export function normalEquations(rows: readonly (readonly number[])[], right: readonly number[]) {
  const n = rows[0]!.length;
  const gram = Array.from({ length: n }, (_, i) =>
    Array.from({ length: n }, (_, j) => rows.reduce((sum, row) => sum + row[i]! * row[j]!, 0)),
  );
  const onto = Array.from({ length: n }, (_, i) => rows.reduce((sum, row, k) => sum + row[i]! * right[k]!, 0));
  return { solution: solveLinear(gram, onto), inverse: invert(gram) };
}

/** x of a·x = b. */
export function solveLinear(a: readonly (readonly number[])[], b: readonly number[]): number[] {
  const n = b.length;
  return reduced(a.map((row, i) => [...row, b[i]!])).map((row) => row[n]!);
}

/** Inverse of a square matrix. */
export function invert(a: readonly (readonly number[])[]): number[][] {
  const n = a.length;
  return reduced(a.map((row, i) => [...row, ...row.map((_, j) => Number(i === j))])).map((row) => row.slice(n));
}

function reduced(rows: readonly (readonly number[])[]): number[][] {
  const work = rows.map((row) => [...row]);
  for (let k = 0; k < work.length; k++) {
    const pivot = work[k]![k]!;
    work[k] = work[k]!.map((x) => x / pivot);
    for (let i = 0; i < work.length; i++)
      if (i !== k) {
        const factor = work[i]![k]!;
        work[i] = work[i]!.map((x, j) => x - factor * work[k]![j]!);
      }
  }
  return work;
}
