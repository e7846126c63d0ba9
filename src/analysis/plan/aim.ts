import type { Quantity } from "../../quantity/index.ts";
import { boundLevel } from "../bound-level.ts";
import { morseDe } from "../dissociation/morse.ts";
import { labelsWithin } from "../near-limit/levels.ts";
import { addScaled, propagate } from "../propagation.ts";
import { type Basis, planFault } from "./basis.ts";
import type { Aim } from "./types.ts";

/** An aim as it is known now, with its derivatives by the constants. */
export interface AimNow {
  readonly text: string;
  readonly quantity: Quantity;
  readonly gradient: readonly number[];
}

/** @throws InputError exit 2 for an aim the model cannot have */
export function aimOf(basis: Basis, aim: Aim): AimNow {
  switch (aim.kind) {
    case "constant":
      return constantAim(basis, aim.key, aim.key);
    case "model":
      return constantAim(basis, basis.keys.at(-1)!, "model");
    case "d0":
      return limitAim(basis);
    case "prediction":
      return predictionAim(basis, aim.label);
  }
}

const improvable = ({ keys, options }: Basis) => keys.filter((key) => options.fixed[key]?.sigma !== null);

function constantAim(basis: Basis, key: string, text: string): AimNow {
  const { model, keys, by, options, values } = basis;
  if (!improvable(basis).includes(key))
    throw planFault(
      basis,
      "aim",
      `this fit has no constant "${key}" to be improved`,
      `aim at ${improvable(basis).join(", ")}, d0${model.terms === null ? " or prediction:7-0" : ", prediction:7-0 or model; or fit more --terms"}`,
      2,
    );
  const at = keys.indexOf(key);
  const gradient = values.map((_, k) => Number(k === at));
  const { unit } = model.prepare([], options).parameters[at]!;
  return { text, quantity: propagate(values[at]!, gradient, unit, by), gradient };
}

/** D0 as the first row of the dissociation table has it: the Morse relation, or the limit that is a constant. */
function limitAim(basis: Basis): AimNow {
  const { model, keys, by, values } = basis;
  if (model.limit !== undefined) return constantAim(basis, keys[model.limit.energy]!, "d0");
  const well = model.well?.(values);
  const de = well === undefined ? null : morseDe(well, values);
  if (well === undefined || de === null)
    throw planFault(
      basis,
      "aim",
      "no dissociation energy follows from this fit: the spacings do not shrink",
      `aim at ${improvable(basis).join(", ")} or prediction:7-0`,
      2,
    );
  const gradient = addScaled(de.gradient, well.termGradient(0), -1);
  return { text: "d0", quantity: propagate(de.value - well.term(0), gradient, "cm-1", by), gradient };
}

function predictionAim(basis: Basis, label: string): AimNow {
  const { model, by, options, used, values } = basis;
  const highest = boundLevel(model, values);
  const refuse = (what: string, mend: string) => planFault(basis, "aim", what, mend, 2);
  if (highest !== null && model.levels(label).upper > highest)
    throw refuse(
      `${label} does not exist by these constants: the highest bound level is v = ${highest}`,
      `aim at a prediction up to ${highest}-0`,
    );
  if (model.limit !== undefined && labelsWithin([label], used, model, options, values).length === 0)
    throw refuse(
      `${label} lies below the levels for which ${model.title} was fitted`,
      "aim at a band of a higher level",
    );
  const { calculated, jacobian } = model.prepare([{ label, isotopologue: null }], options).evaluate(values);
  return {
    text: `prediction:${label}`,
    quantity: propagate(calculated[0]!, jacobian[0]!, "cm-1", by),
    gradient: jacobian[0]!,
  };
}
