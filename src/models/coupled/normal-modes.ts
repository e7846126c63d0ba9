/** Normal coordinates of N equivalent bonds, one row a mode: the symmetric stretch first, then the others, of equal wavenumber. */
export function normalModes(bonds: number): readonly (readonly number[])[] {
  const rows = [new Array<number>(bonds).fill(1 / Math.sqrt(bonds))];
  for (let k = 1; k < bonds; k++) {
    const size = Math.sqrt(k * (k + 1));
    rows.push(Array.from({ length: bonds }, (_, i) => (i < k ? 1 / size : i === k ? -k / size : 0)));
  }
  return rows;
}

/**
 * Σ_i U_ai U_bi U_ci U_di: with it -wx·Σ_i(n_i² + n_i) = -wx·(2V + Σ_abcd b†_a b†_b b_c b_d·T_abcd) in normal coordinates. `stretch` holds what that
 * makes of -wx in x_ss, x_st (n_s·n_t) and K (K/4 times √(n_s(n_s-1)(n_t+1)(n_t+2))).
 */
export function quarticOf(bonds: number) {
  const modes = normalModes(bonds);
  const tensor = (a: number, b: number, c: number, d: number) =>
    modes[a]!.reduce((sum, x, i) => sum + x * modes[b]![i]! * modes[c]![i]! * modes[d]![i]!, 0);
  return {
    tensor,
    stretch: { ss: tensor(0, 0, 0, 0), st: 4 * tensor(0, 0, 1, 1), k: 4 * tensor(0, 0, 1, 1) },
  };
}
