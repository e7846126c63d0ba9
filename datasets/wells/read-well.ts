/** A reference well as its file gives it; energies in cm-1 above v = 0. */
export interface WellFile {
  readonly name: string;
  readonly atoms: readonly [string, string];
  readonly class: "hydride" | "other";
  readonly d0: number;
  readonly d0Uncertainty: number;
  readonly d0Status: string;
  readonly source: string;
  readonly status: string;
  /** of one level; 0 for levels from constants, which are smooth */
  readonly sigma: number;
  readonly used: string;
  /** by v, from v = 0 to the last level used */
  readonly levels: readonly number[];
}

/**
 * Read one of the CSV files of this folder: lines `# key: value` (well, atoms, class, accepted D0 with uncertainty and status,
 * source, status, sigma, v used), then either `v,G` with the levels above v = 0 or `constant,value,status` in rising order.
 * Throws on any other form.
 */
export function readWell(file: string, text: string): WellFile {
  const lines = text.trim().split(/\r?\n/);
  const head = (key: string) => {
    const found = lines.find((line) => line.startsWith(`# ${key}: `));
    if (found === undefined) throw new Error(`${file}: no line "# ${key}: "`);
    return found.slice(key.length + 4).trim();
  };
  const [value, d0Status, ...rest] = head("accepted D0 (cm-1)").split("; ");
  const [d0, d0Uncertainty] = value!.split(" +/- ").map(Number);
  const atoms = head("atoms").split(" ");
  const kind = head("class");
  const used = head("v used");
  const last = Number(/^0-(\d+)/.exec(used)?.[1]);
  const [columns, ...rows] = lines.filter((line) => !line.startsWith("#")).map((line) => line.split(","));
  const levels =
    columns![0] === "v" ? rows.map(([, energy]) => Number(energy)) : fromConstants(rows as [string, string][], last);
  const sound = atoms.length === 2 && (kind === "hydride" || kind === "other") && levels.length === last + 1;
  if (!sound || ![d0, d0Uncertainty, ...levels].every(Number.isFinite)) throw new Error(`${file}: malformed`);
  return {
    name: head("well"),
    atoms: atoms as [string, string],
    class: kind as WellFile["class"],
    d0: d0!,
    d0Uncertainty: d0Uncertainty!,
    d0Status: [d0Status, ...rest].join("; "),
    source: head("source"),
    status: head("status"),
    sigma: Number(head("sigma (cm-1)")),
    used,
    levels,
  };
}

/** G(v) - G(0) of ωe(v+½) - ωexe(v+½)² + ωeye(v+½)³ + …, rows in rising order (only ωexe carries a minus). */
function fromConstants(rows: readonly (readonly [string, string, ...unknown[]])[], last: number): number[] {
  const term = (v: number) =>
    rows.reduce((sum, [, constant], k) => sum + (k === 1 ? -1 : 1) * Number(constant) * (v + 0.5) ** (k + 1), 0);
  return Array.from({ length: last + 1 }, (_, v) => term(v) - term(0));
}
