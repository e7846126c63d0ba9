/** ω̃ and ω̃x of ν = v·ω̃ - v(v+1)·ω̃x by unweighted least squares through levels (v, cm-1); null for fewer than two. */
export function fitLocalMode(
  points: readonly (readonly [number, number])[],
): { readonly w: number; readonly wx: number } | null {
  if (points.length < 2) return null;
  let [a, b, c, s, t] = [0, 0, 0, 0, 0];
  for (const [v, energy] of points) {
    const y = -v * (v + 1);
    a += v * v;
    b += v * y;
    c += y * y;
    s += v * energy;
    t += y * energy;
  }
  const determinant = a * c - b * b;
  return { w: (c * s - b * t) / determinant, wx: (a * t - b * s) / determinant };
}
