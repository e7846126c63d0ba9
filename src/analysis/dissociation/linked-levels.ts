import type { Band } from "../../bands/index.ts";
import { estimator, fitLinear, type LinearFit } from "../../fitting/index.ts";
import type { Solution } from "../solution.ts";

/** Levels that the used bands link to v = 0, in rising order (v = 0 not listed), with their energies above it and how these follow from the bands. */
export interface LinkedLevels {
  readonly v: readonly number[];
  readonly energies: readonly number[];
  /** one row a level, one column a used band: ∂E/∂position */
  readonly weights: readonly (readonly number[])[];
}

/** The energies of the levels linked to v = 0, by least squares where bands close a loop; null when v = 0 is not in the bands. */
export function linkedLevels({ used, model, errors, treatment }: Solution): LinkedLevels | null {
  const ends = used.map((band) => model.levels(band.label));
  const direct = straight(used, ends);
  if (direct !== null) return direct;
  const linked = new Set([0]);
  for (let before = -1; before !== linked.size; ) {
    before = linked.size;
    for (const { upper, lower } of ends) {
      if (linked.has(upper)) linked.add(lower);
      if (linked.has(lower)) linked.add(upper);
    }
  }
  if (linked.size === 1) return null;
  const v = [...linked].filter((level) => level !== 0).sort((a, b) => a - b);
  const inside = used.flatMap((_, i) => (linked.has(ends[i]!.upper) ? [i] : []));
  const fit = levelFit(
    inside.map((i) => used[i]!),
    inside.map((i) => ends[i]!),
    v,
    {
      sigmas: errors.sigmas === null || errors.mixing !== null ? null : inside.map((i) => errors.sigmas![i]!),
      mixing: null,
      shared: [],
    },
    treatment,
  );
  const rows = estimator(fit);
  const weights = v.map((_, level) => {
    const full = new Array<number>(used.length).fill(0);
    inside.forEach((i, at) => {
      full[i] = rows[level]![at]!;
    });
    return full;
  });
  return { v, energies: fit.values, weights };
}

/** The usual case, each level observed once and straight from v = 0: the positions are the energies. */
function straight(used: readonly Band[], ends: readonly { upper: number; lower: number }[]): LinkedLevels | null {
  const order = ends.map((_, i) => i).sort((a, b) => ends[a]!.upper - ends[b]!.upper);
  const plain = order.every((i, at) => ends[i]!.lower === 0 && ends[i]!.upper !== ends[order[at - 1] ?? -1]?.upper);
  if (!plain || order.length === 0) return null;
  return {
    v: order.map((i) => ends[i]!.upper),
    energies: order.map((i) => used[i]!.position),
    weights: order.map((i) => used.map((_, k) => Number(k === i))),
  };
}

function levelFit(
  bands: readonly Band[],
  ends: readonly { upper: number; lower: number }[],
  v: readonly number[],
  errors: Solution["errors"],
  treatment: Solution["treatment"],
): LinearFit {
  const jacobian = ends.map(({ upper, lower }) => v.map((level) => Number(level === upper) - Number(level === lower)));
  return fitLinear(
    {
      parameters: v.map((level) => ({ key: `E${level}`, symbol: `E(${level})`, unit: "cm-1", start: 0, typical: 1 })),
      linear: true,
      evaluate: (p) => ({ calculated: p, jacobian }),
      observed: bands.map((band) => band.position),
      errors,
    },
    treatment,
  );
}
