import type { Scalar } from "../fitting/index.ts";
import type { Manifold, Well } from "../models/index.ts";
import { differences } from "./differences.ts";
import { morseDe } from "./dissociation/morse.ts";
import { addScaled } from "./propagation.ts";
import type { Solution } from "./solution.ts";

/** One of the constants. */
export function coordinate(at: number, size: number): Scalar {
  const gradient = Array.from({ length: size }, (_, k) => Number(k === at));
  return { value: (p) => p[at]!, gradient: () => gradient };
}

/** De or D0 of a well by the Morse relation. */
export function morseScalar(well: (p: readonly number[]) => Well, fromGround: boolean): Scalar {
  return {
    value: (p) => {
      const de = morseDe(well(p), p);
      return de === null ? Number.NaN : de.value - (fromGround ? well(p).term(0) : 0);
    },
    gradient: (p) => {
      const de = morseDe(well(p), p);
      if (de === null) return p.map(() => Number.NaN);
      return fromGround ? addScaled(de.gradient, well(p).termGradient(0), -1) : de.gradient;
    },
  };
}

/** A position. */
export function positionScalar({ model, options }: Solution, label: string): Scalar {
  const { evaluate } = model.prepare([{ label, isotopologue: null }], options);
  return { value: (p) => evaluate(p).calculated[0]!, gradient: (p) => evaluate(p).jacobian[0]! };
}

/** De or D0 of an oscillator inside a model whose states mix. */
export function innerMorse(manifold: Manifold, at: number, fromGround: boolean): Scalar {
  const value = (p: readonly number[]) => {
    const { omega, omegaX } = manifold.oscillators(p)[at]!;
    if (!(omega > 0 && omegaX > 0)) return Number.NaN;
    return omega ** 2 / (4 * omegaX) - (fromGround ? omega / 2 - omegaX / 4 : 0);
  };
  return { value, gradient: (p) => differences(value, p) };
}
