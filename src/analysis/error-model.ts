import type { Band, Series, Shared } from "../bands/index.ts";
import type { ErrorModel } from "../fitting/index.ts";
import type { Model } from "../models/index.ts";

/**
 * The error model of the used bands. σ counts as known only when every used band carries one.
 * Subtracted spacings: the band (v+1 - v) is the position of v+1 less that of v, each with its own error; `sigma` of a row is
 * that of the position it was made from, so V = M·diag(σ²)·Mᵀ is tridiagonal, and a common offset is left in 1-0 alone.
 */
export function errorModel(series: Series, used: readonly Band[], model: Model): ErrorModel {
  const known = used.every((band) => band.sigma !== null);
  const own = known ? used.map((band) => band.sigma!) : null;
  const places = series.shared.length === 0 ? [] : used.map((band) => series.bands.indexOf(band));
  const causes = series.shared.map(({ parts }) => places.map((at) => parts[at]!));
  if (!series.subtracted) return { sigmas: own, mixing: null, shared: causes };

  const levels = used.map((band) => model.levels(band.label));
  const lowers = levels.map(({ lower }) => (lower === 0 ? null : levels.findIndex((other) => other.upper === lower)));
  const unseen = lowers.flatMap((at, i) => (at === -1 ? [i] : []));
  const mixing = used.map((_, i) => {
    const row = new Array<number>(used.length + unseen.length).fill(0);
    row[i] = 1;
    const at = lowers[i]!;
    if (at !== null) row[at === -1 ? used.length + unseen.indexOf(i) : at] = -1;
    return row;
  });
  const sigmas = own === null ? null : [...own, ...unseen.map((i) => own[i]!)];
  const shared = causes.map((parts, k) => {
    if (!isOffset(series.shared[k]!)) return parts;
    const sources = [...parts, ...unseen.map((i) => parts[i]!)];
    return mixing.map((row) => row.reduce((sum, m, k) => sum + m * sources[k]!, 0));
  });
  return { sigmas, mixing, shared };
}

/** Offsets cancel between the two positions a spacing was made from; what grows with the position or with v acts on the spacing itself. */
const isOffset = ({ kind, sigma }: Shared) =>
  kind === "calibration" || kind === "laser" || (kind === "group" && sigma.unit !== "ppm");
