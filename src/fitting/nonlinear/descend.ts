import { dampedStep } from "./damped-step.ts";
import { columnNorms, type Objective, type Whitened } from "./objective.ts";
import { type Offset, relativeOffset } from "./relative-offset.ts";

/** How an attempt starts: damping relative to the curvature, and whether the scales of the constants only grow. */
export interface Strategy {
  readonly damping: number;
  readonly growingScales: boolean;
}

/** Where an attempt ended. `offset` is null where the derivatives are not finite. */
export interface Descent {
  readonly point: Whitened;
  readonly offset: Offset | null;
  readonly iterations: number;
}

const MOST_ITERATIONS = 2000;
/** Below this relative offset the point is within 1e-5 standard deviations of the minimum, and undamped steps finish the work. */
const NEAR = 1e-5;
/** Damping beyond which a step is lost in rounding. */
const MOST_DAMPING = 1e16;
/** Roundings of the data by which χ² may seem to rise while the offset falls. */
const ROUNDINGS = 64;

/** Go downhill from a point. Damping follows the gain ratio (Nielsen 1999); worse points are never kept. */
export function descend(objective: Objective, start: Whitened, { damping, growingScales }: Strategy): Descent {
  let here = start;
  let offset = offsetAt(here, objective);
  let norms = offset === null ? [] : columnNorms(here.jacobian(), objective.data, objective.constants);
  let [mu, growth] = [damping, 2];
  let iterations = 0;
  while (offset !== null && iterations < MOST_ITERATIONS && mu < MOST_DAMPING) {
    if (offset.value < NEAR && offset.triangle.dependent < 0) break;
    if (here.sumOfSquares === 0) break;
    iterations++;
    const step = curvedStep(objective, here, norms, mu);
    const there = step === null ? null : objective.at(here.p.map((x, k) => x + step[k]!));
    const gain = step === null || there === null ? -1 : gainRatio(here, there, step, norms, mu, objective.data);
    const next = gain > 0 ? offsetAt(there!, objective) : null;
    if (next === null) {
      mu *= growth;
      growth *= 2;
      continue;
    }
    mu = Math.max(1e-14, mu * Math.max(1 / 3, 1 - (2 * gain - 1) ** 3));
    growth = 2;
    here = there!;
    offset = next;
    const fresh = columnNorms(here.jacobian(), objective.data, objective.constants);
    norms = fresh.map((norm, k) => (growingScales ? Math.max(norm, norms[k]!) : norm));
  }
  return polish(objective, { point: here, offset, iterations });
}

/** Step along which the model is probed for its curvature, as a share of the step itself. */
const PROBE = 0.1;
/** Second-order part over first-order part up to which the expansion is trusted (Transtrum & Sethna 2012). */
const TRUSTED = 0.75;

/**
 * A damped step with geodesic acceleration (Transtrum & Sethna 2012): half the second-order correction along the step is added,
 * which follows curved valleys that straight steps creep along. null when the model is not finite or curves too much.
 */
function curvedStep(objective: Objective, here: Whitened, norms: readonly number[], damping: number): number[] | null {
  const step = dampedStep(here, here.residuals, norms, damping);
  if (step === null) return null;
  const probe = objective.at(here.p.map((x, k) => x + PROBE * step[k]!));
  if (probe === null) return null;
  const jacobian = here.jacobian();
  const constants = step.length;
  const bend = here.residuals.map((r, i) => {
    let along = 0;
    for (let k = 0; k < constants; k++) along += jacobian[i * constants + k]! * step[k]!;
    return (2 / PROBE) * ((probe.residuals[i]! - r) / PROBE + along);
  });
  const correction = dampedStep(here, bend, norms, damping);
  if (correction === null) return step;
  const length = (d: readonly number[]) => Math.hypot(...d.map((x, k) => x * norms[k]!));
  if (2 * length(correction) > TRUSTED * length(step)) return null;
  return step.map((x, k) => x + correction[k]! / 2);
}

/** Actual over predicted reduction of χ². */
function gainRatio(
  here: Whitened,
  there: Whitened,
  step: readonly number[],
  norms: readonly number[],
  damping: number,
  data: number,
): number {
  const jacobian = here.jacobian();
  const constants = step.length;
  let predicted = 0;
  for (let i = 0; i < data; i++) {
    let along = 0;
    for (let k = 0; k < constants; k++) along += jacobian[i * constants + k]! * step[k]!;
    predicted += along * here.residuals[i]!;
  }
  for (let k = 0; k < constants; k++) predicted += damping * (norms[k]! * step[k]!) ** 2;
  const actual = here.sumOfSquares - there.sumOfSquares;
  return predicted > 0 ? actual / predicted : -1;
}

function offsetAt(point: Whitened, { data }: Objective): Offset | null {
  return point.jacobian().every(Number.isFinite) ? relativeOffset(point, data) : null;
}

/** Undamped steps, judged by the offset where χ² no longer tells points apart; ends when they stop helping. */
function polish(objective: Objective, from: Descent): Descent {
  let best = from;
  for (let idle = 0; idle < 4 && best.offset !== null && best.offset.triangle.dependent < 0; ) {
    const { point, offset } = best;
    const ceiling = point.sumOfSquares + ROUNDINGS * Number.EPSILON * objective.scale * Math.sqrt(point.sumOfSquares);
    let factor = 1;
    let better: Descent | null = null;
    for (let halving = 0; halving < 8 && better === null; halving++, factor /= 2) {
      const there = objective.at(point.p.map((x, k) => x + factor * offset!.step[k]!));
      if (there === null || there.sumOfSquares > ceiling) continue;
      const next = offsetAt(there, objective);
      if (next !== null && next.value < offset!.value)
        better = { point: there, offset: next, iterations: best.iterations + 1 };
    }
    if (better === null) break;
    idle = better.offset!.value > 0.9 * best.offset.value ? idle + 1 : 0;
    best = better;
    if (best.iterations > MOST_ITERATIONS) break;
  }
  return best;
}
