/** An option of the command line: declared here, read by the commands. */
export interface Flag {
  /** long name without dashes; the setting of that name */
  readonly name: string;
  readonly short?: string;
  /** placeholder of the value, or null for a switch */
  readonly value: string | null;
  readonly help: string;
  /** may stand there several times; the values are joined by commas */
  readonly repeats?: true;
}

/** How bands come in. */
export const bandFlags: readonly Flag[] = [
  {
    name: "series",
    value: '"P1 P2 …"',
    help: "consecutive overtones 1-0, 2-0, 3-0 …, split by spaces, commas or semicolons",
  },
  { name: "from", value: "V", help: "upper level of the first position of --series (default 1)" },
  {
    name: "bands",
    value: '"1-0 P, …"',
    help: 'labelled bands, such as "1-0 2885.98(2), 3-0 970.056 nm, 2-1 2782.0"; hot bands and spacings are just labels',
  },
  {
    name: "spacings",
    value: "KIND",
    help: "spacings (v+1 - v) were measured, or subtracted from measured positions (default measured)",
  },
  {
    name: "unit",
    value: "UNIT",
    help: "of positions: cm-1, nm, um, Hz, GHz, THz, meV, eV, kJ/mol, kcal/mol (default cm-1)",
  },
  { name: "medium", value: "MEDIUM", help: "of wavelengths: vacuum or air (default vacuum)" },
  { name: "air", value: '"T, P"', help: 'air other than standard air (15 °C, 101325 Pa), such as "25 C, 98 kPa"' },
  {
    name: "sigma",
    value: "U",
    help: "standard uncertainty of bands that carry none, in the unit of the bands or with its own, such as 0.1 nm",
  },
  {
    name: "sigma-means",
    value: "KIND",
    help: "what stated uncertainties are: standard, 2sigma, 95 or halfwidth (default standard)",
  },
  {
    name: "shared-sigma",
    value: "U",
    help: "calibration offset common to all bands, fully correlated, such as 0.02 or 0.01 nm",
  },
  {
    name: "group-sigma",
    value: '"NAME=U, …"',
    help: 'calibration errors of the groups of the column group: an offset or a scale, such as "fts=0.01, dye=0.02 nm, diode=2 ppm"',
  },
  {
    name: "groups",
    value: "KIND",
    help: "errors of groups: carried as correlated, or fitted: also show the shift of each (default carried)",
  },
  {
    name: "per-quantum-sigma",
    value: "U",
    help: "of maxima given as origins: standard uncertainty in cm-1 for every quantum, fully correlated",
  },
  {
    name: "laser",
    value: "NM",
    help: "Raman: positions are scattered wavelengths in nm, bands their shifts from this line, such as 532.0",
  },
  { name: "phase", value: "TEXT", help: "phase of the sample, kept with the bands" },
  { name: "format", value: "KIND", help: "of FILE: csv, tsv or toml (default by its name; csv for standard input)" },
];

/** What the bands belong to. */
export const moleculeFlags: readonly Flag[] = [
  { name: "bond", value: '"1H 35Cl"', help: "two isotopes (also H, D, T); gives force constant and Morse a" },
  { name: "reduced-mass", value: "U", help: "reduced mass in u, in place of --bond" },
  { name: "name", value: "TEXT", help: "what the output calls the oscillator" },
  { name: "be", value: "B", help: "rotational constant Be in cm-1, for Y00" },
  { name: "alpha-e", value: "A", help: "vibration-rotation constant αe in cm-1, for Y00" },
  { name: "accepted", value: "D0", help: "accepted D0 to compare with, such as 35759(5) or 4.4336 eV" },
  { name: "diatomic", value: null, help: "the bond is the whole molecule: also ΔH° of dissociation at 298.15 K" },
  { name: "accepted-enthalpy", value: "H", help: "accepted ΔH° at 298.15 K to compare with, such as 431.6(1) kJ/mol" },
  { name: "re", value: "R", help: "bond length re in Å, in place of --be (with a bond)" },
];

