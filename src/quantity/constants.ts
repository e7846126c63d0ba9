/*
 * CODATA 2022 recommended values (Mohr, Newell, Taylor & Tiesinga, Rev. Mod. Phys. 97, 025002 (2025)).
 * Everything derived is computed here and nowhere else; no derived number is typed.
 */

/** Name of the set of constants, for reports. */
export const constantsSet = "CODATA 2022";

/** Planck constant h in J s, exact. */
export const planck = 6.62607015e-34;
/** Speed of light in vacuum c in m/s, exact. */
export const speedOfLight = 299792458;
/** Elementary charge e in C, exact. */
export const elementaryCharge = 1.602176634e-19;
/** Boltzmann constant k_B in J/K, exact. */
export const boltzmann = 1.380649e-23;
/** Avogadro constant N_A in 1/mol, exact. */
export const avogadro = 6.02214076e23;

/** Atomic mass constant u in kg; standard uncertainty 0.000 000 000 52e-27 kg (3.1e-10 of the value). */
export const atomicMass = 1.66053906892e-27;
/** Electron mass m_e in kg; standard uncertainty 2.8e-40 kg. */
export const electronMass = 9.1093837139e-31;
/** Hartree energy E_h in J; standard uncertainty 4.8e-30 J. */
export const hartree = 4.359744722206e-18;
/** Bohr radius a_0 in m; standard uncertainty 8.2e-21 m. */
export const bohr = 5.29177210544e-11;

/** Thermochemical calorie in J, exact by definition. */
const calorie = 4.184;

/** Energy of 1 cm-1 in J: h·c·100. */
export const wavenumberInJoule = planck * speedOfLight * 100;
/** Energy of 1 cm-1 in eV. */
export const wavenumberInElectronvolt = wavenumberInJoule / elementaryCharge;
/** Energy of 1 cm-1 in kJ/mol. */
export const wavenumberInKilojoulePerMole = (wavenumberInJoule * avogadro) / 1000;
/** Energy of 1 cm-1 in kcal/mol (4.184 J). */
export const wavenumberInKilocaloriePerMole = wavenumberInKilojoulePerMole / calorie;
/** Frequency of 1 cm-1 in GHz. */
export const wavenumberInGigahertz = speedOfLight / 1e7;
/** Frequency of 1 cm-1 in THz. */
export const wavenumberInTerahertz = speedOfLight / 1e10;
/** Temperature h·c·(1 cm-1)/k_B in K. */
export const wavenumberInKelvin = wavenumberInJoule / boltzmann;
/** Hartree energy in cm-1. */
export const hartreeInWavenumber = hartree / wavenumberInJoule;
/** Bohr radius in Å. */
export const bohrInAngstrom = bohr * 1e10;
/** Electron mass in u. */
export const electronMassInU = electronMass / atomicMass;

/** κ = h/(8π²·c·u) in u Å² cm-1; with it a = √(ωexe·μ/κ) and B = κ/(μ r²). Known to 3.1e-10. */
export const kappa = (planck / (8 * Math.PI ** 2 * speedOfLight * atomicMass)) * 1e18;
/** (2π·c·100)²·u in N m-1 u-1 (cm-1)-2: k = forceConstantFactor·μ·ωe². Known to 3.1e-10. */
export const forceConstantFactor = (2 * Math.PI * speedOfLight * 100) ** 2 * atomicMass;
