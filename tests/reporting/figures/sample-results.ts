import type { BandResult, DissociationRow, SeriesResult } from "../../../src/analysis/index.ts";
import type { Quantity } from "../../../src/quantity/index.ts";

/** What a sample is made from; invented numbers. */
export interface Sample {
  readonly name?: string;
  readonly we?: number;
  readonly wexe?: number;
  readonly weye?: number;
  readonly terms?: number;
  /** labels such as `1-0`; default 1-0 to 6-0 */
  readonly labels?: readonly string[];
  /** standard uncertainty of a band by its upper level, cm-1; null: none stated */
  readonly sigma?: (upper: number) => number | null;
  /** what is added to the true position, in units of its sigma (of 1 cm-1 without one) */
  readonly deviation?: (upper: number, at: number) => number;
  readonly unused?: readonly string[];
  /** studentized residuals to report, by label */
  readonly flagged?: readonly string[];
  readonly reducedMass?: number | null;
  readonly upTo?: number;
}

const KEYS = ["we", "wexe", "weye"] as const;
/** h/(8π²c u) in u Å² cm-1, CODATA 2022. */
const KAPPA = 16.85762916809;

/** Overtones 1-0 to `count`-0. */
export const overtones = (count: number) => Array.from({ length: count }, (_, i) => `${i + 1}-0`);

