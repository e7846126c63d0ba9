import type { Assignment } from "../../analysis/index.ts";
import type { TableData } from "../table-data.ts";
import { fixed, probability, size } from "../text/cells.ts";
import { paintWith } from "./paint.ts";
import { section } from "./section.ts";

interface Assigned extends Assignment {
  readonly limits: {
    readonly omega: readonly [number, number];
    readonly ratio: readonly [number, number];
    readonly highest: number;
  };
}

/** Ranked hypotheses for a terminal: constants, then the labels peak by peak, then how sure they are. Ends with a newline. */
export function renderAssignment(document: Assigned, { colour }: { readonly colour: boolean }): string {
  const paint = paintWith(colour);
  const { hypotheses, limits } = document;
  const several = hypotheses.some(({ ladders }) => ladders.length > 1);
  const constants: TableData = {
    columns: [
      { quantity: "rank", align: "right" },
      ...(several ? [{ quantity: "ladder", align: "right" } as const] : []),
      { quantity: "probability", align: "point" },
      { quantity: "ln evidence", align: "point" },
      { quantity: "peaks", align: "right" },
      { quantity: "ωe", unit: "cm-1", align: "point" },
      { quantity: "ωexe", unit: "cm-1", align: "point" },
      { quantity: "rms", unit: "cm-1", align: "point" },
    ],
    rows: hypotheses.flatMap(({ rank, probability: p, score, ladders }) =>
      ladders.map(({ constants: { we, wexe }, explained, rms }, k) => ({
        cells: [
          k === 0 ? String(rank) : "",
          ...(several ? [String(k + 1)] : []),
          k === 0 ? probability(p) : "",
          k === 0 ? fixed(score, 1) : "",
          String(explained),
          fixed(we, 1),
          fixed(wexe, 2),
          size(rms),
        ],
      })),
    ),
    notes: [
      `Looked for v up to ${limits.highest}, ω ${limits.omega.join(" to ")} cm⁻¹, ωx/ω ${limits.ratio.join(" to ")} (--limits).`,
      "ln evidence: over the same peaks being strangers only; probability: among the hypotheses found.",
    ],
  };
  const labels: TableData = {
    columns: [
      { quantity: "peak", unit: "cm-1", align: "point" },
      ...hypotheses.map(({ rank }) => ({ quantity: `rank ${rank}`, align: "left" }) as const),
    ],
    rows: hypotheses[0]!.labels.map(({ position }, i) => ({
      cells: [
        fixed(position, 2),
        ...hypotheses.map(({ labels }) => {
          const { label, ladder } = labels[i]!;
          return label === null ? "stranger" : several ? `${label} (${ladder})` : label;
        }),
      ],
      muted: hypotheses[0]!.labels[i]!.label === null,
    })),
    notes: [],
  };
  return `${[
    section("Hypotheses", [constants], paint),
    section("Labels", [labels], paint),
    section("Verdict", verdict(document), paint),
  ].join("\n\n")}\n`;
}

/** Sentences: whether the best one stands alone, what would settle it, and how to go on. */
function verdict({ hypotheses, ambiguous, decider, strangersOnly }: Assigned): string[] {
  const [best] = hypotheses;
  const lines: string[] = [];
  if (!ambiguous) lines.push("The first hypothesis stands alone.");
  else if (strangersOnly > best!.probability)
    lines.push("These peaks are as likely no ladder at all: do not build on a label before another band confirms it.");
  else lines.push("The first hypothesis does not stand alone: the peaks cannot tell it from the others.");
  if (decider !== null) {
    const [first, second] = decider.positions.map(
      (position, k) => `${fixed(position, 0)} ± ${size(decider.standardUncertainties[k]!)}`,
    );
    lines.push(`What would settle it: ${decider.label}, at ${first} cm⁻¹ by rank 1 and at ${second} cm⁻¹ by rank 2.`);
  } else if (ambiguous)
    lines.push(
      "No further band of the ladder tells the first two apart: they differ in which peak is a stranger only.",
    );
  best!.ladders.forEach((_, k) => {
    const bands = best!.labels.filter(({ ladder }) => ladder === k + 1).sort((a, b) => a.position - b.position);
    lines.push(
      `Go on with: rungwise fit --bands "${bands.map(({ label, position }) => `${label} ${Number(position.toFixed(4))}`).join(", ")}"`,
    );
  });
  return lines;
}
