// Prints the closing line from vitest's JSON results.
import { readFileSync } from "node:fs";

const results = JSON.parse(readFileSync(new URL("../node_modules/.rungwise/tests.json", import.meta.url), "utf8"));
const { numPassedTests: passed, numFailedTests: failed, numPendingTests: skipped } = results;
console.log(`${passed} passed, ${failed} failed${skipped > 0 ? `, ${skipped} skipped` : ""}`);
process.exitCode = failed > 0 || passed === 0 ? 1 : 0;
