/** Two atoms that vibrate against each other; `reducedMass` in u. `text` is what the user wrote, or "reduced mass …". */
export interface Bond {
  readonly text: string;
  readonly atoms: readonly [string, string] | null;
  readonly reducedMass: number;
}
