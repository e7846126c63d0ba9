import type { FitDocument } from "../../src/analysis/index.ts";
import { fit } from "../../src/commands/fit.ts";
import type { Notation } from "../../src/models/index.ts";
import { oscillator } from "../../src/models/oscillator.ts";
import { constantSymbols } from "../../src/reporting/index.ts";

/** Invented: two bonds of an unnamed molecule, wavelengths in air among the positions, one band left out. */
const twoBonds = `band,position,unit,medium,series,use,note
1-0,3599.83(3),cm-1,vacuum,a,,
2-0,7034.69(5),cm-1,vacuum,a,,
2-1,3434.73(8),cm-1,vacuum,a,,
3-0,970.056(10),nm,air,a,,
4-0,745.286(10),nm,air,a,,
5-0,611.031(10),nm,air,a,,
6-0,522.111(15),nm,air,a,,
1-0,3527.37(3),cm-1,vacuum,b,,
2-0,6881.26(5),cm-1,vacuum,b,,
3-0,993.985(10),nm,air,b,no,"meets a dark state | see <scan 20240611>, #2"
4-0,764.998(10),nm,air,b,,
5-0,628.716(10),nm,air,b,,
`;

export const symbols = (notation: Notation = "equilibrium") => constantSymbols(oscillator.constants, notation);

const bonds = { input: { text: twoBonds, source: "bonds.csv", format: "csv" }, bond: "16O 1H" } as const;

/** Two series with σ, three terms. */
export const sideBySide = (): Promise<FitDocument> => fit({ ...bonds, terms: 3 });

/** The same with numbers of terms compared and a further level of intervals. */
export const compared = (): Promise<FitDocument> => fit({ ...bonds, terms: "auto", coverage: 0.99 });

/** HCl, three bands without σ (band origins from memory); one degree of freedom. */
export const threeBands = (): Promise<FitDocument> =>
  fit({ series: "2885.9775 5667.9841 8346.7821", bond: "1H 35Cl", name: "HCl" });

/** As many constants as bands, no σ, no masses: nearly everything that can be null is null. */
export const bare = (): Promise<FitDocument> => fit({ series: "2885.9775 5667.9841", name: "two bands" });

/** Spacings that grow: no dissociation limit. */
export const growing = (): Promise<FitDocument> => fit({ series: "1000 2010 3030", name: "growing", sigma: "0.5" });

/** Local-mode notation, one constant held, residuals beyond σ. */
export const local = (): Promise<FitDocument> =>
  fit({
    bands: "1-0 3707.467(10), 2-0 7250.519(10), 3-0 10631.683(10), 4-0 13853.629(10)",
    fix: "weye=0.22",
    notation: "local",
    name: "OH",
  });
