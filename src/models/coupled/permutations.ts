/** Species of the permutations of N equivalent bonds: C2v (two), C3v (three), Td (four); A1, F2 … as spectroscopists call them. */
export interface Species {
  readonly name: string;
  readonly degeneracy: number;
  /** a diagonal element D(g)₁₁ of the real orthogonal representation, for each permutation of `permutations(n)` */
  readonly element: readonly number[];
}

/** All permutations of n things; `p[i]` is where i goes. */
export function permutations(n: number): readonly (readonly number[])[] {
  if (n === 0) return [[]];
  return permutations(n - 1).flatMap((rest) =>
    Array.from({ length: n }, (_, at) => [...rest.slice(0, at), n - 1, ...rest.slice(at)]),
  );
}

/** The representations of the permutations of 2, 3 or 4 bonds. Two bonds: A1 and B2, the sum and the difference. */
export function speciesOf(bonds: number): readonly Species[] {
  const all = permutations(bonds);
  const even = all.map(parity);
  const trivial = { name: "A1", degeneracy: 1, element: all.map(() => 1) };
  if (bonds === 2) return [trivial, { name: "B2", degeneracy: 1, element: even }];
  const standard = all.map((g) => standardElement(g));
  if (bonds === 3)
    return [trivial, { name: "A2", degeneracy: 1, element: even }, { name: "E", degeneracy: 2, element: standard }];
  return [
    trivial,
    { name: "A2", degeneracy: 1, element: even },
    { name: "E", degeneracy: 2, element: all.map((g) => standardElement(onPairings(g))) },
    { name: "F1", degeneracy: 3, element: standard.map((x, i) => x * even[i]!) },
    { name: "F2", degeneracy: 3, element: standard },
  ];
}

function parity(g: readonly number[]): number {
  let sign = 1;
  for (let i = 0; i < g.length; i++) for (let j = i + 1; j < g.length; j++) if (g[i]! > g[j]!) sign = -sign;
  return sign;
}

/** Element 11 of the permutation matrices on what is orthogonal to (1, 1, …): with the unit vector along bond 0 less the mean. */
function standardElement(g: readonly number[]): number {
  const n = g.length;
  const norm = (n - 1) / n;
  return ((g[0] === 0 ? 1 : 0) - 1 / n) / norm;
}

/** What a permutation of four bonds does to the three ways of pairing them up: {01|23}, {02|13}, {03|12}. */
function onPairings(g: readonly number[]): number[] {
  const partnerOfZero = [1, 2, 3];
  return partnerOfZero.map((partner) => {
    const [a, b] = [g[0]!, g[partner]!];
    // The image pairs a with b; what is paired with 0 then?
    const other = a === 0 ? b : b === 0 ? a : 6 - a - b;
    return partnerOfZero.indexOf(other);
  });
}
