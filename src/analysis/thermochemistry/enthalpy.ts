import { wavenumberInKelvin } from "../../quantity/index.ts";
import { atomicLevels } from "./atomic-levels.ts";

/** K; the standard temperature of thermochemical tables. */
export const STANDARD_TEMPERATURE = 298.15;

/** RT in cm-1. */
const thermal = STANDARD_TEMPERATURE / wavenumberInKelvin;

/** Mean energy of levels (cm-1, degeneracy) at 298.15 K, cm-1. */
function meanEnergy(levels: Iterable<readonly [number, number]>): number {
  let sum = 0;
  let weighted = 0;
  for (const [energy, degeneracy] of levels) {
    const weight = degeneracy * Math.exp(-energy / thermal);
    sum += weight;
    weighted += weight * energy;
  }
  return weighted / sum;
}

/** H°(298.15 K) - H°(0) of an atom as an ideal gas, cm-1: 5/2 RT and its low levels; null for elements not in the table. */
export function atomEnthalpy(element: string): number | null {
  const levels = atomicLevels(element);
  return levels === null ? null : 2.5 * thermal + meanEnergy(levels);
}

/**
 * H°(298.15 K) - H°(0) of a diatomic molecule as an ideal gas, cm-1: 5/2 RT, rotation RT - B/3 (B in cm-1 or null: RT), and vibration over the
 * levels G(v) - G(0). One electronic state without structure is assumed (Herzberg 1950, statistical mechanics of the rigid rotor).
 */
export function diatomicEnthalpy(levels: readonly number[], rotation: number | null): number {
  return 3.5 * thermal - (rotation ?? 0) / 3 + meanEnergy(levels.map((energy) => [energy, 1] as const));
}
