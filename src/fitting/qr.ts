/** A least-squares system: A with the right-hand side b as its last column, row by row. It is overwritten. */
export interface System {
  readonly rows: number;
  readonly columns: number;
  readonly augmented: Float64Array;
}

/** The upper triangle R of A·diag(1/scale) = Q·R, kept with the scales of the columns. */
export interface Triangle {
  readonly columns: number;
  readonly r: Float64Array;
  readonly scale: Float64Array;
  /** index of the first column that depends on those before it, or -1 */
  readonly dependent: number;
  /** ‖b - A·x‖² of the solution */
  readonly sumOfSquares: number;
  readonly solution: Float64Array;
}

/** A column of which less than this share is independent of the others is taken as dependent: 1e4 roundings. */
const RANK_TOLERANCE = 2e-12;

/**
 * Least squares by Householder QR on columns scaled to unit length (Golub & Van Loan, Matrix Computations, section 5.2).
 * No normal equations: polynomial bases keep their digits. Throws RangeError with fewer rows than columns.
 */
export function triangularise({ rows, columns, augmented: a }: System): Triangle {
  if (rows < columns) throw new RangeError(`${rows} rows cannot determine ${columns} columns`);
  const stride = columns + 1;
  const scale = scaleColumns(a, rows, columns);
  let dependent = -1;
  for (let j = 0; j < columns; j++) {
    let squares = 0;
    for (let i = j; i < rows; i++) squares += a[i * stride + j]! ** 2;
    const norm = Math.sqrt(squares);
    if (!(norm > RANK_TOLERANCE) && dependent < 0) dependent = j;
    if (norm > 0) reflect(a, rows, stride, j, norm);
  }
  let sumOfSquares = 0;
  for (let i = columns; i < rows; i++) sumOfSquares += a[i * stride + columns]! ** 2;
  const r = new Float64Array(columns * columns);
  for (let i = 0; i < columns; i++) for (let j = i; j < columns; j++) r[i * columns + j] = a[i * stride + j]!;
  const solution = new Float64Array(columns);
  if (dependent < 0) {
    for (let i = columns - 1; i >= 0; i--) {
      let sum = a[i * stride + columns]!;
      for (let j = i + 1; j < columns; j++) sum -= r[i * columns + j]! * solution[j]!;
      solution[i] = sum / r[i * columns + i]!;
    }
    for (let j = 0; j < columns; j++) solution[j]! /= scale[j]!;
  }
  return { columns, r, scale, dependent, sumOfSquares, solution };
}

/** What is left of a system once its first columns are fitted away: the rows that no longer hold them, without those columns. */
export function withoutColumns({ rows, columns, augmented: a }: System, first: number): number[][] {
  const stride = columns + 1;
  for (let j = 0; j < first; j++) {
    let squares = 0;
    for (let i = j; i < rows; i++) squares += a[i * stride + j]! ** 2;
    if (squares > 0) reflect(a, rows, stride, j, Math.sqrt(squares));
  }
  return Array.from({ length: Math.max(0, rows - first) }, (_, i) => [
    ...a.subarray((first + i) * stride + first, (first + i + 1) * stride),
  ]);
}

function scaleColumns(a: Float64Array, rows: number, columns: number): Float64Array {
  const stride = columns + 1;
  const scale = new Float64Array(columns);
  for (let j = 0; j < columns; j++) {
    let largest = 0;
    for (let i = 0; i < rows; i++) largest = Math.max(largest, Math.abs(a[i * stride + j]!));
    let squares = 0;
    if (largest > 0) for (let i = 0; i < rows; i++) squares += (a[i * stride + j]! / largest) ** 2;
    scale[j] = largest > 0 ? largest * Math.sqrt(squares) : 1;
    for (let i = 0; i < rows; i++) a[i * stride + j]! /= scale[j]!;
  }
  return scale;
}

/** One Householder reflection that clears column j below the diagonal; `norm` is the length of that part. */
function reflect(a: Float64Array, rows: number, stride: number, j: number, norm: number): void {
  const head = a[j * stride + j]!;
  const alpha = head > 0 ? -norm : norm;
  const v0 = head - alpha;
  const beta = -1 / (alpha * v0);
  for (let k = j + 1; k < stride; k++) {
    let dot = v0 * a[j * stride + k]!;
    for (let i = j + 1; i < rows; i++) dot += a[i * stride + j]! * a[i * stride + k]!;
    dot *= beta;
    a[j * stride + k]! -= dot * v0;
    for (let i = j + 1; i < rows; i++) a[i * stride + k]! -= dot * a[i * stride + j]!;
  }
  a[j * stride + j] = alpha;
}

/** (AᵀA)⁻¹ from the triangle, in the units of the unscaled columns. */
export function inverseGram({ columns, r, scale }: Triangle): number[][] {
  const inverse = new Float64Array(columns * columns);
  for (let k = 0; k < columns; k++) {
    for (let i = k; i >= 0; i--) {
      let sum = i === k ? 1 : 0;
      for (let j = i + 1; j <= k; j++) sum -= r[i * columns + j]! * inverse[j * columns + k]!;
      inverse[i * columns + k] = sum / r[i * columns + i]!;
    }
  }
  const gram: number[][] = [];
  for (let i = 0; i < columns; i++) {
    const row = new Array<number>(columns);
    for (let j = 0; j < columns; j++) {
      let sum = 0;
      for (let k = Math.max(i, j); k < columns; k++) sum += inverse[i * columns + k]! * inverse[j * columns + k]!;
      row[j] = sum / (scale[i]! * scale[j]!);
    }
    gram.push(row);
  }
  return gram;
}
