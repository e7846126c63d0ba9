import { fitLadder, isPlausible, type Ladder, type Plausible, predictLevel } from "./ladder.ts";

/** An unlabelled peak, cm-1. */
export interface Peak {
  readonly position: number;
  readonly sigma: number;
}

/** A level that must lie in a range, cm-1. */
export interface Expectation {
  readonly v: number;
  readonly low: number;
  readonly high: number;
}

/** Peaks with levels: `levels[i]` is v of peak i, or 0 for a stranger. */
export interface Candidate {
  readonly levels: readonly number[];
  readonly ladder: Ladder;
  /** ln of the evidence over that of peaks which are all strangers */
  readonly score: number;
}

export interface SearchOptions extends Plausible {
  readonly expectations: readonly Expectation[];
}

/** Share of the levels inside the spectrum that are seen: strong overtones are, but neither all of them nor surely. */
const SEEN = 0.7;
/** A peak further than this many deviations from a level is not its. */
const WITHIN = 4;
/** Seeds join levels at most this far apart: further ones leave too much room between. */
const REACH = 3;
/** Fewer members than this make no ladder. */
export const LEAST_MEMBERS = 3;
/** Candidates kept. */
const KEPT = 400;

/** Everything about a set of peaks that hypotheses share. */
interface Scene {
  readonly peaks: readonly Peak[];
  readonly low: number;
  readonly high: number;
  readonly options: SearchOptions;
  /** ln of the prior density of (ω, ωx): flat over the limits */
  readonly logPrior: number;
  /** ln of the density of strangers */
  readonly logStranger: number;
}

/**
 * Ladders among peaks, best first. Every pair of peaks with every pair of near labels is a seed; levels join it one by one, the surest first, each time
 * with the constants fitted anew; then single changes (another peak for a level, a level less) are tried. All are scored alike.
 */
export function searchLadders(peaks: readonly Peak[], options: SearchOptions): Candidate[] {
  const positions = peaks.map(({ position }) => position);
  const margin = (Math.max(...positions) - Math.min(...positions)) / (2 * peaks.length) || 1;
  const [low, high] = [Math.max(0, Math.min(...positions) - margin), Math.max(...positions) + margin];
  const [from, to] = options.omega;
  const area = ((to ** 2 - from ** 2) / 2) * (options.ratio[1] - options.ratio[0]);
  const scene: Scene = { peaks, low, high, options, logPrior: -Math.log(area), logStranger: -Math.log(high - low) };
  const order = peaks.map((_, i) => i).sort((i, j) => positions[i]! - positions[j]!);
  const found = new Map<string, Candidate>();
  const add = (candidate: Candidate | null) => {
    if (candidate === null) return;
    const key = candidate.levels.join();
    if (!found.has(key)) found.set(key, candidate);
  };
  for (let m = 0; m < order.length; m++)
    for (let n = m + 1; n < order.length; n++) {
      const [i, j] = [order[m]!, order[n]!];
      for (let a = 1; a < options.highest; a++)
        for (let b = a + 1; b <= Math.min(options.highest, a + REACH); b++) {
          if (!seedIsPlausible(positions[i]!, positions[j]!, a, b, options)) continue;
          add(
            grow(scene, [
              { i, v: a },
              { i: j, v: b },
            ]),
          );
        }
    }
  const best = top(found);
  for (const candidate of best.slice(0, 60)) for (const variant of variants(scene, candidate)) add(variant);
  return top(found);
}

const top = (found: ReadonlyMap<string, Candidate>) =>
  [...found.values()].sort((a, b) => b.score - a.score || sum(a.levels) - sum(b.levels)).slice(0, KEPT);

const sum = (levels: readonly number[]) => levels.reduce((total, v) => total + v, 0);

function seedIsPlausible(x: number, y: number, a: number, b: number, options: SearchOptions): boolean {
  // v·ω - v(v+1)·ωx through both, and some room for a third constant
  const omegaX = (x / a - y / b) / (b - a);
  const omega = x / a + (a + 1) * omegaX;
  const [low, high] = options.ratio;
  const room = 0.3 * (high - low);
  return (
    omega >= options.omega[0] * 0.97 &&
    omega <= options.omega[1] * 1.03 &&
    omegaX >= (low - room) * omega &&
    omegaX <= (high + room) * omega
  );
}

interface Member {
  readonly i: number;
  readonly v: number;
}

const deviation = (scene: Scene, members: readonly Member[]) => {
  const { i, v } = members[0]!;
  return scene.options.cubic * (scene.peaks[i]!.position / v);
};

function fitted(scene: Scene, members: readonly Member[]): Ladder | null {
  return fitLadder(
    members.map(({ i, v }) => ({ v, ...scene.peaks[i]! })),
    deviation(scene, members),
  );
}

