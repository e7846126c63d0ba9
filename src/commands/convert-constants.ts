import { changeForm, type FitDocument, type Form, forms } from "../analysis/index.ts";
import { type Fault, InputError, nearest, type Warning } from "../messages/index.ts";
import { interval, type Quantity, readMeasurement } from "../quantity/index.ts";
import { readAssignments } from "./assignments.ts";
import { readCorrelation } from "./correlation.ts";
import { tool } from "./tool.ts";

/** What `convert` may be told about constants. */
export interface ConvertConstantsRequest {
  /** such as "we=2990.95(1) wexe=52.82(1)"; the keys say the form: we …, w …, c1 …, a0 …, b0 … */
  readonly constants?: string;
  /** correlations of those, row by row: r12, or r12 r13 r23 */
  readonly correlation?: string | number;
  /** text of a result.json, in place of `constants` */
  readonly stored?: { readonly text: string; readonly source: string };
  /** form wanted: equilibrium, local, polynomial, position-plot or spacing-plot */
  readonly to: string;
}

/** Constants in another form. */
export interface ConvertedConstants {
  readonly name: string | null;
  readonly from: string;
  readonly to: string;
  readonly constants: Readonly<Record<string, Quantity>>;
  readonly correlation: { readonly order: readonly string[]; readonly matrix: readonly (readonly number[])[] } | null;
  readonly covariance: readonly (readonly number[])[] | null;
}

/** The document of `convert` with constants. */
export interface ConvertConstantsDocument {
  readonly schemaVersion: 1;
  readonly tool: { readonly name: string; readonly version: string };
  readonly constants: readonly ConvertedConstants[];
  readonly warnings: readonly Warning[];
}

/** Names `--to` takes for constants. */
export const formNames: readonly string[] = forms.map(({ name }) => name);

/**
 * Constants of an oscillator from one form to another, with their covariance.
 * @throws InputError exit 2 for constants of no form, of two, or with one left out
 */
export function convertConstants({
  constants,
  correlation,
  stored,
  to,
}: ConvertConstantsRequest): ConvertConstantsDocument {
  const target = forms.find(({ name }) => name === to.trim().toLowerCase());
  if (target === undefined) {
    const guess = nearest(to, formNames);
    throw fault(
      "--to",
      "unknown-form",
      `"${to}" is no form of constants${guess === null ? "" : ` (did you mean ${guess}?)`}`,
      `write one of ${formNames.join(", ")}`,
    );
  }
  if (stored !== undefined && correlation !== undefined)
    throw fault(
      "--correlation",
      "correlation-alone",
      "a result.json carries the correlations of its constants",
      "leave it out, or give --constants",
    );
  const sources = stored === undefined ? [fromText(constants ?? "", correlation)] : fromStored(stored);
  return {
    schemaVersion: 1,
    tool,
    constants: sources.map((source) => converted(source, target)),
    warnings:
      stored === undefined && correlation === undefined && sources[0]!.covariance !== null
        ? [
            {
              code: "constants-uncorrelated",
              message:
                "the constants are taken as uncorrelated: fitted ones are strongly correlated, so the uncertainties here are rough; give --correlation, or convert a result.json",
            },
          ]
        : [],
  };
}

interface Source {
  readonly name: string | null;
  readonly form: Form;
  readonly values: readonly number[];
  readonly covariance: readonly (readonly number[])[] | null;
  /** of Student's t; null: normal */
  readonly degreesOfFreedom: number | null;
}

function converted({ name, form, values, covariance, degreesOfFreedom }: Source, target: Form): ConvertedConstants {
  const changed = changeForm(values, covariance, form, target);
  const keys = target.keys.slice(0, values.length);
  const u = changed.covariance?.map((row, k) => Math.sqrt(Math.max(0, row[k]!))) ?? null;
  return {
    name,
    from: form.name,
    to: target.name,
    constants: Object.fromEntries(
      keys.map((key, k) => [
        key,
        {
          value: changed.values[k]!,
          standardUncertainty: u?.[k] ?? null,
          interval95: u === null ? null : interval(changed.values[k]!, u[k]!, 0.95, degreesOfFreedom),
          unit: "cm-1",
        },
      ]),
    ),
    correlation:
      changed.covariance === null || u!.some((x) => x === 0)
        ? null
        : {
            order: keys,
            matrix: changed.covariance.map((row, i) => row.map((c, j) => (i === j ? 1 : c / (u![i]! * u![j]!)))),
          },
    covariance: changed.covariance,
  };
}

