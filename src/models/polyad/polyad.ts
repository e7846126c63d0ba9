import type { Prepared } from "../../fitting/index.ts";
import type { Fault } from "../../messages/index.ts";
import type { Consequence, Manifold, MixedLevel } from "../manifold.ts";
import type { Model, ModelOptions } from "../model.ts";
import { type SolvedBlock, solveBlock } from "./blocks.ts";
import { constants, keysOf, parametersOf } from "./constants.ts";
import { labelOf, MOST, type PolyadLevel, readLabel } from "./label.ts";
import { startsFrom } from "./starts.ts";

const isSingle = ({ bend }: ModelOptions) => bend === "single";

/**
 * Fermi polyads of one X-H chromophore, a stretch and a bend of half its wavenumber (Dübal & Quack 1984; Baggott et al. 1985): N = v_s + v_b/2 is kept, levels
 * of N and l are numbered from the highest down. They repel each other, so that the numbering never changes while constants move.
 */
export const polyad: Model = {
  name: "polyad",
  title: "stretch-bend polyads of one X-H chromophore",
  labelForm: "N_j, such as 2_1, or N_j:l, such as 1.5_1:1",
  references: ["dubalquack1984", "baggott1985"],
  definition:
    "Energies above the ground state: ν̃s·v_s + ν̃b·v_b + xss·v_s² + xbb·v_b² + xsb·v_s·v_b + gbb·l², and ⟨v_s−1, v_b+2|H|v_s, v_b⟩ = −½·ksbb·√(½·v_s·(v_b−l+2)(v_b+l+2)), of a single bend −½·ksbb·√(½·v_s·(v_b+1)(v_b+2)); levels of N = v_s + v_b/2 are numbered from the highest down",
  terms: null,
  constants,
  settings: { required: [], constants: {}, own: ["bend"] },
  check: ({ bands }, options) => [
    ...bands.flatMap((band): Fault[] => {
      const read = readLabel(band.label, isSingle(options));
      if (!("what" in read)) return [];
      return [{ code: "label", place: { ...band.place, column: band.place.column ?? "band" }, ...read }];
    }),
    ...Object.keys(options.fixed)
      .filter((key) => !keysOf(options).includes(key))
      .map(
        (key): Fault => ({
          code: "unknown-constant",
          place: { source: "--fix" },
          what: `a single bend has no ${key}`,
          mend: `leave ${key} out, or say --bend degenerate`,
        }),
      ),
  ],
  prepare: (transitions, options) =>
    prepared(
      transitions.map(({ label }) => levelOf(label, options)),
      options,
    ),
  starts(transitions, observed, options) {
    const levels = transitions.map(({ label }) => levelOf(label, options));
    return startsFrom(levels, observed, prepared(levels, options));
  },
  highest: { step: 0.5, most: MOST },
  labels: () => [],
  levels: (label) => ({ upper: Number.parseFloat(label), lower: 0 }),
  manifold: (options) => manifold(options),
};

function levelOf(label: string, options: ModelOptions): PolyadLevel {
  const read = readLabel(label, isSingle(options));
  if ("what" in read) throw new RangeError(read.what);
  return read;
}

/** Blocks at given constants, each solved once. */
function solver(options: ModelOptions, p: readonly number[]): (n: number, l: number) => SolvedBlock {
  const solved = new Map<string, SolvedBlock>();
  return (n, l) => {
    const key = `${n} ${l}`;
    let block = solved.get(key);
    if (block === undefined) {
      block = solveBlock(n, l, isSingle(options), p);
      solved.set(key, block);
    }
    return block;
  };
}

function prepared(levels: readonly PolyadLevel[], options: ModelOptions): Prepared {
  return {
    parameters: parametersOf(options),
    linear: false,
    evaluate(p) {
      const block = solver(options, p);
      return {
        calculated: levels.map(({ n, j, l }) => block(n, l).energies[j - 1]!),
        jacobian: levels.map(({ n, j, l }) => block(n, l).gradients[j - 1]!),
      };
    },
  };
}

function manifold(options: ModelOptions): Manifold {
  const keys = keysOf(options);
  const at = (key: string) => keys.indexOf(key);
  const single = isSingle(options);
  return {
    block: "N",
    share: { key: "stretchShare", title: "stretch share" },
    levels: (p, upTo) => levelsUpTo(options, p, upTo),
    consequences: () => consequences(at("ksbb"), single),
    oscillators: (p) => [{ name: null, omega: p[at("ws")]! - p[at("xss")]!, omegaX: -p[at("xss")]! }],
    warnings: () =>
      options.fixed.ksbb === undefined
        ? [
            {
              code: "k-sign",
              message: "the sign of ksbb is not determined: no energy depends on it; it is given as positive",
              about: "ksbb",
            },
          ]
        : [],
    deperturbed: (p, upTo) => {
      const block = solver(options, p);
      return Array.from({ length: Math.floor(upTo) }, (_, i) => i + 1).map((v) => {
        const { energies, vectors } = block(v, 0);
        // The pure stretch is the first state of the block.
        const shares = vectors.map((c) => c[0]! ** 2);
        const best = shares.indexOf(Math.max(...shares));
        return {
          v,
          position: p[at("ws")]! * v + p[at("xss")]! * v * v,
          gradient: keys.map((key) => (key === "ws" ? v : key === "xss" ? v * v : 0)),
          strongest: { label: labelOf({ n: v, j: best + 1, l: 0 }), energy: energies[best]!, share: shares[best]! },
        };
      });
    },
  };
}

function levelsUpTo(options: ModelOptions, p: readonly number[], upTo: number): MixedLevel[] {
  const block = solver(options, p);
  const single = isSingle(options);
  const levels: MixedLevel[] = [];
  for (let twice = 1; twice <= 2 * upTo; twice++) {
    const n = twice / 2;
    const momenta = single ? [0] : Array.from({ length: twice + 1 }, (_, l) => l).filter((l) => l % 2 === twice % 2);
    const all = momenta.flatMap((l) => {
      const { energies, uncoupled, vectors, gradients, states } = block(n, l);
      return energies.map((energy, i): MixedLevel => {
        const composition = vectors[i]!.map((c, k) => ({ state: `${states[k]!.s},${states[k]!.b}`, weight: c * c }))
          .filter(({ weight }) => weight > 1e-6)
          .sort((a, b) => b.weight - a.weight);
        return {
          label: labelOf({ n, j: i + 1, l }),
          numbers: { N: n, l, j: i + 1 },
          degeneracy: l === 0 ? 1 : 2,
          energy,
          uncoupled: uncoupled[i]!,
          gradient: gradients[i]!,
          share: vectors[i]![0]! ** 2,
          composition,
        };
      });
    });
    levels.push(...all.sort((a, b) => a.energy - b.energy));
  }
  return levels;
}

function consequences(k: number, single: boolean): Consequence[] {
  return [
    {
      key: "firstCoupling",
      symbol: `W(1,0; 0,2) = ${single ? "ksbb/2" : "ksbb/√2"}`,
      unit: "cm-1",
      of: (p) => Math.abs(p[k]!) * (single ? 0.5 : Math.SQRT1_2),
      note: "coupling of the fundamental with the overtone of the bend",
    },
    {
      key: "phi",
      symbol: "φsbb = 2·ksbb",
      unit: "cm-1",
      of: (p) => 2 * Math.abs(p[k]!),
      note: "constant of the term ½·φsbb·qs·qb² in dimensionless normal coordinates",
    },
  ];
}
