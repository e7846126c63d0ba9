import { EXIT } from "../messages/index.ts";
import { run } from "./run.ts";

process.once("SIGINT", () => process.exit(EXIT.interrupted));

void run(process.argv.slice(2)).then((code) => {
  process.exitCode = code;
});
