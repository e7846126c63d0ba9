/** Gradient by central differences of a smooth function of the constants: for numbers whose derivatives are not written out. */
export function differences(of: (p: readonly number[]) => number | null, p: readonly number[]): number[] {
  return p.map((x, k) => {
    const step = 1e-5 * Math.max(1, Math.abs(x));
    const at = (shift: number) => of(p.map((y, j) => (j === k ? y + shift : y)));
    const [high, low] = [at(step), at(-step)];
    return high === null || low === null ? 0 : (high - low) / (2 * step);
  });
}
