import type { Warning } from "../../messages/index.ts";
import { fromWavenumber, interval, type Quantity } from "../../quantity/index.ts";
import { bondElements } from "../empirical/bond-elements.ts";
import type { DissociationRow, Thermochemistry } from "../result.ts";
import type { Solution } from "../solution.ts";
import { atomEnthalpy, diatomicEnthalpy, STANDARD_TEMPERATURE } from "./enthalpy.ts";

const inKilojoule = (wavenumber: number) => fromWavenumber(wavenumber, "kJ/mol");

/**
 * ΔH°(298.15 K) of A-B → A + B for each D0: D0 plus the enthalpy the atoms have gained since 0 K less that of the molecule, ideal gases at 1 bar.
 * The thermal part, some 4 kJ/mol, is known far better than D0, whose uncertainty stands. null unless the bond is the whole molecule.
 */
export function thermochemistry(
  solution: Solution,
  rows: readonly DissociationRow[],
  acceptedD0: Quantity | null,
): { readonly thermochemistry: Thermochemistry | null; readonly warnings: readonly Warning[] } {
  const { series, options } = solution;
  if (!options.diatomic) return { thermochemistry: null, warnings: [] };
  const elements = bondElements(series.bond);
  const missing = (message: string) => ({ thermochemistry: null, warnings: [{ code: "no-enthalpy", message }] });
  if (elements === null) return missing("no enthalpy follows without the two atoms; give --bond");
  const atoms = elements.map((element) => ({ element, enthalpy: atomEnthalpy(element) }));
  const unknown = atoms.find(({ enthalpy }) => enthalpy === null);
  if (unknown !== undefined)
    return missing(
      `the low levels of the atom ${unknown.element} are not in the table, so no enthalpy at 298.15 K follows; D0 holds at 0 K`,
    );
  const levels = vibrationalLevels(solution);
  if (levels === null) return missing("no enthalpy follows from a model without a well");
  const molecule = diatomicEnthalpy(levels, options.be);
  const thermal = atoms.reduce((sum, { enthalpy }) => sum + enthalpy!, 0) - molecule;
  const enthalpyOf = (d0: Quantity): Quantity => ({
    ...mapQuantity(d0, (x) => inKilojoule(x + thermal), inKilojoule),
    unit: "kJ/mol",
  });
  const given = options.acceptedEnthalpy;
  const accepted =
    given === null
      ? acceptedD0 === null
        ? null
        : enthalpyOf(acceptedD0)
      : {
          value: given.value,
          standardUncertainty: given.sigma,
          interval95: given.sigma === null ? null : interval(given.value, given.sigma, 0.95, null),
          unit: "kJ/mol",
        };
  return {
    thermochemistry: {
      temperature: STANDARD_TEMPERATURE,
      atoms: atoms.map(({ element, enthalpy }) => ({ element, enthalpy: inKilojoule(enthalpy!) })),
      molecule: inKilojoule(molecule),
      rows: rows.map(({ method, d0, empirical }) => {
        const enthalpy = d0 === null ? null : enthalpyOf(d0);
        return {
          method,
          enthalpy,
          empiricalRange:
            empirical == null
              ? null
              : (empirical.correctedRange.map((x) => inKilojoule(x + thermal)) as [number, number]),
          lessAccepted: enthalpy === null || accepted === null ? null : difference(enthalpy, accepted),
        };
      }),
      accepted,
    },
    warnings: [],
  };
}

/** G(v) - G(0) of the bound levels that are populated at all, cm-1; null without a well. */
function vibrationalLevels({ model, fit }: Solution): number[] | null {
  const well = model.well?.(fit.values);
  if (well === undefined) return null;
  const levels = [0];
  for (let v = 1; v < 500 && well.slope(v) > 0; v++) {
    const energy = well.term(v) - well.term(0);
    // exp(-hcG/kT) below 1e-12
    if (energy > 6000) break;
    levels.push(energy);
  }
  return levels;
}

function mapQuantity(q: Quantity, value: (x: number) => number, size: (x: number) => number): Quantity {
  const both = (bounds: readonly [number, number] | null) =>
    bounds === null ? null : ([value(bounds[0]), value(bounds[1])] as const);
  return {
    value: value(q.value),
    standardUncertainty: q.standardUncertainty === null ? null : size(q.standardUncertainty),
    interval95: both(q.interval95),
    unit: q.unit,
    ...(q.interval === undefined ? {} : { interval: { ...q.interval, bounds: both(q.interval.bounds) } }),
  };
}

/** Fitted less accepted; the two are independent. */
function difference(enthalpy: Quantity, accepted: Quantity): Quantity {
  const value = enthalpy.value - accepted.value;
  const u = enthalpy.standardUncertainty;
  const both = u === null ? null : Math.hypot(u, accepted.standardUncertainty ?? 0);
  return {
    value,
    standardUncertainty: both,
    interval95: both === null ? null : interval(value, both, 0.95, null),
    unit: "kJ/mol",
  };
}
