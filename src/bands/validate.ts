import { type Fault, formatPlace, type Warning } from "../messages/index.ts";
import type { Band } from "./series.ts";

/** Repeats agree when they lie within this many combined standard uncertainties of each other. */
const AGREEMENT = 5;

/** Different phases in one series: bands shift between them by more than any σ. */
export function phaseFaults(bands: readonly Band[], before: string): Fault[] {
  const first = bands.find((band) => band.phase !== null);
  const other = bands.find((band) => band.phase !== null && band.phase !== first!.phase);
  if (first === undefined || other === undefined) return [];
  return [
    {
      code: "phases-mixed",
      place: { ...other.place, column: other.place.column ?? "phase" },
      what: `${before}${other.label} is of phase "${other.phase}", ${first.label} (${formatPlace(first.place)}) of "${first.phase}"`,
      mend: "fit one phase at a time, or give each its own name in the column series",
    },
  ];
}

/**
 * The same band twice among those used: taken as repeated measurements when all carry σ and agree within five combined σ,
 * otherwise a fault that names both places.
 */
export function repeatChecks(bands: readonly Band[], before: string): { faults: Fault[]; warnings: Warning[] } {
  const groups = new Map<string, Band[]>();
  for (const band of bands) {
    if (!band.use) continue;
    const key = `${band.label}|${band.isotopologue?.text ?? ""}`;
    const group = groups.get(key);
    if (group === undefined) groups.set(key, [band]);
    else group.push(band);
  }
  const faults: Fault[] = [];
  const warnings: Warning[] = [];
  for (const [first, ...rest] of groups.values()) {
    if (first === undefined || rest.length === 0) continue;
    const clash = rest.find((band) => !agree(first, band));
    if (clash === undefined) {
      warnings.push({
        code: "repeated-measurements",
        message: `${first.label} stands there ${rest.length + 1} times; the values agree within 5 σ and are taken as repeated measurements; mark all but one use: no if they are copies`,
        about: first.label,
      });
      continue;
    }
    const both = first.sigma !== null && clash.sigma !== null;
    faults.push({
      code: "band-twice",
      place: { ...clash.place, column: clash.place.column ?? "band" },
      what: `${before}${clash.label} stands here and at ${formatPlace(first.place)}${both ? ", and the values differ by more than 5 σ" : ""}`,
      mend: both
        ? "mend a label, or mark one of them use: no"
        : "mend a label, mark one of them use: no, or give both a σ if they are repeated measurements",
    });
  }
  return { faults, warnings };
}

function agree(a: Band, b: Band): boolean {
  if (a.sigma === null || b.sigma === null) return false;
  return Math.abs(a.position - b.position) <= AGREEMENT * Math.hypot(a.sigma, b.sigma);
}
