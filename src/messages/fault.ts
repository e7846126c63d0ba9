import { formatPlace, type Place } from "./place.ts";

/** One thing wrong with the request or the input: what, where, and what to write instead. */
export interface Fault {
  /** Stable kebab-case word, for programs and tests. */
  readonly code: string;
  readonly place: Place;
  readonly what: string;
  readonly mend: string;
}

/** Write a fault as one line, without the leading `error:`. */
export function formatFault(fault: Fault): string {
  return `${formatPlace(fault.place)}: ${fault.what}; ${fault.mend}`;
}

/**
 * The request or input cannot be worked on. All independent faults travel together.
 * `exit` is 2 (the request or the input is wrong) or 3 (the data cannot determine what was asked).
 */
export class InputError extends Error {
  readonly faults: readonly Fault[];
  readonly exit: 2 | 3;

  constructor(faults: readonly Fault[], exit: 2 | 3 = 2) {
    super(faults.map(formatFault).join("\n"));
    this.name = "InputError";
    this.faults = faults;
    this.exit = exit;
  }
}
