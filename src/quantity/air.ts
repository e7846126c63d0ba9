import { readMeasurement } from "./measurement.ts";

/** The air a wavelength was measured in; dry, 450 ppm CO2. */
export interface AirConditions {
  readonly temperatureC: number;
  readonly pressurePa: number;
}

/** Why something could not be read: what is wrong and what to write instead. */
export interface Explanation {
  readonly what: string;
  readonly mend: string;
}

/** Standard air of spectroscopy: 15 °C, 101 325 Pa. */
export const standardAir: AirConditions = { temperatureC: 15, pressurePa: 101325 };

/** Vacuum wavelengths in nm between which the dispersion formula was fitted (Ciddor 1996). */
const airLimits = { shortestNm: 230, longestNm: 1690 } as const;

const kelvinAtZero = 273.15;

/**
 * How well the air formula covers a vacuum wavelength in nm: `inside` 230–1690 nm; `extrapolated` beyond, where it stays
 * within about 1e-4 cm-1 of a dedicated infrared fit up to 3 µm; `refused` below 230 nm.
 */
export function airRange(vacuumNm: number): "inside" | "extrapolated" | "refused" {
  if (!(vacuumNm >= airLimits.shortestNm)) return "refused";
  return vacuumNm <= airLimits.longestNm ? "inside" : "extrapolated";
}

/**
 * Density of dry air against standard air: p/(Z·T) over its standard value. Compressibility Z of dry air as in Ciddor
 * (1996), appendix A, after Davis, Metrologia 29, 67 (1992) (coefficients from memory; Z at 15 °C, 1 atm is 0.9995922).
 */
function densityRatio(air: AirConditions): number {
  if (air.temperatureC === standardAir.temperatureC && air.pressurePa === standardAir.pressurePa) return 1;
  return density(air) / density(standardAir);
}

function density({ temperatureC: t, pressurePa }: AirConditions): number {
  const kelvin = t + kelvinAtZero;
  const x = pressurePa / kelvin;
  const compressibility = 1 - x * (1.58123e-6 - 2.9331e-8 * t + 1.1043e-10 * t * t) + 1.83e-11 * x * x;
  return x / compressibility;
}

/**
 * Refractive index n of dry air (450 ppm CO2) at a vacuum wavenumber in cm-1.
 * Ciddor, Appl. Opt. 35, 1566 (1996), eq. 1; other temperature and pressure by density, as there. Estimated there as good
 * to 5e-8 for −40…100 °C and 80…120 kPa (from memory). Humidity is not included: moist room air (50 %, 20 °C) lowers n by
 * about 4e-7 (from memory), 0.005 cm-1 at 700 nm.
 * @throws RangeError below 230 nm, where the formula is not defined by data.
 */
export function airIndex(wavenumber: number, air: AirConditions = standardAir): number {
  const s2 = squareInMicrometre(wavenumber);
  return 1 + densityRatio(air) * 1e-8 * (5792105 / (238.0185 - s2) + 167917 / (57.362 - s2));
}

/** dn/dν̃ of `airIndex`, in cm. */
export function airIndexSlope(wavenumber: number, air: AirConditions = standardAir): number {
  const s2 = squareInMicrometre(wavenumber);
  const bySquare = 5792105 / (238.0185 - s2) ** 2 + 167917 / (57.362 - s2) ** 2;
  return densityRatio(air) * 1e-8 * bySquare * 2 * wavenumber * 1e-8;
}

function squareInMicrometre(wavenumber: number): number {
  if (airRange(1e7 / wavenumber) === "refused") {
    throw new RangeError(
      `the refractive index of air is not known at a vacuum wavelength of ${1e7 / wavenumber} nm, below ${airLimits.shortestNm} nm`,
    );
  }
  return (wavenumber / 1e4) ** 2;
}

/** Wavelength in air, nm, of a vacuum wavenumber in cm-1. */
export function airWavelength(wavenumber: number, air: AirConditions = standardAir): number {
  return 1e7 / (wavenumber * airIndex(wavenumber, air));
}

/**
 * Vacuum wavenumber in cm-1 of a wavelength in air, nm. Solves λ_vac = λ_air·n(λ_vac) by iteration; each round gains five
 * digits, so the answer is exact to rounding after four.
 */
export function vacuumWavenumber(airNm: number, air: AirConditions = standardAir): number {
  // start a little too long, so that the shortest acceptable wavelength is not refused on the way
  let wavenumber = 1e7 / (airNm * 1.0005);
  for (let round = 0; round < 5; round++) wavenumber = 1e7 / (airNm * airIndex(wavenumber, air));
  return wavenumber;
}

const temperatureUnits: Readonly<Record<string, (value: number) => number>> = {
  c: (t) => t,
  "°c": (t) => t,
  degc: (t) => t,
  k: (t) => t - kelvinAtZero,
};

const pascalPer: Readonly<Record<string, number>> = {
  pa: 1,
  hpa: 100,
  kpa: 1000,
  mbar: 100,
  bar: 1e5,
  torr: 101325 / 760,
  atm: 101325,
};

/**
 * Read air such as `25 C, 98 kPa`: a temperature (C, K), a pressure (Pa, hPa, kPa, mbar, bar, Torr, atm), or one of
 * them; the other is then that of standard air. Accepted: −40…100 °C, up to 120 kPa.
 */
export function readAir(text: string): AirConditions | Explanation {
  const mend = 'write a temperature and a pressure such as "25 C, 98 kPa"';
  let temperatureC: number | null = null;
  let pressurePa: number | null = null;
  const pieces = text.match(/[^\s,;]+\s*[^\d\s,;.+\-−]+/gu) ?? [];
  if (pieces.length === 0 || text.replace(/[\s,;]/gu, "") !== pieces.join("").replace(/\s/gu, "")) {
    return { what: `"${text}" is not a state of air`, mend };
  }
  for (const piece of pieces) {
    const [, number = "", unit = ""] = /^(.*?)\s*([a-z°]+)$/iu.exec(piece.trim()) ?? [];
    const read = readMeasurement(number);
    const toCelsius = temperatureUnits[unit.toLowerCase()];
    const pascal = pascalPer[unit.toLowerCase()];
    if (!read.ok || (toCelsius === undefined && pascal === undefined)) {
      return { what: `"${piece.trim()}" is neither a temperature nor a pressure`, mend };
    }
    if (toCelsius !== undefined) {
      if (temperatureC !== null) return { what: `"${text}" holds two temperatures`, mend };
      temperatureC = toCelsius(read.value);
    } else if (pascal !== undefined) {
      if (pressurePa !== null) return { what: `"${text}" holds two pressures`, mend };
      pressurePa = read.value * pascal;
    }
  }
  const air = {
    temperatureC: temperatureC ?? standardAir.temperatureC,
    pressurePa: pressurePa ?? standardAir.pressurePa,
  };
  if (air.temperatureC < -40 || air.temperatureC > 100) {
    return { what: `"${text}" is outside −40 to 100 °C, where the index of air is known`, mend };
  }
  if (!(air.pressurePa > 0))
    return { what: `"${text}" has no pressure`, mend: "for an evacuated path use vacuum as the medium" };
  if (air.pressurePa > 120e3) return { what: `"${text}" is above 120 kPa, where the index of air is not known`, mend };
  return air;
}
