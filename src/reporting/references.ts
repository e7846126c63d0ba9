/** A work the report may cite. A DOI stands only where it is certain. */
export interface Reference {
  readonly authors: string;
  readonly year: number;
  readonly title: string;
  /** journal with volume and first page (or article number), or publisher and place of a book */
  readonly where: string;
  readonly doi?: string;
}

/** Every work that text refers to, by the key models and methods use. All entries are from memory unless a line says otherwise. */
export const references = {
  // from memory; APS DOIs follow from journal, volume and page
  dunham1932: {
    authors: "J. L. Dunham",
    year: 1932,
    title: "The energy levels of a rotating vibrator",
    where: "Phys. Rev. 41, 721",
    doi: "10.1103/PhysRev.41.721",
  },
  // from memory
  herzberg1950: {
    authors: "G. Herzberg",
    year: 1950,
    title: "Molecular Spectra and Molecular Structure. I. Spectra of Diatomic Molecules, 2nd ed.",
    where: "Van Nostrand, New York",
  },
  // from memory
  herzberg1945: {
    authors: "G. Herzberg",
    year: 1945,
    title: "Molecular Spectra and Molecular Structure. II. Infrared and Raman Spectra of Polyatomic Molecules",
    where: "Van Nostrand, New York",
  },
  // from memory
  morse1929: {
    authors: "P. M. Morse",
    year: 1929,
    title: "Diatomic molecules according to the wave mechanics. II. Vibrational levels",
    where: "Phys. Rev. 34, 57",
    doi: "10.1103/PhysRev.34.57",
  },
  // from memory
  birge1926: {
    authors: "R. T. Birge, H. Sponer",
    year: 1926,
    title: "The heat of dissociation of non-polar molecules",
    where: "Phys. Rev. 28, 259",
    doi: "10.1103/PhysRev.28.259",
  },
  // from memory
  lerouybernstein1970: {
    authors: "R. J. LeRoy, R. B. Bernstein",
    year: 1970,
    title:
      "Dissociation energy and long-range potential of diatomic molecules from vibrational spacings of higher levels",
    where: "J. Chem. Phys. 52, 3869",
  },
  // from memory
  henry1977: {
    authors: "B. R. Henry",
    year: 1977,
    title: "Use of local modes in the description of highly vibrationally excited molecules",
    where: "Acc. Chem. Res. 10, 207",
  },
  // from memory; Optica DOIs follow from journal, volume and page
  ciddor1996: {
    authors: "P. E. Ciddor",
    year: 1996,
    title: "Refractive index of air: new equations for the visible and near infrared",
    where: "Appl. Opt. 35, 1566",
    doi: "10.1364/AO.35.001566",
  },
  // from memory
  birge1932: {
    authors: "R. T. Birge",
    year: 1932,
    title: "The calculation of errors by the method of least squares",
    where: "Phys. Rev. 40, 207",
    doi: "10.1103/PhysRev.40.207",
  },
  // from memory
  mandel1970: {
    authors: "J. Mandel, R. C. Paule",
    year: 1970,
    title: "Interlaboratory evaluation of a material with unequal numbers of replicates",
    where: "Anal. Chem. 42, 1194",
  },
  // from memory
  aitken1936: {
    authors: "A. C. Aitken",
    year: 1936,
    title: "On least squares and linear combination of observations",
    where: "Proc. R. Soc. Edinburgh 55, 42",
  },
  // from memory
  golub1965: {
    authors: "G. Golub",
    year: 1965,
    title: "Numerical methods for solving linear least squares problems",
    where: "Numer. Math. 7, 206",
  },
  // from memory
  levenberg1944: {
    authors: "K. Levenberg",
    year: 1944,
    title: "A method for the solution of certain non-linear problems in least squares",
    where: "Q. Appl. Math. 2, 164",
  },
  // from memory
  marquardt1963: {
    authors: "D. W. Marquardt",
    year: 1963,
    title: "An algorithm for least-squares estimation of nonlinear parameters",
    where: "J. Soc. Ind. Appl. Math. 11, 431",
  },
  // from memory
  transtrum2012: {
    authors: "M. K. Transtrum, J. P. Sethna",
    year: 2012,
    title: "Improvements to the Levenberg-Marquardt algorithm for nonlinear least-squares minimization",
    where: "arXiv:1201.5885",
  },
  // from memory
  bateswatts1988: {
    authors: "D. M. Bates, D. G. Watts",
    year: 1988,
    title: "Nonlinear Regression Analysis and Its Applications",
    where: "Wiley, New York",
  },
  // from memory
  huber1981: {
    authors: "P. J. Huber",
    year: 1981,
    title: "Robust Statistics",
    where: "Wiley, New York",
  },
  // from memory
  beatontukey1974: {
    authors: "A. E. Beaton, J. W. Tukey",
    year: 1974,
    title: "The fitting of power series, meaning polynomials, illustrated on band-spectroscopic data",
    where: "Technometrics 16, 147",
  },
  // from memory
  jcgm101: {
    authors: "Joint Committee for Guides in Metrology",
    year: 2008,
    title:
      "Evaluation of measurement data: supplement 1 to the guide to the expression of uncertainty in measurement, propagation of distributions using a Monte Carlo method",
    where: "JCGM 101:2008, BIPM, Sèvres",
  },
  // from memory
  cook1982: {
    authors: "R. D. Cook, S. Weisberg",
    year: 1982,
    title: "Residuals and Influence in Regression",
    where: "Chapman and Hall, New York",
  },
  // from memory
  jcgm100: {
    authors: "Joint Committee for Guides in Metrology",
    year: 2008,
    title: "Evaluation of measurement data: guide to the expression of uncertainty in measurement",
    where: "JCGM 100:2008, BIPM, Sèvres",
  },
  // from memory
  codata2022: {
    authors: "P. J. Mohr, D. B. Newell, B. N. Taylor, E. Tiesinga",
    year: 2025,
    title: "CODATA recommended values of the fundamental physical constants: 2022",
    where: "Rev. Mod. Phys. 97, 025002",
    doi: "10.1103/RevModPhys.97.025002",
  },
  // from memory
  ame2020: {
    authors: "M. Wang, W. J. Huang, F. G. Kondev, G. Audi, S. Naimi",
    year: 2021,
    title: "The AME 2020 atomic mass evaluation (II). Tables, graphs and references",
    where: "Chin. Phys. C 45, 030003",
  },
  // from memory
  childlawton1981: {
    authors: "M. S. Child, R. T. Lawton",
    year: 1981,
    title: "Local and normal vibrational states: a harmonically coupled anharmonic-oscillator model",
    where: "Faraday Discuss. Chem. Soc. 71, 273",
  },
  // from memory
  mortensen1981: {
    authors: "O. S. Mortensen, B. R. Henry, M. A. Mohammadi",
    year: 1981,
    title: "The effects of symmetry within the local mode picture",
    where: "J. Chem. Phys. 75, 4800",
  },
  // from memory
  childhalonen1984: {
    authors: "M. S. Child, L. Halonen",
    year: 1984,
    title: "Overtone frequencies and intensities in the local mode picture",
    where: "Adv. Chem. Phys. 57, 1",
  },
  // from memory
  dubalquack1984: {
    authors: "H.-R. Dübal, M. Quack",
    year: 1984,
    title: "Tridiagonal Fermi resonance structure in the IR spectrum of the excited CH chromophore in CF3H",
    where: "J. Chem. Phys. 81, 3779",
  },
  // from memory
  baggott1985: {
    authors: "J. E. Baggott, M.-C. Chuang, R. N. Zare, H.-R. Dübal, M. Quack",
    year: 1985,
    title: "Structure and dynamics of the excited CH-chromophore in (CF3)3CH",
    where: "J. Chem. Phys. 82, 1186",
  },
} as const satisfies Record<string, Reference>;

export type ReferenceKey = keyof typeof references;

/** Whether a key, such as one a model names, is in the list. */
export const isReference = (key: string): key is ReferenceKey => Object.hasOwn(references, key);

/** An entry as text: authors, title, journal, volume, page, year, DOI. */
export function formatReference(key: ReferenceKey): string {
  const { authors, year, title, where, doi }: Reference = references[key];
  return `${authors}, ${title}, ${where} (${year})${doi === undefined ? "" : `, doi:${doi}`}.`;
}
