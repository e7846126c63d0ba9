export { bandsTable, exclusions } from "./bands.ts";
export { commonErrorsTable } from "./common-errors.ts";
export { constantsComparison, dissociationComparison, termsTable } from "./comparison.ts";
export { constantsTable, correlation } from "./constants.ts";
export { derivedTable } from "./derived.ts";
export { dissociationTable, SAFETY_LINE } from "./dissociation.ts";
export { LASER_LINE, predictionsTable } from "./predictions.ts";
export { qualityEntries } from "./quality.ts";
export { stabilityTable } from "./stability.ts";