/** A result as an analysis would give it: positions of G(v) = Σ ±Y·(v+½)^k, fitted by weighted least squares. */
export function sampleResult(sample: Sample = {}): SeriesResult {
  const { name = "X–H", we = 2990, wexe = 52.8, weye = 0, labels = overtones(6), reducedMass = 0.98 } = sample;
  const { sigma = () => 0.05, deviation = (_, at) => [0.6, -0.8, 0.3, 0.9, -0.4, 0.1][at % 6]!, unused = [] } = sample;
  const terms = sample.terms ?? (weye === 0 ? 2 : 3);
  const keys = KEYS.slice(0, terms);
  const row = (v: number) => keys.map((_, k) => (k === 1 ? -1 : 1) * (v + 0.5) ** (k + 1));
  const between = (label: string) => {
    const [upper, lower] = label.split("-").map(Number) as [number, number];
    const low = row(lower);
    return { upper, lower, gradient: row(upper).map((x, k) => x - low[k]!) };
  };
  const truth = [we, wexe, weye];
  const exact = (v: number) => truth.reduce((sum, y, k) => sum + (k === 1 ? -1 : 1) * y * (v + 0.5) ** (k + 1), 0);
  const data = labels.map((label, at) => {
    const { upper, lower, gradient } = between(label);
    const u = sigma(upper);
    const observed = exact(upper) - exact(lower) + deviation(upper, at) * (u ?? 1);
    return { label, upper, gradient, u, observed, used: !unused.includes(label) };
  });
  const used = data.filter((one) => one.used);
  const weight = (u: number | null) => 1 / (u ?? 1) ** 2;
  const normal = keys.map((_, i) =>
    keys.map((__, j) => used.reduce((sum, d) => sum + weight(d.u) * d.gradient[i]! * d.gradient[j]!, 0)),
  );
  const right = keys.map((_, i) => used.reduce((sum, d) => sum + weight(d.u) * d.gradient[i]! * d.observed, 0));
  const inverse = invert(normal);
  const p = inverse.map((line) => dot(line, right));
  const freedom = used.length - terms;
  const square = used.reduce((sum, d) => sum + weight(d.u) * (d.observed - dot(d.gradient, p)) ** 2, 0);
  const known = used.every(({ u }) => u !== null);
  const factor = known ? 1 : freedom > 0 ? square / freedom : 1;
  const covariance = inverse.map((line) => line.map((c) => c * factor));
  const quantity = (value: number, gradient: readonly number[], unit = "cm-1"): Quantity => {
    const u = Math.sqrt(
      dot(
        gradient,
        covariance.map((line) => dot(line, gradient)),
      ),
    );
    return { value, standardUncertainty: u, interval95: [value - 1.96 * u, value + 1.96 * u], unit };
  };
  const unit = (at: number) => keys.map((_, k) => (k === at ? 1 : 0));
  const bare = (value: number, unitName: string): Quantity => ({
    value,
    standardUncertainty: null,
    interval95: null,
    unit: unitName,
  });
  const bands = data.map(
    ({ label, gradient, u, observed, used: isUsed }, i): BandResult => ({
      label,
      observed,
      calculated: dot(gradient, p),
      residual: observed - dot(gradient, p),
      standardUncertainty: u,
      studentizedResidual: sample.flagged?.includes(label) ? 4.2 : 0.5,
      leverage: 0.3,
      leftOutResidual: null,
      weight: null,
      used: isUsed,
      asRead: { text: String(observed), unit: "cm-1", medium: "vacuum", sigmaText: null },
      note: null,
      twoLevels: null,
      phase: null,
      place: { source: "sample.csv", line: i + 2 },
    }),
  );
  const top = Math.max(...used.map(({ upper }) => upper));
  const zero = dot(row(0), p);
  const [w, x] = [p[0]!, p[1]!];
  const de = (w * w) / (4 * x);
  const limit = (method: DissociationRow["method"], value: number): DissociationRow => {
    const u = value * 0.002;
    const of = (v: number): Quantity => ({
      value: v,
      standardUncertainty: u,
      interval95: [v - 1.96 * u, v + 1.96 * u],
      unit: "cm-1",
    });
    return { method, de: of(value), d0: of(value - zero), converted: null, note: null };
  };
  const rows = [limit("morse", de)];
  if (terms > 2) rows.push(limit("morse-refit", de * 1.04), limit("turning-point", de * 0.82));
  rows.push(limit("spacing-sum", de * 0.985));
  return {
    name,
    model: "oscillator",
    terms,
    bond: "1H 35Cl",
    reducedMass,
    constants: Object.fromEntries(keys.map((key, k) => [key, quantity(p[k]!, unit(k))])),
    held: [],
    correlation: { order: keys, matrix: covariance },
    covariance,
    quality: {
      bands: used.length,
      degreesOfFreedom: freedom,
      chiSquare: known ? square : null,
      reducedChiSquare: null,
      probability: null,
      rms: 0.05,
      standardDeviation: 0.05,
      excess: { kind: "none", value: null, applied: false },
      aic: null,
      aicc: null,
      leaveOneOutRms: null,
      intervalDegreesOfFreedom: known ? null : Math.max(1, freedom),
    },
    bands,
    dissociation: rows,
    derived: {
      zeroPointEnergy: bare(zero, "cm-1"),
      forceConstant: null,
      morseA: reducedMass === null || x <= 0 ? null : bare(Math.sqrt((x * reducedMass) / KAPPA), "1/Å"),
      y00: null,
      highestLevel: { value: Math.floor(w / (2 * x) - 0.5), range: null },
      positionPlotIntercept: bare(w - x, "cm-1"),
      positionPlotSlope: bare(-x, "cm-1"),
      spacingPlotIntercept: bare(w - x, "cm-1"),
      spacingPlotSlope: bare(-2 * x, "cm-1"),
    },
    predictions: overtones(sample.upTo ?? top + 3).map((label) => {
      const { gradient, upper } = between(label);
      const position = quantity(dot(gradient, p), gradient);
      return {
        label,
        position,
        lastBandOut: upper > top ? 0.4 * (upper - top) ** 2 : null,
        vacuumWavelength: 1e7 / position.value,
        airWavelength: null,
        observed: used.some((d) => d.label === label),
      };
    }),
    accepted: null,
    comparison: null,
    commonErrors: [],
    resonances: null,
    levels: null,
    consequences: [],
    deperturbation: null,
    thermochemistry: null,
    intervals: null,
    stability: [],
    fitReport: { method: "QR", converged: true, reason: "linear", iterations: 1 },
    warnings: [],
  };
}

const dot = (a: readonly number[], b: readonly number[]) => a.reduce((sum, x, i) => sum + x * b[i]!, 0);

function invert(matrix: readonly (readonly number[])[]): number[][] {
  const size = matrix.length;
  const scale = matrix.map((line, i) => 1 / Math.sqrt(line[i]!));
  const work = matrix.map((line, i) => [
    ...line.map((x, j) => x * scale[i]! * scale[j]!),
    ...line.map((_, j) => (i === j ? 1 : 0)),
  ]);
  for (let k = 0; k < size; k++) {
    const pivot = work[k]![k]!;
    work[k] = work[k]!.map((x) => x / pivot);
    for (let i = 0; i < size; i++) {
      if (i === k) continue;
      const factor = work[i]![k]!;
      work[i] = work[i]!.map((x, j) => x - factor * work[k]![j]!);
    }
  }
  return work.map((line, i) => line.slice(size).map((x, j) => x * scale[i]! * scale[j]!));
}
