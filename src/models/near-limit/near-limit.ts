import { readVibrationalLabel } from "../../bands/index.ts";
import type { Prepared } from "../../fitting/index.ts";
import type { Model, ModelOptions, Transition } from "../model.ts";
import { constants, parametersOf, slopeOf, thirdOf } from "./constants.ts";
import { nearLimitFaults } from "./faults.ts";
import { binding, exponentText } from "./law.ts";
import { lawStarts, linkedEnergies } from "./starts.ts";

/** LeRoy & Bernstein (1970), abstract (READ): at least four levels near the limit are needed. */
const LEAST_LEVELS = 4;

/**
 * The last levels under a dissociation limit, D - E(v) = [H_n·(v_D-v)]^(2n/(n-2)) with H_n = K_n·(n-2)/2n (LeRoy & Bernstein 1970), for a
 * potential that ends as D - C_n/rⁿ. Energies count from v = 0 of the same state: a band v'-0 lies at E(v'), one between two excited levels at
 * E(v') - E(v"). Of an excited electronic state give T(v') - T(0) labelled v'-0; counted from another zero, D counts from it too.
 */
export const nearLimit: Model = {
  name: "near-limit",
  title: "the law for levels close under the dissociation limit",
  labelForm: `v'-0, such as 43-0, or v'-v" with v' > v"`,
  references: ["lerouybernstein1970"],
  terms: null,
  constants,
  settings: { required: ["power"], constants: { cn: "cn", limit: "d" } },
  check: nearLimitFaults,
  prepare: (transitions, options) => prepared(transitions, options, false),
  starts(transitions, observed, options) {
    const links = transitions.map(({ label }, i) => ({ ...levels(label), position: observed[i]! }));
    const given = (key: string) => options.fixed[key]?.value ?? null;
    const third = given(options.reducedMass == null ? "hn" : "cn");
    const start = lawStarts(linkedEnergies(links), options.power!, {
      d: given("d"),
      vd: given("vd"),
      hn: third === null ? null : slopeOf(third, options).hn,
    });
    return start === null ? null : [start[0], start[1], third ?? thirdOf(start[2], options)];
  },
  labels: (upTo) => Array.from({ length: upTo }, (_, v) => `${v + 1}-0`),
  levels,
  limit: {
    leastLevels: LEAST_LEVELS,
    energy: 0,
    level: 1,
    slope: 2,
    line: ({ power }) => `(D-E)^(${exponentText(power!)})`,
    bent: (transitions, options) => prepared(transitions, options, true),
  },
};

function levels(label: string): { upper: number; lower: number } {
  const read = readVibrationalLabel(label);
  if (read === null) throw new RangeError(`not a label: ${label}`);
  return read;
}

/** With `bend`, a fourth constant lets the line (D-E)^((n-2)/2n) against v curve. */
function prepared(transitions: readonly Transition[], options: ModelOptions, bend: boolean): Prepared {
  const power = options.power!;
  const pairs = transitions.map(({ label }) => levels(label));
  const bent = { key: "bend", symbol: "bend", unit: "1", start: 0, typical: 1e-3 };
  return {
    parameters: bend ? [...parametersOf(options), bent] : parametersOf(options),
    linear: false,
    evaluate(p) {
      const { hn, derivative } = slopeOf(p[2]!, options);
      /** E(v) and its derivatives by the constants. */
      const term = (v: number) => {
        // The energies count from v = 0, which lies far below where the law holds.
        if (v === 0) return { energy: 0, row: [0, 0, 0, 0] };
        const { value, byVd, byHn, byBend } = binding(power, p[1]!, hn, p[3] ?? 0, v);
        return { energy: p[0]! - value, row: [1, -byVd, -byHn * derivative, -byBend] };
      };
      const both = pairs.map(({ upper, lower }) => [term(upper), term(lower)] as const);
      return {
        calculated: both.map(([high, low]) => high.energy - low.energy),
        jacobian: both.map(([high, low]) => high.row.slice(0, p.length).map((x, k) => x - low.row[k]!)),
      };
    },
  };
}
