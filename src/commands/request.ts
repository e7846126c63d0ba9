import type { Setting, Settings } from "../bands/index.ts";

/** The text of a band file. `source` is what messages call it. */
export interface InputText {
  readonly text: string;
  readonly source: string;
  readonly format: "csv" | "tsv" | "toml";
}

/** A setting as a program may give it; text is read exactly as on the command line. */
type Word = string | number;

/** What `fit` and its relatives may be told: the flags of the command in camel case, and the text of a file. Flags beat the file. */
export interface FitRequest {
  readonly input?: InputText;
  /** consecutive overtones 1-0, 2-0 …, such as "2885.98 5667.98 8346.78" */
  readonly series?: string;
  /** upper level of the first of `series`; @default 1 */
  readonly from?: Word;
  /** labelled bands, such as "1-0 2885.98(2), 3-0 8346.78(5), 2-1 2782.0" */
  readonly bands?: string;
  /** @default "measured" */
  readonly spacings?: "measured" | "subtracted";
  /** @default "cm-1" */
  readonly unit?: string;
  /** @default "vacuum" */
  readonly medium?: "vacuum" | "air";
  /** other than standard air, such as "25 C, 98 kPa" */
  readonly air?: string;
  /** standard uncertainty of bands that carry none */
  readonly sigma?: Word;
  /** @default "standard" */
  readonly sigmaMeans?: string;
  /** a calibration offset common to all bands, fully correlated */
  readonly sharedSigma?: Word;
  /** calibration errors of the groups of the column `group`, such as "fts=0.01, dye=0.02 nm, diode=2 ppm" */
  readonly groupSigma?: string;
  /** whether the shift of each group is shown ("fitted") or only carried as a correlated error; @default "carried" */
  readonly groups?: string;
  /** standard uncertainty a quantum, correlated and growing with v, of maxima given as origins; cm-1 */
  readonly perQuantumSigma?: Word;
  /** Raman: positions are scattered wavelengths; wavelength of the exciting line in nm */
  readonly laser?: Word;
  readonly bond?: string;
  /** u */
  readonly reducedMass?: Word;
  readonly name?: string;
  /** @default "oscillator" */
  readonly model?: string;
  /** number of constants, 2 to 6, or "auto"; @default auto when σ is known and a degree of freedom is left, else 2 */
  readonly terms?: Word;
  /** of model "near-limit": n of the long-range potential -C_n/rⁿ, 3 or more */
  readonly power?: Word;
  /** of model "near-limit": C_n in cm-1 Åⁿ, such as 3.1e5; with an uncertainty one more observation; @default fitted */
  readonly cn?: Word;
  /** of model "near-limit": the limit in cm-1 above v = 0, held; with an uncertainty one more observation; @default fitted */
  readonly limit?: Word;
  /** of model "coupled": 2, 3 or 4 equivalent bonds, or "unlike" for two different ones */
  readonly bonds?: Word;
  /** of model "coupled": also fit the cross anharmonicity wxcross; @default no */
  readonly cross?: boolean | string;
  /** of model "polyad": a "degenerate" or a "single" bend; @default "degenerate" */
  readonly bend?: string;
  /** constants held, such as "weye=0.22"; with an uncertainty one more observation */
  readonly fix?: string;
  /** other modes of the molecule to look for resonances with, such as "bend 1370, rock 1020(5)" cm-1 */
  readonly modes?: string;
  /** how far from an overtone a combination may lie, cm-1; @default 50 */
  readonly window?: Word;
  /** constants common to all series, "wexe" or "wexe weye", or alike within a standard deviation, "wexe±0.5" */
  readonly share?: string;
  /** constants from elsewhere to compare with, such as "we=2990.9463(5) wexe=52.8186(9)" */
  readonly compare?: string;
  /** correlations of the constants of `compare`, row by row above the diagonal */
  readonly correlation?: Word;
  /** rotational constants in cm-1, bond length in Å */
  readonly be?: Word;
  readonly alphaE?: Word;
  readonly re?: Word;
  /** an accepted D0 to compare with, such as "35759(5)" cm-1 or "4.4336 eV" */
  readonly accepted?: Word;
  /** the bond is the whole molecule: also ΔH°(298.15 K) of dissociation; @default no */
  readonly diatomic?: boolean | string;
  /** an accepted ΔH°(298.15 K) to compare with, such as "431.6(1)" kJ/mol */
  readonly acceptedEnthalpy?: Word;
  /** @default "scatter" */
  readonly excess?: string;
  /** a given scatter τ in cm-1 */
  readonly scatter?: Word;
  /** another level of intervals, such as 0.99 */
  readonly coverage?: Word;
  /** iteratively reweighted least squares: "tukey" or "huber"; @default none */
  readonly robust?: string;
  /** how intervals are found; @default "linear" */
  readonly intervals?: string;
  /** draws of `intervals: "resample"`; @default 10000 */
  readonly resamples?: Word;
  /** of the draws; @default 1 */
  readonly seed?: Word;
  /** @default "equilibrium" */
  readonly notation?: string;
  /** highest level to predict; @default three beyond the last band */
  readonly upTo?: Word;
  /** phase of all bands */
  readonly phase?: string;
}

/** From `sharedSigma` to `shared-sigma`. */
export const flagName = (key: string) => key.replace(/[A-Z]/g, (letter) => `-${letter.toLowerCase()}`);

/** The settings of a request as a file would hold them; their place is the flag. */
export function requestSettings(request: object): Settings {
  const settings = new Map<string, Setting>();
  for (const [key, value] of Object.entries(request)) {
    if (typeof value !== "string" && typeof value !== "number" && typeof value !== "boolean") continue;
    const name = flagName(key);
    const text = typeof value === "boolean" ? (value ? "yes" : "no") : String(value);
    settings.set(name, { value: text, place: { source: `--${name}` } });
  }
  return settings;
}
