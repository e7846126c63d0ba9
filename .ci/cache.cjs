// Runs the built command once and keeps what V8 compiled on the way.
"use strict";
const { writeFileSync } = require("node:fs");
const { resolve } = require("node:path");
const { start, cache } = require(resolve("dist/rungwise.cjs"));

process.argv.splice(2, 0, "fit", "--series", "2885.98 5667.98 8346.78 10922.8 13396.2 15768", "--bond", "1H 35Cl");
const script = start(null);
process.on("exit", () => writeFileSync(cache, script.createCachedData()));
