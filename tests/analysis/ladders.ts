/** Seeded synthetic ladders of peaks: noise and strangers included. `v` is the true level, 0 for a stranger; `ladder` which one. */
export interface Made {
  readonly v: number;
  readonly ladder: number;
  readonly position: number;
}

/** Uniform and normal deviates from a seed (a small counter-based generator; only the seed makes it random). */
export function generator(seed: number) {
  let state = seed;
  const uniform = () => {
    state = (state + 0x6d2b79f5) | 0;
    let t = Math.imul(state ^ (state >>> 15), 1 | state);
    t = (t + Math.imul(t ^ (t >>> 7), 61 | t)) ^ t;
    return ((t ^ (t >>> 14)) >>> 0) / 4294967296;
  };
  const normal = () => Math.sqrt(-2 * Math.log(1 - uniform())) * Math.cos(2 * Math.PI * uniform());
  return { uniform, normal };
}

function shuffled<T>(items: readonly T[], uniform: () => number): T[] {
  const list = [...items];
  for (let i = list.length - 1; i > 0; i--) {
    const j = Math.floor(uniform() * (i + 1));
    [list[i], list[j]] = [list[j]!, list[i]!];
  }
  return list;
}

function members(omega: number, ratio: number, levels: readonly number[], which: number, normal: () => number): Made[] {
  return levels.map((v) => ({ v, ladder: which, position: v * omega - v * (v + 1) * omega * ratio + normal() }));
}

/** Five of v = 1 to 7 with three strangers, 1 cm-1 noise, ω 1000 to 4000, ωx/ω 0.005 to 0.03. */
export function oneLadder(seed: number): Made[] {
  const { uniform, normal } = generator(seed);
  const levels = shuffled([1, 2, 3, 4, 5, 6, 7], uniform).slice(0, 5);
  const own = members(1000 + 3000 * uniform(), 0.005 + 0.025 * uniform(), levels, 1, normal);
  const at = own.map(({ position }) => position);
  const [low, high] = [Math.min(...at), Math.max(...at)];
  const strangers = [1, 2, 3].map(() => ({ v: 0, ladder: 0, position: low + (high - low) * uniform() }));
  return shuffled([...own, ...strangers], uniform);
}

/** Two bonds, four of v = 1 to 5 each, ω 2500 to 4000 and at least 30 apart, 1 cm-1 noise. */
export function twoLadders(seed: number): Made[] {
  const { uniform, normal } = generator(seed + 100_000);
  const first = 2500 + 1500 * uniform();
  let second = first;
  while (Math.abs(second - first) < 30) second = 2500 + 1500 * uniform();
  return shuffled(
    [first, second].flatMap((omega, k) =>
      members(omega, 0.012 + 0.014 * uniform(), shuffled([1, 2, 3, 4, 5], uniform).slice(0, 4), k + 1, normal),
    ),
    uniform,
  );
}
