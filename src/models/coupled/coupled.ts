import type { Prepared } from "../../fitting/index.ts";
import type { Fault, Warning } from "../../messages/index.ts";
import type { Model, ModelOptions } from "../model.ts";
import { consequencesOf } from "./consequences.ts";
import { constants, keysOf, parametersOf } from "./constants.ts";
import { type Resolved, readLabel } from "./label.ts";
import { levelsUpTo, type SolvedBlock, solveBlocks, unlikeOrder } from "./ladder.ts";
import { startsFrom } from "./starts.ts";

/** Energy above the ground state and its derivatives. */
interface Term {
  readonly energy: number;
  readonly gradient: readonly number[];
}

/**
 * Equivalent X-H bonds that exchange quanta, harmonically coupled anharmonic oscillators (Child & Lawton 1981; Mortensen, Henry & Mohammadi 1981):
 * Σ [v_i·w - v_i(v_i+1)·wx] above the ground state, ⟨…v_i+1…v_j-1…|H|…v_i…v_j…⟩ = lambda·√((v_i+1)·v_j), and on request -wxcross·v_i·v_j.
 * Levels are matched by species and by their order from below in it: levels of one species repel each other, so that order never changes.
 */
export const coupled: Model = {
  name: "coupled",
  title: "anharmonic oscillators in harmonic coupling",
  labelForm: "10+, 20-, 11, 210E or 2100F2, or 20+ from 10-",
  references: ["childlawton1981", "mortensen1981", "childhalonen1984"],
  definition:
    "Energies above the ground state: Σ[v_i·ω̃ − v_i(v_i+1)·ω̃x], and ⟨… v_i+1 … v_j−1 …|H|… v_i … v_j …⟩ = λ·√((v_i+1)·v_j); levels are matched by symmetry species and order from below among those of equal total quanta",
  terms: null,
  constants,
  settings: { required: ["bonds"], constants: {}, own: ["bonds", "cross"] },
  check: ({ bands }, { bonds }) =>
    bands.flatMap((band): Fault[] => {
      const meaning = readLabel(band.label, bonds);
      if (!("what" in meaning)) return [];
      const place = { ...band.place, column: band.place.column ?? "band" };
      return [{ code: "label", place, what: meaning.what, mend: meaning.mend }];
    }),
  prepare: (transitions, options) => prepared(transitions, options),
  starts: (transitions, observed, options) =>
    startsFrom(
      transitions.map(({ label }) => ends(label, options)),
      observed,
      options,
    ),
  // Four bonds to V = 15 take some ten seconds.
  highest: { step: 1, most: 15 },
  labels: () => [],
  levels: (label) => {
    // Quanta of both levels, whatever the number of bonds.
    const [upper, lower = ""] = label.split(/\s+from\s+/i);
    return { upper: quantaIn(upper!), lower: quantaIn(lower) };
  },
  manifold: (options) => ({
    block: "V",
    share: { key: "weight", title: "weight" },
    levels: (p, upTo) => levelsUpTo(options, keysOf(options), p, upTo),
    consequences: (upTo) => consequencesOf(options, upTo),
    oscillators: (p) =>
      options.bonds === "unlike"
        ? [
            { name: "bond 1", omega: p[0]!, omegaX: p[1]! },
            { name: "bond 2", omega: p[2]!, omegaX: p[3]! },
          ]
        : [{ name: null, omega: p[0]!, omegaX: p[1]! }],
    warnings: (labels, p) => signWarnings(options, labels, p),
    scaled: (p, rho) =>
      options.bonds === "unlike"
        ? [p[0]! * rho, p[1]! * rho ** 2, p[2]! * rho, p[3]! * rho ** 2, p[4]!]
        : p.map((x, k) => (k === 0 ? x * rho : k === 2 ? x : x * rho ** 2)),
  }),
};

/** With two bonds the levels do not depend on the sign of λ; only + and − of odd V tell it. */
function signWarnings({ bonds, fixed }: ModelOptions, labels: readonly string[], p: readonly number[]): Warning[] {
  const lambda = p.at(keysOf({ terms: null, fixed, bonds: bonds ?? null }).indexOf("lambda")) ?? 0;
  if (fixed.lambda !== undefined || (bonds !== 2 && bonds !== "unlike")) return [];
  const told =
    bonds === 2 &&
    labels.some((label) => label.split(/\s+from\s+/i).some((name) => /[+-]/.test(name) && quantaIn(name) % 2 === 1));
  if (told) return [];
  return [
    {
      code: "lambda-sign",
      message: `the sign of λ is not determined: ${bonds === "unlike" ? "two unlike bonds have" : "levels of even V, and levels without + or −, have"} the same energies for λ and −λ, so only |λ| = ${Math.abs(lambda).toFixed(2)} cm-1 counts${bonds === 2 ? "; label levels of odd V with + and −" : ""}`,
      about: "lambda",
    },
  ];
}

function quantaIn(text: string): number {
  const [state = ""] = /^[\d.]+/.exec(text.trim()) ?? [];
  const parts = state.includes(".") ? state.split(".") : [...state];
  return parts.reduce((sum, v) => sum + Number(v), 0);
}

function ends(label: string, { bonds }: ModelOptions): { readonly upper: Resolved; readonly lower: Resolved | null } {
  const meaning = readLabel(label, bonds);
  if ("what" in meaning) throw new RangeError(meaning.what);
  return meaning;
}

function prepared(transitions: readonly { readonly label: string }[], options: ModelOptions): Prepared {
  const keys = keysOf(options);
  const pairs = transitions.map(({ label }) => ends(label, options));
  return {
    parameters: parametersOf(options),
    linear: false,
    evaluate(p) {
      const term = termsAt(options, keys, p);
      const zero: Term = { energy: 0, gradient: keys.map(() => 0) };
      const both = pairs.map(({ upper, lower }) => [term(upper), lower === null ? zero : term(lower)] as const);
      return {
        calculated: both.map(([high, low]) => high.energy - low.energy),
        jacobian: both.map(([high, low]) => high.gradient.map((x, k) => x - low.gradient[k]!)),
      };
    },
  };
}

/** Levels at given constants, each block solved once. */
function termsAt(options: ModelOptions, keys: readonly string[], p: readonly number[]): (level: Resolved) => Term {
  const solved = new Map<number, readonly SolvedBlock[]>();
  const orders = new Map<number, readonly number[]>();
  return ({ total, among, place }) => {
    let blocks = solved.get(total);
    if (blocks === undefined) {
      blocks = solveBlocks(options.bonds, total, keys, p);
      solved.set(total, blocks);
      if (options.bonds === "unlike") orders.set(total, unlikeOrder(total, p));
    }
    const terms = among.map(({ species, order }) => {
      const block = blocks.find((one) => one.species === species)!;
      const at = orders.get(total)?.[order] ?? order;
      return { energy: block.energies[at]!, gradient: block.gradients[at]! };
    });
    return terms.length === 1 ? terms[0]! : terms.sort((a, b) => a.energy - b.energy)[place]!;
  };
}
