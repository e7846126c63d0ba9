import { fitLocalMode } from "../local-mode-fit.ts";
import type { Consequence } from "../manifold.ts";
import type { ModelOptions } from "../model.ts";
import { keysOf } from "./constants.ts";
import { levelsUpTo } from "./ladder.ts";
import { quarticOf } from "./normal-modes.ts";

/** What follows from the constants: splittings, how local the bonds are, normal-mode constants, other conventions, Morse energies. */
export function consequencesOf(options: ModelOptions, upTo: number): Consequence[] {
  return options.bonds === "unlike" ? unlike(options, upTo) : equivalent(options, options.bonds ?? 2, upTo);
}

const item = (
  key: string,
  symbol: string,
  of: (p: readonly number[]) => number | null,
  note: string | null = null,
  unit = "cm-1",
): Consequence => ({ key, symbol, unit, of, note });

function equivalent(options: ModelOptions, bonds: number, upTo: number): Consequence[] {
  const [w, wx, lambda] = [0, 1, 2];
  const { stretch } = quarticOf(bonds);
  return [
    item(
      "xi",
      "ξ = (2/π) arctan(λ/ω̃x)",
      (p) => (2 / Math.PI) * Math.atan(p[lambda]! / p[wx]!),
      "0: local bonds, ±1: normal modes (Child & Halonen 1984)",
      "1",
    ),
    ...splittings(options, bonds, upTo),
    item(
      "gammaPrime",
      "γ′ = −λ",
      (p) => -p[lambda]!,
      "coupling with the opposite sign (Mortensen, Henry & Mohammadi 1981)",
    ),
    item("xm", "x_m = −ω̃x", (p) => -p[wx]!, "anharmonicity as a term in v² (Mills & Robiette 1985)"),
    item(
      "omegaSymmetric",
      "ω_s",
      (p) => p[w]! + (bonds - 1) * p[lambda]!,
      "harmonic wavenumber of the symmetric stretch, with v + ½",
    ),
    item(
      "omegaOther",
      bonds === 2 ? "ω_a" : "ω_t",
      (p) => p[w]! - p[lambda]!,
      bonds === 2 ? "of the antisymmetric stretch" : "of the degenerate stretch",
    ),
    item("xss", "x_ss", (p) => -p[wx]! * stretch.ss),
    item("xst", bonds === 2 ? "x_sa" : "x_st", (p) => -p[wx]! * stretch.st),
    item(
      "kst",
      bonds === 2 ? "K" : "K_st",
      (p) => -p[wx]! * stretch.k,
      `element (K/4)·√(n_s(n_s−1)(n_${bonds === 2 ? "a" : "t"}+1)(n_${bonds === 2 ? "a" : "t"}+2)); some papers write K/2 for the same${bonds > 2 ? "; further quartic terms: docs/coupled-bonds.md" : ""}`,
    ),
  ];
}

/** Highest less lowest species of the levels with all quanta in one bond. */
function splittings(options: ModelOptions, bonds: number, upTo: number): Consequence[] {
  const keys = keysOf(options);
  const other = { 2: "B2", 3: "E", 4: "F2" }[bonds]!;
  return Array.from({ length: upTo }, (_, v) => v + 1).map((total) => {
    const name = [total, ...new Array<number>(bonds - 1).fill(0)].join(total > 9 ? "." : "");
    const level = (p: readonly number[], species: string) =>
      levelsUpTo(options, keys, p, total).find(
        ({ numbers, label }) => numbers.V === total && numbers.species === species && label.startsWith(name),
      )!.energy;
    return item(
      `splitting${total}`,
      bonds === 2 ? `${name}− less ${name}+` : `${name}${other} less ${name}A1`,
      (p) => level(p, other) - level(p, "A1"),
      total === 1 ? `${bonds === 2 ? "−2λ" : bonds === 3 ? "−3λ" : "−4λ"}` : null,
    );
  });
}

function unlike(options: ModelOptions, upTo: number): Consequence[] {
  return [
    ...apart(options, Math.max(2, upTo)),
    item("detuning", "ν̃(1.0) − ν̃(0.1) without coupling", ([w1, wx1, w2, wx2]) => w1! - 2 * wx1! - (w2! - 2 * wx2!)),
    item(
      "mixing",
      "share of the other bond in 1.0 and 0.1",
      ([w1, wx1, w2, wx2, lambda]) => {
        const gap = w1! - 2 * wx1! - (w2! - 2 * wx2!);
        return (1 - Math.abs(gap) / Math.hypot(gap, 2 * lambda!)) / 2;
      },
      null,
      "1",
    ),
    item(
      "shift",
      "shift of 1.0 and 0.1 by the coupling",
      ([w1, wx1, w2, wx2, lambda]) => {
        const gap = w1! - 2 * wx1! - (w2! - 2 * wx2!);
        return (Math.hypot(gap, 2 * lambda!) - Math.abs(gap)) / 2;
      },
      "what fitting the bonds apart takes into their constants",
    ),
  ];
}

/** ω̃ and ω̃x of each bond as its own levels v.0 and 0.v give them when the coupling is forgotten. */
function apart(options: ModelOptions, upTo: number): Consequence[] {
  return [0, 1].flatMap((bond) => {
    const constants = (p: readonly number[]) => {
      const levels = levelsUpTo(options, keysOf(options), p, upTo);
      const points = Array.from({ length: upTo }, (_, i) => i + 1).map((v) => {
        const { energy } = levels.find(({ label }) => label === (bond === 0 ? `${v}.0` : `0.${v}`))!;
        return [v, energy] as const;
      });
      return fitLocalMode(points)!;
    };
    return [
      item(
        `w${bond + 1}Apart`,
        `ω̃${bond + 1}, apart`,
        (p) => constants(p).w,
        bond === 0
          ? `from the levels v.0 and 0.v up to V = ${upTo} each fitted alone, as if the bonds were not coupled`
          : null,
      ),
      item(`wx${bond + 1}Apart`, `ω̃x${bond + 1}, apart`, (p) => constants(p).wx, null),
    ];
  });
}
