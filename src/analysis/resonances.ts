import type { Warning } from "../messages/index.ts";
import type { Resonance, Resonances } from "./mixed-result.ts";
import type { Mode } from "./options.ts";
import { type Solution, trySolve } from "./solution.ts";
import { turningPoint } from "./turning-point.ts";

/** Stretch quanta that may be traded at once. */
const TRADED = [1, 2];
/** Quanta of other modes in one combination. */
const MOST_QUANTA = 6;
/** In the ranking a combination of the next order must lie this many times closer: couplings weaken with order (a rule of thumb, ours). */
const PER_ORDER = 5;
/** Harmonic sums are off by some tens of wavenumbers, so gaps below this one are all alike in the ranking; cm-1. */
const BLUR = 10;
/** Candidates shown. */
const SHOWN = 12;
/** Overtones beyond the last band that are looked at. */
const BEYOND = 1;

/** Term values above v = 0 in cm-1, and the band they were found without. */
interface Overtones {
  readonly energy: (v: number) => number;
  readonly last: number;
  readonly without: string | null;
}

/**
 * Combinations that lie near an overtone v-0 and could perturb it: v less one or two stretch quanta, and quanta of the other modes in their place, as harmonic
 * sums, anharmonicity between modes and symmetry left out. Ranked by √(gap² + 10²)·5^(order-3), then by |gap|; order counts the stretch quanta traded and those
 * gained. Where a band stands out, the overtones are those of the fit without it, and its residual is what a perturbation would have to explain: a dark level above
 * pushes down, with |s| = (Δ-δ)/2 of two levels, so W = √(|s|(|gap| + |s|)).
 */
export function findResonances(
  solution: Solution,
  standsOut: string | null,
  modes: readonly Mode[],
  window: number,
): Resonances {
  const { used, model } = solution;
  const overtones = overtonesOf(solution, standsOut);
  const { energy, last, without } = overtones;
  const perturbed = standsOut === null ? null : model.levels(standsOut).upper;
  const found: Resonance[] = [];
  for (let v = 1; v <= last; v++) {
    const label = v === perturbed ? standsOut! : `${v}-0`;
    const band = used.find((one) => one.label === label);
    const { lower } = model.levels(label);
    const pair = band?.twoLevels ?? null;
    const residual = band === undefined ? null : band.position - (energy(v) - energy(lower));
    for (const traded of TRADED) {
      if (traded > v) continue;
      for (const quanta of combinations(modes, energy(v) - energy(v - traded), window)) {
        const gained = quanta.reduce((sum, n) => sum + n, 0);
        const position = energy(v - traded) + quanta.reduce((sum, n, k) => sum + n * modes[k]!.wavenumber, 0);
        const gap = position - energy(v);
        const known = quanta.every((n, k) => n === 0 || modes[k]!.sigma !== null);
        const matched = v === perturbed && residual !== null && Math.sign(residual) === -Math.sign(gap);
        found.push({
          band: `${v}-0`,
          state: stateText(v - traded, quanta, modes),
          stretch: v - traded,
          modes: Object.fromEntries(modes.flatMap(({ name }, k) => (quanta[k]! > 0 ? [[name, quanta[k]!]] : []))),
          position,
          gap,
          gapUncertainty: known ? Math.hypot(...quanta.map((n, k) => n * (modes[k]!.sigma ?? 0))) : null,
          order: traded + gained,
          residual,
          matched,
          // The dark level by itself lies as far from its companion as the band from its own position.
          companionGap: pair === null ? null : pair.companion - pair.shift - position,
          coupling: matched ? Math.sqrt(Math.abs(residual) * (Math.abs(gap) + Math.abs(residual))) : null,
        });
      }
    }
  }
  const weight = ({ gap, order }: Resonance) => Math.hypot(gap, BLUR) * PER_ORDER ** (order - 3);
  const candidates = found
    .sort((a, b) => Number(b.matched) - Number(a.matched) || weight(a) - weight(b) || Math.abs(a.gap) - Math.abs(b.gap))
    .slice(0, SHOWN);
  const measured = new Set(used.map(({ label }) => label));
  return {
    window,
    standsOut,
    without,
    candidates,
    test: testOf(candidates[0] ?? null, overtones, modes, measured),
  };
}

