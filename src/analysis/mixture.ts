import type { Series, Shared } from "../bands/index.ts";
import { fitValues, UNTREATED } from "../fitting/index.ts";
import type { Warning } from "../messages/index.ts";
import type { Model, Well } from "../models/index.ts";
import { naturalIsotopes, readAtom, reducedMassOf } from "../species/index.ts";
import { errorModel } from "./error-model.ts";
import type { AnalysisOptions } from "./options.ts";

/** One isotopologue of a natural sample. */
interface Member {
  readonly name: string;
  readonly reducedMass: number;
  /** share of the sample, 0 to 1 */
  readonly share: number;
}

/**
 * A bond with a natural element (no mass number) belongs to a mixture of isotopologues. The mean mass stands for it, and the pull of the
 * others on the centre of each band, measured from the commonest one, enters as a fully correlated uncertainty: whether a maximum is read at
 * the commonest isotopologue or at the centre of the mixture is not known. First-order mass scaling (Dunham 1932) of a provisional fit.
 */
export function withMixture(
  series: Series,
  model: Model,
  options: AnalysisOptions,
): { readonly series: Series; readonly warnings: readonly Warning[] } {
  const pull = pullOf(series, model, options);
  if (pull === null) return { series, warnings: [] };
  const parts = series.bands.map(({ label }) => pull.on(label));
  const sizes = parts.map(Math.abs);
  const element = series.bond!.atoms!.filter(isNatural).join(" and ");
  const mixture: Shared = { kind: "mixture", group: null, sigma: { value: 1, unit: "1" }, parts };
  const known = series.bands.every(({ use, sigma }) => !use || sigma !== null);
  return {
    series: known ? { ...series, shared: [...series.shared, mixture] } : series,
    warnings: [
      {
        code: "natural-mixture",
        message: `${element} without a mass number is the natural mixture: its mean mass is used, and the other isotopes pull the centre of a band from that of ${pull.from} by ${Math.min(...sizes).toFixed(2)} to ${Math.max(...sizes).toFixed(2)} cm-1; ${known ? "that is carried as a correlated uncertainty" : "without σ that is not in the uncertainties"}; name the isotope if the bands are those of one`,
      },
    ],
  };
}

/** How far the centre of a band of the mixture lies below that of its commonest isotopologue, cm-1; null where there is no mixture, or no fit to scale. */
export function pullOf(
  series: Series,
  model: Model,
  options: AnalysisOptions,
): { readonly from: string; readonly on: (label: string) => number } | null {
  const atoms = series.bond?.atoms;
  if (!atoms?.some(isNatural) || model.well === undefined) return null;
  const members = membersOf(atoms);
  if (members.length < 2) return null;
  const p = provisional(series, model, options);
  if (p === null) return null;
  const reference = series.bond!.reducedMass;
  const wells = members.map((member) => ({ member, well: model.well!(scaled(p, member.reducedMass, reference)) }));
  const [commonest] = [...wells].sort((a, b) => b.member.share - a.member.share);
  return {
    from: commonest!.member.name,
    on(label) {
      const centre = wells.reduce((sum, { member, well }) => sum + member.share * position(well, model, label), 0);
      return position(commonest!.well, model, label) - centre;
    },
  };
}

const isNatural = (atom: string) => /^[A-Z][a-z]?$/.test(atom);

function membersOf(atoms: readonly [string, string]): Member[] {
  const [first, second] = atoms.map((atom) =>
    isNatural(atom) ? naturalIsotopes(atom) : [{ name: atom, mass: massOf(atom), abundance: 1 }],
  );
  const all = first!.flatMap((a) =>
    second!.map((b) => ({
      name: `${a.name}${b.name}`,
      reducedMass: reducedMassOf(a, b),
      share: a.abundance * b.abundance,
    })),
  );
  const total = all.reduce((sum, { share }) => sum + share, 0);
  return all.map((member) => ({ ...member, share: member.share / total }));
}

function massOf(name: string): number {
  const atom = readAtom(name);
  if ("what" in atom) throw new RangeError(`not an atom: ${name}`);
  return atom.mass;
}

/** A third constant still moves the pull by a hundredth of itself; further ones do not. */
const MOST_TERMS = 3;

/** Constants in any measure of the bands: only their size matters here. */
function provisional(series: Series, model: Model, options: AnalysisOptions): number[] | null {
  const used = series.bands.filter(({ use }) => use);
  const distinct = new Set(used.map(({ label }) => label)).size;
  const terms = model.terms === null ? null : Math.max(model.terms.least, Math.min(MOST_TERMS, distinct));
  const least = { ...options, terms, fixed: {} };
  // Also of a series that carries the pull already.
  const measured = { ...series, shared: series.shared.filter(({ kind }) => kind !== "mixture") };
  try {
    const prepared = model.prepare(used, least);
    const problem = {
      ...prepared,
      observed: used.map((band) => band.position),
      errors: errorModel(measured, used, model),
    };
    return prepared.linear ? fitValues(problem, UNTREATED) : null;
  } catch {
    // The fit itself will say what is missing.
    return null;
  }
}

/** ωe scales with ρ, ωexe with ρ² and so on; ρ = √(μ/μ'). */
function scaled(p: readonly number[], reducedMass: number, reference: number): number[] {
  const rho = Math.sqrt(reference / reducedMass);
  return p.map((constant, k) => constant * rho ** (k + 1));
}

function position(well: Well, model: Model, label: string): number {
  const { upper, lower } = model.levels(label);
  return well.term(upper) - well.term(lower);
}
