import { readMeasurement } from "../quantity/index.ts";
import { type Context, isWrong } from "./context.ts";
import { type Footing, type Placed, placePosition, rate, type Wrong } from "./conversion.ts";
import type { ColumnName, RawRow } from "./raw.ts";
import { stokesFault } from "./stokes.ts";
import { separate, type TwoLevels } from "./two-levels.ts";

/**
 * The columns `companion` and `ratio` of a row, and the band as they correct it: null where the row has neither, or after what is wrong
 * was said by `wrong`. The companion is read as the position is (unit, medium, exciting line); `sigma` of the band in cm-1.
 */
export function readCompanion(
  { companion: where, ratio: share }: RawRow["cells"],
  position: Placed,
  sigma: number | null,
  footing: Footing,
  { laser, meaning, subtracted }: Context,
  wrong: (column: ColumnName, wrong: Wrong) => null,
): TwoLevels | null {
  if (where === undefined && share === undefined) return null;
  const companion = where === undefined ? null : placePosition(where, footing);
  const ratio = share === undefined ? null : ratioFrom(share);
  if (companion !== null && isWrong(companion)) wrong("companion", companion);
  if (ratio !== null && isWrong(ratio)) wrong("ratio", ratio);
  if (companion !== null && !isWrong(companion) && companion.wavenumber === position.wavenumber)
    return wrong("companion", {
      code: "companion-equals-band",
      what: "the companion stands where the band stands",
      mend: "give the position of the weaker band of the pair",
    });
  if (companion === null || ratio === null) return wrong(...halfGiven(companion === null));
  if (isWrong(companion) || isWrong(ratio)) return null;
  const beyondLaser = laser === null ? null : stokesFault(footing.unit, companion, laser);
  if (beyondLaser !== null) return wrong("companion", beyondLaser);
  if (subtracted)
    return wrong("companion", {
      code: "companion-of-subtracted",
      what: "a companion corrects a position, but spacings were subtracted from positions",
      mend: "give the positions themselves (1-0, 2-0 …) without --spacings subtracted",
    });
  /** A wavenumber as measured, as the position of a band. */
  const shift = (wavenumber: number) => (laser === null ? wavenumber : laser.wavenumber - wavenumber);
  const standard = (stated: Placed["stated"]) =>
    stated === null ? null : stated.value * (stated.expanded ? meaning : 1);
  const companionSigma = standard(companion.stated);
  return {
    ...separate({
      band: shift(position.wavenumber),
      bandSigma: sigma,
      companion: shift(companion.wavenumber),
      companionSigma:
        companionSigma === null ? null : companionSigma * Math.abs(rate(companion.wavenumber, footing.unit, footing)),
      ratio: ratio.value,
      ratioSigma: standard(ratio.stated),
    }),
    asRead: { companion: where!, ratio: share! },
  };
}

/** One of the two columns without the other; the fault stands at the one that is missing. */
function halfGiven(noCompanion: boolean): [ColumnName, Wrong] {
  return noCompanion
    ? [
        "companion",
        {
          code: "ratio-without-companion",
          what: "a ratio of intensities is given, but no companion",
          mend: "write the position of the companion in the column companion, or leave the ratio out",
        },
      ]
    : [
        "ratio",
        {
          code: "companion-without-ratio",
          what: "a companion is given, but not the ratio of intensities",
          mend: "write band over companion in the column ratio, such as 6.7 or 6.7(3), or leave the companion out",
        },
      ];
}

function ratioFrom(text: string): { value: number; stated: Placed["stated"] } | Wrong {
  const read = readMeasurement(text);
  if (read.ok && read.value > 0)
    return {
      value: read.value,
      stated: read.sigma === null ? null : { value: read.sigma, expanded: !text.includes("(") },
    };
  return {
    code: "ratio",
    what: `"${text}" is not a positive intensity ratio`,
    mend: "write intensity of the band over that of its companion, such as 6.7 or 6.7(3)",
  };
}