/** How the fit is made. */
export const fitFlags: readonly Flag[] = [
  {
    name: "model",
    value: "NAME",
    help: "oscillator (default); near-limit: levels close under the limit, v-0 above v = 0 of their own electronic state; coupled: equivalent or two unlike X-H bonds; polyad: a stretch and its bend",
  },
  { name: "bonds", value: "N", help: "coupled: 2, 3 or 4 equivalent bonds, or unlike for two different ones" },
  { name: "cross", value: null, help: "coupled: also fit the cross anharmonicity wxcross" },
  { name: "bend", value: "KIND", help: "polyad: degenerate or single bend (default degenerate)" },
  {
    name: "power",
    value: "N",
    help: "near-limit: n of the long-range potential D - Cn/r^n, 3 or more, such as 5 or 6",
  },
  { name: "cn", value: "C", help: "near-limit: Cn in cm-1 Å^n, such as 3.1e5 (default fitted; needs masses)" },
  { name: "limit", value: "D", help: "near-limit: the limit in cm-1 above v = 0, held (default fitted)" },
  {
    name: "terms",
    value: "N",
    help: "number of constants, 2 to 6, or auto: what the bands support (default auto when σ is known, else 2: Morse)",
  },
  {
    name: "fix",
    value: '"weye=0.22"',
    help: "hold constants; with an uncertainty, weye=0.22(1), it is one more observation",
  },
  {
    name: "modes",
    value: '"bend 1370, …"',
    help: "other modes in cm-1: combinations near the overtones are looked for",
  },
  { name: "window", value: "CM-1", help: "how far from an overtone they may lie (default 50)" },
  {
    name: "share",
    value: '"KEY …"',
    help: 'constants common to all series, such as wexe, or "wexe±0.5": alike to 0.5 cm-1',
  },
  {
    name: "compare",
    value: '"we=… wexe=…"',
    help: "constants from elsewhere: differences, with their significance (--correlation: of those constants)",
  },
  { name: "correlation", value: '"R12 …"', help: "of constants given, row by row above the diagonal" },
  {
    name: "excess",
    value: "KIND",
    help: "residuals larger than σ: add a scatter, multiply σ (birge), or none (default scatter)",
  },
  { name: "scatter", value: "U", help: "added scatter in cm-1, given instead of estimated" },
  { name: "robust", value: "KIND", help: "iteratively reweighted fit: tukey or huber" },
  { name: "intervals", value: "KIND", help: "linear, profile or resample (default linear)" },
  { name: "resamples", value: "N", help: "draws of --intervals resample (default 10000)" },
  { name: "seed", value: "N", help: "of the draws (default 1)" },
  { name: "coverage", value: "P", help: "another level of intervals beside 0.95, such as 0.99" },
  { name: "up-to", value: "V", help: "highest level to predict (default three beyond the last band)" },
  {
    name: "notation",
    value: "KIND",
    help: "equilibrium (ωe, ωexe) or local (ω̃, ω̃x) in text and figures (default equilibrium)",
  },
];

/** Every command has these. */
export const commonFlags: readonly Flag[] = [
  { name: "json", value: null, help: "print one JSON document" },
  { name: "quiet", short: "q", value: null, help: "fewer messages" },
  { name: "no-color", value: null, help: "plain text (also by NO_COLOR)" },
  { name: "debug", value: null, help: "show a trace when something fails inside" },
];

export const reportFlags: readonly Flag[] = [
  { name: "out", short: "o", value: "DIR", help: "folder to write (required); made anew" },
  { name: "force", short: "f", value: null, help: "replace an existing report in DIR" },
  { name: "width", value: "MM", help: "width of the figures: 85 or 171 (default 85)" },
];

export const predictFlags: readonly Flag[] = [
  {
    name: "constants",
    value: '"we=… wexe=…"',
    help: "constants in place of bands, such as we=2990.95(1) wexe=52.82(1)",
  },
  { name: "predict-bond", value: '"O D"', help: "coupled: the same bonds with another isotope, by mass scaling" },
  { name: "hot", value: "V", help: "also bands that start from levels up to V (default 0)" },
];

export const convertFlags: readonly Flag[] = [
  {
    name: "to",
    value: "UNIT|FORM",
    help: "unit wanted, or form of constants: equilibrium, local, polynomial, position-plot, spacing-plot (required)",
  },
  {
    name: "constants",
    value: '"we=… wexe=…"',
    help: "constants in place of positions; keys say the form: we …, w …, c1 …, a0 … or b0 …",
  },
  { name: "correlation", value: '"R12 …"', help: "of those constants, row by row above the diagonal" },
  { name: "to-medium", value: "MEDIUM", help: "of wavelengths wanted: vacuum or air (default vacuum)" },
  ...bandFlags.filter(({ name }) => ["unit", "medium", "air", "sigma"].includes(name)),
];

export const assignFlags: readonly Flag[] = [
  { name: "peaks", value: '"P1 P2 …"', help: "positions without labels, split by spaces, commas or newlines" },
  { name: "ladders", value: "N", help: "1, or 2 for two kinds of bonds (default 1)" },
  {
    name: "limits",
    value: '"…"',
    help: 'what is plausible (default "omega=500..4500 ratio=0.002..0.04", ω in cm-1 and ωx/ω)',
  },
  { name: "expect", value: '"1-0 2900..3100"', help: "levels known to lie in a range, cm-1" },
  { name: "up-to", value: "V", help: "highest level looked for (default 10)" },
  ...bandFlags.filter(({ name }) =>
    ["unit", "medium", "air", "sigma", "sigma-means", "laser", "format"].includes(name),
  ),
];

export const planFlags: readonly Flag[] = [
  { name: "constants", value: '"we=… wexe=…"', help: "constants in place of bands (also FILE.json of a report)" },
  { name: "aim", value: "WHAT", help: "what is to become better known: we, wexe, weye, d0, prediction:7-0 or model" },
  {
    name: "sigma-new",
    value: "U",
    help: "standard uncertainty of the new band, 0.02 or 0.01 nm (default the median stated)",
  },
  {
    name: "window",
    value: '"600..900 nm"',
    help: "where lasers and detectors reach, vacuum; several by commas or repeated (default everywhere)",
    repeats: true,
  },
  { name: "hot", value: "V", help: "also bands that start from levels up to V (default 0)" },
];
