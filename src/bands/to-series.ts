import { type Fault, InputError, type Warning } from "../messages/index.ts";
import type { Bond } from "../species/index.ts";
import { type Context, readContext } from "./context.ts";
import type { Wrong } from "./conversion.ts";
import type { RawRow } from "./raw.ts";
import { type ReadBand, readBand } from "./read-band.ts";
import type { Series } from "./series.ts";
import type { Settings } from "./settings.ts";
import { groupWithoutBands, sharedParts } from "./shared-parts.ts";
import { phaseFaults, repeatChecks } from "./validate.ts";
import { aboutAir, aboutBond, aboutCompanions, aboutMeaning, aboutSigma } from "./warnings.ts";

/** Bands on a common footing, one series a name. */
export interface Understood {
  readonly series: readonly Series[];
  readonly warnings: readonly Warning[];
}

/**
 * Understand rows: cm-1 in vacuum, standard uncertainties, series by name in order of appearance.
 * Throws InputError with everything that is wrong.
 */
export function toSeries(rows: readonly RawRow[], settings: Settings): Understood {
  const faults: Fault[] = [];
  const context = readContext(settings, faults);
  const bonds = new Map<string, Bond | Wrong>();
  const groups = new Map<string | null, ReadBand[]>();
  for (const row of rows) {
    const read = readBand(row, context, bonds, faults);
    if (read === null) continue;
    const name = row.cells.series ?? null;
    const group = groups.get(name);
    if (group === undefined) groups.set(name, [read]);
    else group.push(read);
  }
  const several = groups.size > 1;
  const all = [...groups.values()].flat();
  const lost = all.length === 0 ? null : groupWithoutBands(all, context);
  if (lost !== null) faults.push({ ...lost, place: settings.get("group-sigma")!.place });
  const series = [...groups].map(([name, bands]) => oneSeries(name, bands, context, several, faults));
  if (faults.length > 0) throw new InputError(faults);
  return { series, warnings: [] };
}

function oneSeries(
  name: string | null,
  read: readonly ReadBand[],
  context: Context,
  several: boolean,
  faults: Fault[],
): Series {
  const bands = read.map(({ band }) => band);
  const shown = name ?? (several ? "unnamed" : null);
  const before = shown === null ? "" : `series "${shown}": `;
  const used = bands.filter((band) => band.use);
  faults.push(...phaseFaults(used, before));
  const { faults: repeated, warnings } = repeatChecks(bands, before);
  faults.push(...repeated);
  const texts = new Set(bands.map((band) => band.isotopologue?.text ?? null));
  const bond = texts.size === 1 && !texts.has(null) ? bands[0]!.isotopologue : context.bond;
  if (used.length === 0 && faults.length === 0)
    faults.push({
      code: "no-used-bands",
      place: { source: bands[0]!.place.source },
      what: `${before}every band is marked use: no`,
      mend: "mark the bands to fit with use: yes, or leave the column out",
    });
  return {
    name: name ?? context.name ?? bond?.text ?? "oscillator",
    bond,
    bands,
    shared: sharedParts(read, context),
    subtracted: context.subtracted,
    light: { medium: context.medium, air: context.air, exciting: context.laser?.wavenumber ?? null },
    warnings: [
      ...warnings,
      ...aboutSigma(used),
      ...aboutCompanions(used),
      ...aboutMeaning(used, context.meaning),
      ...aboutBond(bond, context.bond),
      ...aboutAir(read.filter(({ extrapolated }) => extrapolated).map(({ band }) => band)),
    ],
  };
}
