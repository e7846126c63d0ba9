import { InputError } from "../messages/index.ts";
import { readMeasurement } from "../quantity/index.ts";

/** A correlation matrix from its upper triangle row by row, `r12` or `r12 r13 r23`; null when none is given. @throws InputError */
export function readCorrelation(text: string | number | undefined, size: number): number[][] | null {
  if (text === undefined) return null;
  const wanted = (size * (size - 1)) / 2;
  const wrong = (what: string) =>
    new InputError([
      {
        code: "correlation",
        place: { source: "--correlation" },
        what,
        mend: `write the ${wanted} correlation${wanted === 1 ? "" : "s"} above the diagonal row by row, each between -1 and 1`,
      },
    ]);
  const words = String(text)
    .split(/[\s,;]+/)
    .filter((word) => word !== "");
  const values = words.map((word) => {
    const read = readMeasurement(word);
    return read.ok ? read.value : Number.NaN;
  });
  if (values.length !== wanted) throw wrong(`${values.length} correlations for ${size} constants`);
  if (!values.every((r) => Math.abs(r) <= 1)) throw wrong(`"${text}" holds no correlations`);
  const matrix = Array.from({ length: size }, (_, i) => Array.from({ length: size }, (_, j) => Number(i === j)));
  let at = 0;
  for (let i = 0; i < size; i++)
    for (let j = i + 1; j < size; j++) {
      matrix[i]![j] = values[at]!;
      matrix[j]![i] = values[at++]!;
    }
  if (!isPossible(matrix)) throw wrong("these correlations contradict each other");
  return matrix;
}

/** Positive semidefinite, by elimination. */
function isPossible(matrix: readonly (readonly number[])[]): boolean {
  const a = matrix.map((row) => [...row]);
  for (let k = 0; k < a.length; k++) {
    const pivot = a[k]![k]!;
    if (pivot < -1e-12) return false;
    if (pivot < 1e-14) continue;
    for (let i = k + 1; i < a.length; i++)
      for (let j = k + 1; j < a.length; j++) a[i]![j]! -= (a[i]![k]! * a[k]![j]!) / pivot;
  }
  return true;
}
