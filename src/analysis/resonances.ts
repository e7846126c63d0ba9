import type { Well } from "../models/index.ts";
import type { Resonance, Resonances } from "./mixed-result.ts";
import type { Mode } from "./options.ts";
import type { Solution } from "./solution.ts";
import { standsOut } from "./stands-out.ts";
import { turningPoint } from "./turning-point.ts";

/** Stretch quanta that may be traded at once. */
const TRADED = [1, 2];
/** Quanta of other modes in one combination. */
const MOST_QUANTA = 6;
/** Each order beyond the third weakens a coupling by about this factor (common practice), so closeness is weighed by it. */
const PER_ORDER = 5;
/** Candidates shown. */
const SHOWN = 12;
/** Overtones beyond the last band that are looked at. */
const BEYOND = 1;

/**
 * Combinations that lie near an overtone v-0 and could perturb it: v less one or two stretch quanta, and quanta of the other modes in their place, as harmonic
 * sums, anharmonicity between modes left out. Ranked by |gap|·5^(order-3); order counts the stretch quanta traded and those gained. A dark level above an overtone pushes it
 * down: a candidate is matched to the band that stands out when that is the sign of its residual.
 */
export function findResonances(solution: Solution, well: Well, modes: readonly Mode[], window: number): Resonances {
  const { used, model, fit } = solution;
  const top = Math.max(...used.map(({ label }) => model.levels(label).upper));
  const limit = turningPoint(well, 0);
  const last = limit === null ? top + BEYOND : Math.min(top + BEYOND, Math.ceil(limit) - 1);
  const energy = (v: number) => well.term(v) - well.term(0);
  const outlier = standsOut(solution)?.label ?? null;
  const found: Resonance[] = [];
  for (let v = 1; v <= last; v++)
    for (const traded of TRADED) {
      if (traded > v) continue;
      const room = energy(v) - energy(v - traded);
      for (const quanta of combinations(modes, room, window)) {
        const gained = quanta.reduce((sum, n) => sum + n, 0);
        if (gained === 0) continue;
        const position = energy(v - traded) + quanta.reduce((sum, n, k) => sum + n * modes[k]!.wavenumber, 0);
        const gap = position - energy(v);
        if (Math.abs(gap) > window) continue;
        const label = `${v}-0`;
        const at = used.findIndex((band) => band.label === label);
        const residual = at < 0 ? null : fit.residuals[at]!;
        const known = quanta.every((n, k) => n === 0 || modes[k]!.sigma !== null);
        found.push({
          band: label,
          state: stateText(v - traded, quanta, modes),
          stretch: v - traded,
          modes: Object.fromEntries(modes.flatMap(({ name }, k) => (quanta[k]! > 0 ? [[name, quanta[k]!]] : []))),
          position,
          gap,
          gapUncertainty: known ? Math.hypot(...quanta.map((n, k) => n * (modes[k]!.sigma ?? 0))) : null,
          order: traded + gained,
          residual,
          matched: label === outlier && residual !== null && Math.sign(residual) === -Math.sign(gap),
        });
      }
    }
  const weight = ({ gap, order }: Resonance) => Math.abs(gap) * PER_ORDER ** (order - 3);
  const candidates = found
    .sort((a, b) => Number(b.matched) - Number(a.matched) || weight(a) - weight(b))
    .slice(0, SHOWN);
  return { window, standsOut: outlier, candidates, test: testOf(candidates[0] ?? null, energy, modes, last) };
}

/** Quanta of the modes whose sum lies within the window of an energy. */
function combinations(modes: readonly Mode[], energy: number, window: number): number[][] {
  const all: number[][] = [];
  const fill = (k: number, rest: number, left: number, head: readonly number[]): void => {
    if (rest < -window) return;
    if (k === modes.length) {
      if (Math.abs(rest) <= window) all.push([...head]);
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

/** The band that would test a candidate: the overtone where the same trade comes closest, or the dark level itself beside its band. */
function testOf(
  best: Resonance | null,
  energy: (v: number) => number,
  modes: readonly Mode[],
  last: number,
): Resonances["test"] {
  if (best === null) return null;
  const v = Number.parseInt(best.band, 10);
  const traded = v - best.stretch;
  const gained = modes.reduce((sum, { name, wavenumber }) => sum + (best.modes[name] ?? 0) * wavenumber, 0);
  const gap = (w: number) => energy(w - traded) + gained - energy(w);
  const others = Array.from({ length: last }, (_, i) => i + 1).filter((w) => w >= traded && w !== v);
  const [closer] = others.sort((a, b) => Math.abs(gap(a)) - Math.abs(gap(b)));
  if (closer !== undefined && Math.abs(gap(closer)) < Math.abs(best.gap))
    return { label: `${closer}-0`, position: energy(closer), gap: gap(closer), kind: "overtone" };
  return { label: best.band, position: best.position, gap: best.gap, kind: "companion" };
}