/** Let levels join, nearest in certainty first. */
function grow(scene: Scene, seed: readonly Member[]): Candidate | null {
  const { peaks, options } = scene;
  let members = [...seed];
  let ladder = fitted(scene, members);
  if (ladder === null) return null;
  const tried = new Set(members.map(({ v }) => v));
  while (tried.size < options.highest) {
    let next: { v: number; position: number; variance: number } | null = null;
    for (let v = 1; v <= options.highest; v++) {
      if (tried.has(v)) continue;
      const level = predictLevel(ladder, v);
      if (next === null || level.variance < next.variance) next = { v, ...level };
    }
    if (next === null) break;
    tried.add(next.v);
    const { v, position, variance } = next;
    // Past the turning point a ladder has no levels.
    if (!(position > 0) || position < scene.low || position > scene.high) continue;
    const at = nearestFree(peaks, members, position);
    if (at < 0) continue;
    const { position: x, sigma } = peaks[at]!;
    if ((x - position) ** 2 > WITHIN ** 2 * (variance + sigma ** 2)) continue;
    const joined = [...members, { i: at, v }];
    if (!rises(scene, joined)) continue;
    const refitted = fitted(scene, joined);
    if (refitted === null) continue;
    members = joined;
    ladder = refitted;
  }
  return scored(scene, members, ladder);
}

function nearestFree(peaks: readonly Peak[], members: readonly Member[], position: number): number {
  let best = -1;
  for (let i = 0; i < peaks.length; i++) {
    if (members.some((member) => member.i === i)) continue;
    if (best < 0 || Math.abs(peaks[i]!.position - position) < Math.abs(peaks[best]!.position - position)) best = i;
  }
  return best;
}

/** Higher levels at higher positions. */
function rises({ peaks }: Scene, members: readonly Member[]): boolean {
  const sorted = [...members].sort((a, b) => a.v - b.v);
  return sorted.every(({ i }, k) => k === 0 || peaks[i]!.position > peaks[sorted[k - 1]!.i]!.position);
}

/**
 * The evidence of these labels over that of strangers only: ln of 1/(number of ways to give so many levels to the peaks)·∫ prior(ω, ωx)·prior(ωy)·Π N(peak; level, σ) over the constants, for each member the
 * density of a stranger taken back, and for each level inside the spectrum the chance that it is seen or is not. null where it breaks a limit.
 */
function scored(scene: Scene, members: readonly Member[], ladder: Ladder): Candidate | null {
  const { options, peaks } = scene;
  if (members.length < LEAST_MEMBERS || !isPlausible(ladder, options)) return null;
  for (const { v, low, high } of options.expectations) {
    const { position } = predictLevel(ladder, v);
    if (position < low || position > high) return null;
  }
  let missing = 0;
  let before = 0;
  for (let v = 1; v <= options.highest; v++) {
    const { position } = predictLevel(ladder, v);
    if (position <= before) break;
    before = position;
    if (position > scene.high) break;
    if (position >= scene.low && !members.some((member) => member.v === v)) missing++;
  }
  const levels = new Array<number>(peaks.length).fill(0);
  for (const { i, v } of members) levels[i] = v;
  const score =
    -logChoices(peaks.length, members.length) +
    scene.logPrior +
    ladder.logIntegral -
    members.length * scene.logStranger +
    members.length * Math.log(SEEN) +
    missing * Math.log(1 - SEEN);
  return { levels, ladder, score };
}

/** ln of the number of ways to give m levels to n peaks: among many strangers some fall into step by chance. */
function logChoices(n: number, m: number): number {
  let sum = 0;
  for (let i = 0; i < m; i++) sum += Math.log(n - i);
  return sum;
}

/** Single changes: another free peak near a level, or one member less. */
function variants(scene: Scene, { levels, ladder }: Candidate): (Candidate | null)[] {
  const members = levels.flatMap((v, i) => (v > 0 ? [{ i, v }] : []));
  const made: (Candidate | null)[] = [];
  const make = (changed: readonly Member[]) => {
    if (changed.length < LEAST_MEMBERS || !rises(scene, changed)) return;
    const other = fitted(scene, changed);
    if (other !== null) made.push(scored(scene, changed, other));
  };
  for (const member of members) {
    const rest = members.filter((other) => other !== member);
    make(rest);
    const { position, variance } = predictLevel(ladder, member.v);
    scene.peaks.forEach((peak, i) => {
      if (levels[i]! > 0) return;
      const near = (WITHIN * 1.5) ** 2 * (variance + peak.sigma ** 2 + scene.peaks[member.i]!.sigma ** 2);
      if ((peak.position - position) ** 2 <= near) make([...rest, { i, v: member.v }]);
    });
  }
  return made;
}
