#!/usr/bin/env node
// The command, compiled with the code cache that the build left beside it: half of a start would otherwise go into compiling.
// A cache from another version of Node is refused by V8 and nothing else changes.
"use strict";
const { existsSync, readFileSync } = require("node:fs");
const { Script } = require("node:vm");

const file = `${__dirname}/command.cjs`;
const cache = `${__dirname}/command.cache`;

/** The bundle as a function of the usual five variables of a CommonJS module. */
function compile(cachedData) {
  // The build escapes whatever is not ASCII; read so, the text needs no decoding.
  const source = readFileSync(file, "latin1");
  const wrapped = `(function(exports,require,module,__filename,__dirname){${source}\n})`;
  return new Script(wrapped, { filename: file, ...(cachedData === null ? {} : { cachedData }) });
}

/** Compile and run; the script is returned for the maker of the cache. */
function start(cachedData) {
  const script = compile(cachedData);
  script.runInThisContext()(exports, require, module, file, __dirname);
  return script;
}

if (require.main === module) start(existsSync(cache) ? readFileSync(cache) : null);
else module.exports = { start, cache };
