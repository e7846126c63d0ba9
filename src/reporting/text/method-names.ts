import type { DissociationMethod } from "../../analysis/index.ts";

/** What text calls each way to the limit. */
export const methodNames: Readonly<Record<DissociationMethod, string>> = {
  morse: "Morse",
  "morse-refit": "two-term Morse",
  "turning-point": "turning point",
  "spacing-sum": "spacing sum",
  "near-limit": "near limit",
};
