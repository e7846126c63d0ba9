import { nearest } from "../messages/index.ts";
import type { UnitName } from "../quantity/index.ts";
import type { Context } from "./context.ts";
import type { Wrong } from "./conversion.ts";
import { readVibrationalLabel } from "./label.ts";
import { offsetEffect } from "./light.ts";
import type { ReadBand } from "./read-band.ts";
import type { Shared } from "./series.ts";

/**
 * Every cause of error that the bands of one series have in common, with its effect on each band in cm-1.
 */
export function sharedParts(read: readonly ReadBand[], context: Context): Shared[] {
  const { shared, groups, perQuantum, laser } = context;
  const light = { medium: context.medium, air: context.air, exciting: laser?.wavenumber ?? null };
  const offset = (unit: UnitName, value: number) => (band: ReadBand) => offsetEffect(value, unit, band.absolute, light);
  const parts: Shared[] = [];
  if (shared !== null)
    parts.push({ kind: "calibration", group: null, sigma: shared, parts: read.map(offset(shared.unit, shared.value)) });
  for (const [name, sigma] of groups ?? []) {
    const { unit, value } = sigma;
    const effect = unit === "ppm" ? scale(value, laser !== null) : offset(unit, value);
    const each = read.map((band) => (band.band.group === name ? effect(band) : 0));
    if (each.some((x) => x !== 0)) parts.push({ kind: "group", group: name, sigma, parts: each });
  }
  if (laser?.sigma != null && laser.stated !== null) {
    const one = laser.sigma;
    parts.push({ kind: "laser", group: null, sigma: laser.stated, parts: read.map(() => one) });
  }
  if (perQuantum !== null)
    parts.push({
      kind: "per-quantum",
      group: null,
      sigma: { value: perQuantum, unit: "cm-1" },
      parts: read.map(({ band }) => {
        const levels = readVibrationalLabel(band.label);
        return levels === null ? 0 : perQuantum * (levels.upper - levels.lower);
      }),
    });
  return parts;
}

/** A scale error in ppm of the wavenumber that was measured; the scattered one where there is an exciting line. */
const scale = (ppm: number, scattered: boolean) => (band: ReadBand) =>
  (scattered ? -1 : 1) * ppm * 1e-6 * band.absolute;

/** A group with an uncertainty that no band belongs to; null when all have bands. */
export function groupWithoutBands(read: readonly ReadBand[], { groups }: Context): Wrong | null {
  const present = [...new Set(read.flatMap(({ band }) => band.group ?? []))];
  for (const name of groups?.keys() ?? []) {
    if (present.includes(name)) continue;
    const guess = nearest(name, present);
    return {
      code: "group-without-bands",
      what: `no band belongs to the group "${name}"${guess === null ? "" : ` (did you mean ${guess}?)`}`,
      mend:
        present.length === 0
          ? "name the group of each band in the column group of a file"
          : `the column group holds ${present.join(", ")}`,
    };
  }
  return null;
}
