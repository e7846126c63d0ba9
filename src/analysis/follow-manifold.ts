import type { Warning } from "../messages/index.ts";
import type { Manifold } from "../models/index.ts";
import { deperturbationOf } from "./deperturbation.ts";
import { differences } from "./differences.ts";
import { row } from "./dissociation/row.ts";
import type { ConsequenceResult, Deperturbation, LevelResult } from "./mixed-result.ts";
import { type Propagation, propagate } from "./propagation.ts";
import type { DissociationRow } from "./result.ts";
import type { Solution } from "./solution.ts";

/** What follows from constants of a model whose states mix. */
export interface ManifoldFollows {
  readonly levels: readonly LevelResult[];
  readonly consequences: readonly ConsequenceResult[];
  readonly deperturbation: Deperturbation | null;
}

/** Block numbers shown beyond those observed. */
const BEYOND = 1;

/** σ below this share of a wavenumber is finer than such models are good for (they err by 0.3 to 20 cm-1 on known molecules). */
const MODEL_ERROR = 0.3;

/** Everything that follows from a fit: levels, consequences, Morse energies of the bonds, and cautions. */
export function followManifold(
  solution: Solution,
  manifold: Manifold,
): ManifoldFollows & { readonly dissociation: readonly DissociationRow[]; readonly warnings: readonly Warning[] } {
  const { fit, by, used, model, options, excess } = solution;
  const top = Math.max(...used.map(({ label }) => model.levels(label).upper));
  const p = fit.values;
  const labels = used.map(({ label }) => label);
  return {
    ...manifoldAt(manifold, p, by, options.upTo ?? top + BEYOND, labels),
    dissociation: dissociationOf(manifold, p, by),
    warnings: [
      ...manifold.warnings(labels, p),
      ...nearZero(solution),
      ...twiceMixed(solution),
      ...atFaceValue(solution, excess.applied),
    ],
  };
}

/** Levels and consequences of given constants. `observed`: labels of the levels that a reader has; null: all of them. */
export function manifoldAt(
  manifold: Manifold,
  p: readonly number[],
  by: Propagation,
  upTo: number,
  observed: readonly string[] | null = null,
): ManifoldFollows {
  return {
    levels: manifold
      .levels(p, upTo)
      .map(({ label, numbers, degeneracy, energy, uncoupled, gradient, share, composition }) => ({
        label,
        ...numbers,
        degeneracy,
        energy,
        standardUncertainty: propagate(energy, gradient, "cm-1", by).standardUncertainty,
        uncoupled,
        [manifold.share.key]: share,
        composition,
      })),
    consequences: manifold.consequences(upTo).map(({ key, symbol, unit, of, note }) => {
      const value = of(p);
      return { key, symbol, quantity: value === null ? null : propagate(value, differences(of, p), unit, by), note };
    }),
    deperturbation: deperturbationOf(manifold, p, by, upTo, observed),
  };
}

const FROZEN_FRAME =
  "Morse form of the bond's own constants, an extrapolation (on X-H bonds 7 to 30 % high); D is that of a frozen frame, not a relaxed D0 or D298";

function dissociationOf(manifold: Manifold, p: readonly number[], by: Propagation): DissociationRow[] {
  return manifold.oscillators(p).map(({ name }, k) => {
    const note = `${name === null ? "" : `${name}: `}${FROZEN_FRAME}`;
    const of = (what: (omega: number, omegaX: number) => number) => (q: readonly number[]) => {
      const { omega, omegaX } = manifold.oscillators(q)[k]!;
      return omega > 0 && omegaX > 0 ? what(omega, omegaX) : null;
    };
    const [de, d0] = [of((w, x) => w ** 2 / (4 * x)), of((w, x) => w ** 2 / (4 * x) - w / 2 + x / 4)];
    const [deNow, d0Now] = [de(p), d0(p)];
    if (deNow === null || d0Now === null)
      return row("morse", null, null, `${name === null ? "" : `${name}: `}ω̃x is not positive, and no limit follows`);
    return row(
      "morse",
      propagate(deNow, differences(de, p), "cm-1", by),
      propagate(d0Now, differences(d0, p), "cm-1", by),
      note,
    );
  });
}

/** Standard uncertainties within which a constant of no sign is told from 0 to first order only. */
const TOLD_APART = 3;

/** Positions go with the square of a constant of no sign, so near 0 its linear interval is wrong. */
function nearZero({ model, options, fit, by }: Solution): Warning[] {
  return model.prepare([], options).parameters.flatMap(({ key, symbol, even, held, prior }, k) => {
    const u = Math.sqrt(by.covariance?.[k]?.[k] ?? 0);
    if (even !== true || held !== undefined || prior !== undefined || Math.abs(fit.values[k]!) > TOLD_APART * u)
      return [];
    if (options.intervals === "profile") return [];
    return [
      {
        code: "near-zero",
        message: `${symbol} is less than ${TOLD_APART} of its standard uncertainties: the levels go with its square, so its interval reaches further down than stated; give --intervals profile, or hold it with --fix "${key}=0" and compare χ²`,
        about: key,
      },
    ];
  });
}

/** A model whose states mix may hold the very mixing that the companion was corrected for. */
function twiceMixed({ used, model }: Solution): Warning[] {
  const corrected = used.flatMap(({ label, twoLevels }) => (twoLevels === null ? [] : [label]));
  if (corrected.length === 0) return [];
  return [
    {
      code: "companion-in-mixed-model",
      message: `${corrected.join(", ")} ${corrected.length === 1 ? "is" : "are"} corrected for a companion, and the model ${model.name} mixes states itself: if the companion is one of its levels, the shift counts twice; give both as measured levels then`,
      about: corrected[0]!,
    },
  ];
}

function atFaceValue({ used, sigmaKnown, options }: Solution, applied: boolean): Warning[] {
  const finest = Math.min(...used.map(({ sigma }) => sigma ?? Number.POSITIVE_INFINITY));
  if (!sigmaKnown || applied || options.scatter !== null || finest >= MODEL_ERROR) return [];
  return [
    {
      code: "model-error-left-out",
      message: `σ down to ${Number(finest.toPrecision(2))} cm-1 is taken at face value, but models of this kind err by 0.3 to 20 cm-1 on known molecules: constants and levels are less certain than stated; give --scatter 0.5, or let --excess scatter estimate it from more levels`,
    },
  ];
}
