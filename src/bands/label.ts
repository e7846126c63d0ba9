import type { Fault } from "../messages/index.ts";
import type { Band } from "./series.ts";

/** Upper and lower level of a label v'-v". */
export interface Levels {
  readonly upper: number;
  readonly lower: number;
}

const remembered = new Map<string, Levels | null>();

/** Read v'-v", such as 3-0 (any dash, spaces around it); null for anything else. The order of the levels is not checked. */
export function readVibrationalLabel(label: string): Levels | null {
  // The same few labels are asked for again and again in every fit.
  let levels = remembered.get(label);
  if (levels === undefined) {
    levels = parse(label);
    if (remembered.size > 1000) remembered.clear();
    remembered.set(label, levels);
  }
  return levels;
}

function parse(label: string): Levels | null {
  const [, upper, lower] = /^(\d{1,3})-(\d{1,3})$/.exec(canonicalLabel(label)) ?? [];
  return upper === undefined || lower === undefined ? null : { upper: Number(upper), lower: Number(lower) };
}

/** One form for a label: any dash or minus as hyphen, single spaces, none around the hyphen of v'-v", `2_1` for `2.0_1:0`. */
export function canonicalLabel(label: string): string {
  const tidy = label
    .trim()
    .replace(/[−‐‑–—]/g, "-")
    .replace(/\s+/g, " ");
  const [, upper, lower] = /^v?\s*0*(\d+) ?- ?0*(\d+)$/.exec(tidy) ?? [];
  if (upper !== undefined) return `${upper}-${lower}`;
  const [, polyad, place, l] = /^(\d+(?:\.\d+)?) ?_ ?(\d+)(?: ?: ?(\d+))?$/.exec(tidy) ?? [];
  if (polyad === undefined) return tidy;
  // A half N without l is a fault of its own, which :0 must not hide.
  const ending = l === undefined || (Number(l) === 0 && Number.isInteger(Number(polyad))) ? "" : `:${Number(l)}`;
  return `${Number(polyad)}_${Number(place)}${ending}`;
}

/** A label that another model would understand. */
function ofAnotherModel(label: string): string {
  if (/^\d{2,4}([+-]|[ABEF]\d?)?(#\d+)?$/.test(label))
    return "; levels of coupled bonds want --model coupled --bonds 2 (or 3, 4)";
  return /^[\d.]+_\d+(:\d+)?$/.test(label) ? "; levels of a polyad want --model polyad" : "";
}

/** What is wrong with a band whose label must be v'-v" with v' > v"; null when nothing is. */
export function vibrationalLabelFault({ label, place }: Band): Fault | null {
  const levels = readVibrationalLabel(label);
  const at = { ...place, column: place.column ?? "band" };
  if (levels === null)
    return {
      code: "label",
      place: at,
      what: `"${label}" is not a label`,
      mend: `write v'-v", such as 1-0, 3-0 or 2-1${ofAnotherModel(label)}`,
    };
  if (levels.upper > levels.lower) return null;
  return {
    code: "upper-not-above-lower",
    place: at,
    what: `in "${label}" the upper level does not lie above the lower one`,
    mend:
      levels.upper === levels.lower
        ? "write two different levels, such as 2-1"
        : `write ${levels.lower}-${levels.upper}`,
  };
}