/** The warning about the band that stands out, with the likeliest combination that would push it that way. */
export function withCandidate(warnings: readonly Warning[], resonances: Resonances | null): Warning[] {
  const [first] = resonances?.candidates ?? [];
  if (first === undefined || !first.matched) return [...warnings];
  const { state, gap, coupling } = first;
  const hint = `; of the modes given, ${state}, ${Math.abs(gap).toFixed(1)} cm-1 ${gap > 0 ? "above" : "below"} it as a harmonic sum, would push it that way with a coupling of ${coupling!.toFixed(1)} cm-1`;
  return warnings.map((one) => (one.code === "band-stands-out" ? { ...one, message: `${one.message}${hint}` } : one));
}

/** From the fit without the band that stands out, which would bend the curve its own way; from all bands where that cannot be. */
function overtonesOf(solution: Solution, standsOut: string | null): Overtones {
  const { series, model, options, used } = solution;
  const bands = series.bands.map((band) => (band.label === standsOut ? { ...band, use: false } : band));
  const clear = standsOut === null ? null : trySolve({ ...series, bands }, model, options);
  const well = model.well!((clear ?? solution).fit.values);
  const top = Math.max(...used.map(({ label }) => model.levels(label).upper));
  const limit = turningPoint(well, 0);
  return {
    energy: (v) => well.term(v) - well.term(0),
    last: limit === null ? top + BEYOND : Math.min(top + BEYOND, Math.ceil(limit) - 1),
    without: clear === null ? null : standsOut,
  };
}

/** Quanta of the modes whose sum lies within the window of an energy. */
function combinations(modes: readonly Mode[], energy: number, window: number): number[][] {
  const all: number[][] = [];
  const fill = (k: number, rest: number, left: number, head: readonly number[]): void => {
    if (rest < -window) return;
    if (k === modes.length) {
      if (Math.abs(rest) <= window && left < MOST_QUANTA) all.push([...head]);
      return;
    }
    for (let n = 0; n <= left; n++) fill(k + 1, rest - n * modes[k]!.wavenumber, left - n, [...head, n]);
  };
  fill(0, energy, MOST_QUANTA, []);
  return all;
}

function stateText(stretch: number, quanta: readonly number[], modes: readonly Mode[]): string {
  const parts = quanta.flatMap((n, k) => (n === 0 ? [] : [n === 1 ? modes[k]!.name : `${n} ${modes[k]!.name}`]));
  return [...(stretch === 0 ? [] : [`${stretch} stretch`]), ...parts].join(" + ");
}

/**
 * The band that would test a candidate: an overtone not measured yet where the same trade comes closer, or the dark level itself beside its band. Beside a band that
 * stands out it is pushed away as far as the band is, and two levels share their intensity as (|gap| + |s|)/|s|. None where that companion was given already.
 */
function testOf(
  best: Resonance | null,
  { energy, last }: Overtones,
  modes: readonly Mode[],
  measured: ReadonlySet<string>,
): Resonances["test"] {
  if (best === null || best.companionGap !== null) return null;
  const v = Number.parseInt(best.band, 10);
  const traded = v - best.stretch;
  const gained = modes.reduce((sum, { name, wavenumber }) => sum + (best.modes[name] ?? 0) * wavenumber, 0);
  const gap = (w: number) => energy(w - traded) + gained - energy(w);
  const others = Array.from({ length: last }, (_, i) => i + 1).filter((w) => w >= traded && !measured.has(`${w}-0`));
  const [closer] = others.sort((a, b) => Math.abs(gap(a)) - Math.abs(gap(b)));
  if (closer !== undefined && closer !== v && Math.abs(gap(closer)) < Math.abs(best.gap))
    return { label: `${closer}-0`, position: energy(closer), gap: gap(closer), ratio: null, kind: "overtone" };
  const shift = best.matched ? best.residual! : 0;
  return {
    label: best.band,
    position: best.position - shift,
    gap: best.gap,
    ratio: best.matched ? (Math.abs(best.gap) + Math.abs(shift)) / Math.abs(shift) : null,
    kind: "companion",
  };
}
