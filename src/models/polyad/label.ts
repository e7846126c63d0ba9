import { sizeOf } from "./blocks.ts";

/** A level: polyad number, place from the highest down, angular momentum of the bend. */
export interface PolyadLevel {
  readonly n: number;
  readonly j: number;
  readonly l: number;
}

type Wrong = { readonly what: string; readonly mend: string };

/** Highest N: beyond it no such polyad is known, and the levels are many. */
export const MOST = 15;

/** Read `2_1`, `1.5_1:1`; what is wrong comes back with what to write. */
export function readLabel(label: string, single: boolean): PolyadLevel | Wrong {
  const [, nText, jText, lText] = /^(\d+(?:\.\d+)?)\s*_\s*(\d+)(?:\s*:\s*(\d+))?$/.exec(label.trim()) ?? [];
  if (nText === undefined)
    return {
      what: `"${label}" is not the label of a polyad level`,
      mend: "write N_j, such as 2_1 (the highest level of N = 2), or N_j:l, such as 1.5_1:1",
    };
  const [n, j] = [Number(nText), Number(jText)];
  if (!Number.isInteger(2 * n))
    return { what: `N = ${n} is neither whole nor half`, mend: "N is v_s + v_b/2: write 1, 1.5, 2 and so on" };
  if (n === 0 || n > MOST) return { what: `N = ${n} is not possible`, mend: `write N from 0.5 to ${MOST}` };
  const odd = (2 * n) % 2 === 1;
  const l = lText === undefined ? (odd && !single ? 1 : 0) : Number(lText);
  if (single && l !== 0) return { what: `a single bend has no angular momentum l = ${l}`, mend: `write ${n}_${j}` };
  if (!single && lText === undefined && odd)
    return { what: `"${label}" names no l`, mend: `with N = ${n}, l is odd: write ${n}_${j}:1` };
  if (!single && (l % 2 === 1) !== odd)
    return {
      what: `l = ${l} does not go with N = ${n}`,
      mend: `l has the parity of v_b: ${odd ? "1, 3 …" : "0, 2 …"}`,
    };
  if (l > 2 * n) return { what: `l = ${l} lies above the highest v_b = ${2 * n}`, mend: `write l up to ${2 * n}` };
  const size = sizeOf(n, l);
  if (j < 1 || j > size)
    return {
      what: `there is no level ${j} among the ${size} of N = ${n}, l = ${l}`,
      mend: `write j from 1 (the highest) to ${size}`,
    };
  return { n, j, l };
}

/** `2_1`, or `1.5_1:1` where l is not 0. */
export const labelOf = ({ n, j, l }: PolyadLevel) => `${n}_${j}${l === 0 ? "" : `:${l}`}`;
