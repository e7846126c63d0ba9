/** Standing cautions, one line each. */
export const CAUTIONS = {
  extrapolation:
    "an extrapolation: from five low bands the Morse form misses known D0 by −2 % (CO) to +51 % (Br2); the uncertainty is that of the fit alone",
  refit: "Morse form of a two-term fit of the same bands; same caution as morse",
  turningPoint: "top of the fitted polynomial far outside the data: usually the worst answer",
  spacingSum:
    "observed levels plus a straight-line remainder through the last three spacings; the remainder is an extrapolation",
  frozenFrame: "if the bond is one of a polyatomic molecule, D is that of a frozen frame, not a relaxed D0 or D298",
} as const;
