import { morseDe } from "./dissociation/morse.ts";
import type { StabilityRow } from "./result.ts";
import { fitSome, type Solution } from "./solution.ts";

/** The same model fitted to the lowest bands alone, one row for each number of bands that determines it, up to all of them. */
export function stabilityRows(solution: Solution): StabilityRow[] {
  const { model, used } = solution;
  if (model.well === undefined) return [];
  const rank = new Map(used.map((band) => [band, model.levels(band.label)]));
  const rising = [...used].sort(
    (a, b) => rank.get(a)!.upper - rank.get(b)!.upper || rank.get(a)!.lower - rank.get(b)!.lower,
  );
  const rows: StabilityRow[] = [];
  for (let count = 1; count <= rising.length; count++) {
    // Repeats of one band come and go together.
    if (rising[count]?.label === rising[count - 1]!.label) continue;
    const bands = rising.slice(0, count);
    const fit = count === rising.length ? solution.fit : fitSome(solution, bands);
    if (fit === null) continue;
    const well = model.well(fit.values);
    const de = morseDe(well, fit.values);
    const next = rank.get(bands.at(-1)!)!.upper + 1;
    const [a, b] = well.leading;
    rows.push({
      bands: count,
      we: fit.values[a]!,
      wexe: fit.values[b]!,
      d0: de === null ? null : de.value - well.term(0),
      next: well.term(next) - well.term(0),
    });
  }
  return rows;
}
