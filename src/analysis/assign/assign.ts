import { type Ladder, predictLevel } from "./ladder.ts";
import { type Candidate, type Peak, type SearchOptions, searchLadders } from "./search.ts";

/** One way to label the peaks. */
export interface Hypothesis {
  readonly rank: number;
  /** ln of the evidence over that of strangers only */
  readonly score: number;
  /** among all hypotheses found, strangers only among them */
  readonly probability: number;
  /** of the first ladder, cm-1: ν(v) = v·we - v(v+1)·wexe + [(v+½)³ - ⅛]·weye */
  readonly constants: LadderConstants;
  readonly ladders: readonly {
    readonly constants: LadderConstants;
    readonly explained: number;
    readonly rms: number;
  }[];
  /** root mean square misfit of the labelled peaks, cm-1 */
  readonly rms: number;
  /** labelled peaks */
  readonly explained: number;
  /** one entry a peak, in the order given; `ladder` counts from 1 */
  readonly labels: readonly {
    readonly position: number;
    readonly label: string | null;
    readonly ladder: number | null;
  }[];
}

export interface LadderConstants {
  readonly we: number;
  readonly wexe: number;
  readonly weye: number;
}

/** A band that would tell the two best hypotheses apart. */
export interface Decider {
  readonly label: string;
  /** where each hypothesis puts it, cm-1, and the standard uncertainty of that */
  readonly positions: readonly [number, number];
  readonly standardUncertainties: readonly [number, number];
}

export interface Assignment {
  readonly hypotheses: readonly Hypothesis[];
  /** probability that the peaks hold no ladder at all */
  readonly strangersOnly: number;
  /** the best one does not stand out */
  readonly ambiguous: boolean;
  /** with `ambiguous`: the band to look for; null where none tells them apart */
  readonly decider: Decider | null;
}

/** The best hypothesis must have at least this probability to stand alone. */
const CERTAIN = 0.95;
/** Hypotheses shown. */
const SHOWN = 5;
/** A band decides when the two positions differ by this many of their joint deviations. */
const APART = 4;

/** Label peaks: ranked hypotheses with their probabilities. Empty `hypotheses` when nothing fits the limits. */
export function assignPeaks(peaks: readonly Peak[], options: SearchOptions & { readonly ladders: 1 | 2 }): Assignment {
  const single = searchLadders(peaks, options);
  const sets = options.ladders === 1 ? single.map((one) => [one]) : pairs(single);
  const scores = sets.map((set) => set.reduce((sum, { score }) => sum + score, 0));
  const highest = Math.max(0, ...scores);
  const total = Math.exp(-highest) + scores.reduce((sum, score) => sum + Math.exp(score - highest), 0);
  const probability = (score: number) => Math.exp(score - highest) / total;
  const hypotheses = sets
    .slice(0, SHOWN)
    .map((set, i) => hypothesis(peaks, set, i + 1, scores[i]!, probability(scores[i]!)));
  const ambiguous = hypotheses.length > 0 && hypotheses[0]!.probability < CERTAIN;
  return {
    hypotheses,
    strangersOnly: probability(0),
    ambiguous,
    decider: ambiguous && sets.length > 1 ? deciderOf(sets[0]!, sets[1]!, options.highest) : null,
  };
}

/** Two ladders that share no peak, best first. */
function pairs(single: readonly Candidate[]): Candidate[][] {
  const all: Candidate[][] = [];
  for (let i = 0; i < single.length; i++)
    for (let j = i + 1; j < single.length; j++) {
      const [a, b] = [single[i]!, single[j]!];
      if (a.levels.every((v, k) => v === 0 || b.levels[k] === 0)) all.push([a, b]);
    }
  return all
    .sort((a, b) => b[0]!.score + b[1]!.score - a[0]!.score - a[1]!.score)
    .slice(0, 1000)
    .map(([a, b]) => (a!.ladder.omega >= b!.ladder.omega ? [a!, b!] : [b!, a!]));
}

function hypothesis(
  peaks: readonly Peak[],
  set: readonly Candidate[],
  rank: number,
  score: number,
  probability: number,
): Hypothesis {
  const squares = set.map(({ levels, ladder }) =>
    levels.flatMap((v, i) => (v > 0 ? [(peaks[i]!.position - predictLevel(ladder, v).position) ** 2] : [])),
  );
  const rms = (values: readonly number[]) => Math.sqrt(values.reduce((sum, x) => sum + x, 0) / values.length);
  return {
    rank,
    score,
    probability,
    constants: constantsOf(set[0]!.ladder),
    ladders: set.map(({ ladder }, k) => ({
      constants: constantsOf(ladder),
      explained: squares[k]!.length,
      rms: rms(squares[k]!),
    })),
    rms: rms(squares.flat()),
    explained: squares.flat().length,
    labels: peaks.map(({ position }, i) => {
      const at = set.findIndex(({ levels }) => levels[i]! > 0);
      return { position, label: at < 0 ? null : `${set[at]!.levels[i]}-0`, ladder: at < 0 ? null : at + 1 };
    }),
  };
}

const constantsOf = ({ omega, omegaX, omegaY }: Ladder): LadderConstants => ({ we: omega, wexe: omegaX, weye: omegaY });

/** The lowest band that the two put apart, otherwise the one they put furthest apart. */
function deciderOf(first: readonly Candidate[], second: readonly Candidate[], highest: number): Decider | null {
  const at = first.findIndex((one, k) => one !== second[k]);
  const [a, b] = [first[Math.max(0, at)]!.ladder, second[Math.max(0, at)]!.ladder];
  const bands = Array.from({ length: highest }, (_, v) => {
    const [x, y] = [predictLevel(a, v + 1), predictLevel(b, v + 1)];
    return {
      apart: Math.abs(x.position - y.position) / Math.sqrt(x.variance + y.variance),
      decider: {
        label: `${v + 1}-0`,
        positions: [x.position, y.position] as const,
        standardUncertainties: [Math.sqrt(x.variance), Math.sqrt(y.variance)] as const,
      },
    };
  }).filter(({ decider }) => decider.positions.every((position) => position > 0));
  const clear = bands.find(({ apart }) => apart >= APART);
  if (clear !== undefined) return clear.decider;
  const [widest] = [...bands].sort((x, y) => y.apart - x.apart);
  return widest !== undefined && widest.apart >= 1 ? widest.decider : null;
}
