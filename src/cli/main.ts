import { EXIT } from "../messages/index.ts";
import { run } from "./run.ts";

// A reader that has seen enough (`| head -1`) is no fault.
process.stdout.on("error", (error: NodeJS.ErrnoException) => {
  if (error.code === "EPIPE") process.exit(EXIT.done);
  throw error;
});
process.once("SIGINT", () => process.exit(EXIT.interrupted));

void run(process.argv.slice(2)).then((code) => {
  process.exitCode = code;
});
