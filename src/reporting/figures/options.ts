/** What a builder of figures is told. */
export interface FigureOptions {
  /** 85 (one column) or 171 (two columns) */
  readonly widthMm: number;
  /** ΔG(v + ½) and ωe, ωexe, or ν̃/v and ω̃, ω̃x */
  readonly notation: "equilibrium" | "local";
}