const fault = (source: string, code: string, what: string, mend: string) =>
  new InputError([{ code, place: { source }, what, mend }]);

const ALIASES: Readonly<Record<string, string>> = { intercept: "a0", slope: "a1" };

function fromText(text: string, correlation: string | number | undefined): Source {
  const faults: Fault[] = [];
  const wrong = (what: string, mend: string) =>
    faults.push({ code: "constants", place: { source: "--constants" }, what, mend });
  const given = new Map<string, { value: number; sigma: number | null }>();
  for (const { key, value } of readAssignments(text)) {
    const name = ALIASES[key.toLowerCase()] ?? key.toLowerCase();
    const read = readMeasurement(value ?? "");
    if (!read.ok) wrong(`"${key}" has no number`, `write ${key}=52.8 or ${key}=52.8(1)`);
    else if (given.has(name)) wrong(`"${key}" stands there twice`, "name each constant once");
    else given.set(name, read);
  }
  const form = forms.find(({ keys }) => [...given.keys()].every((key) => keys.includes(key)));
  if (faults.length === 0 && (given.size === 0 || form === undefined))
    wrong(
      given.size === 0 ? "there are no constants" : `${[...given.keys()].join(", ")} do not belong to one form`,
      `write those of one: ${forms.map(({ name, keys }) => `${keys[0]} ${keys[1]} … (${name})`).join(", ")}`,
    );
  const keys = form?.keys.slice(0, given.size) ?? [];
  const missing = keys.filter((key) => !given.has(key));
  if (faults.length === 0 && missing.length > 0)
    wrong(
      `${missing.join(" and ")} ${missing.length > 1 ? "are" : "is"} missing`,
      `give ${keys.join(", ")}, 0 where one is not in the model`,
    );
  if (faults.length > 0) throw new InputError(faults);
  const sigmas = keys.map((key) => given.get(key)!.sigma);
  const known = sigmas.some((sigma) => sigma !== null);
  const r = readCorrelation(correlation, keys.length);
  if (r !== null && !known)
    throw fault(
      "--correlation",
      "correlation-without-uncertainty",
      "the constants carry no uncertainties",
      "write them as in we=2990.95(1)",
    );
  return {
    name: null,
    form: form!,
    values: keys.map((key) => given.get(key)!.value),
    covariance: known
      ? sigmas.map((a, i) => sigmas.map((b, j) => (r?.[i]?.[j] ?? Number(i === j)) * (a ?? 0) * (b ?? 0)))
      : null,
    degreesOfFreedom: null,
  };
}

function fromStored({ text, source }: { readonly text: string; readonly source: string }): Source[] {
  const none = (what: string) =>
    fault(source, "not-a-result", what, "name the result.json of a report, or the output of rungwise fit --json");
  let document: Partial<FitDocument>;
  try {
    document = JSON.parse(text);
  } catch {
    throw none("is not JSON");
  }
  if (!Array.isArray(document?.series) || document.series.length === 0) throw none("holds no result of fit");
  return document.series.map(({ name, constants = {}, correlation, covariance, quality }) => {
    const keys = Object.keys(constants);
    if (keys.length < 2 || !keys.every((key, k) => forms[0]!.keys[k] === key))
      throw none(`series "${name}" holds no constants of a single oscillator`);
    const at = keys.map((key) => correlation?.order.indexOf(key) ?? -1);
    return {
      name,
      form: forms[0]!,
      values: keys.map((key) => constants[key]!.value),
      covariance:
        covariance === null || covariance === undefined
          ? null
          : at.map((i) => at.map((j) => (i < 0 || j < 0 ? 0 : covariance[i]![j]!))),
      degreesOfFreedom: quality?.intervalDegreesOfFreedom ?? null,
    };
  });
}
