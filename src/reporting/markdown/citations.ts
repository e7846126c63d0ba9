import { formatReference, type ReferenceKey } from "../references.ts";

/** Numbers for works in the order of their first citation. */
export interface Citations {
  /** `[1]`, `[2, 3]`; the work joins the list */
  readonly cite: (...keys: readonly ReferenceKey[]) => string;
  /** the numbered list of what was cited so far */
  readonly list: () => string;
}

/** An empty list of citations. */
export function startCitations(): Citations {
  const order: ReferenceKey[] = [];
  const numberOf = (key: ReferenceKey) => {
    if (!order.includes(key)) order.push(key);
    return order.indexOf(key) + 1;
  };
  return {
    cite: (...keys) => `[${keys.map(numberOf).join(", ")}]`,
    list: () => order.map((key, i) => `${i + 1}. ${formatReference(key)}`).join("\n"),
  };
}
