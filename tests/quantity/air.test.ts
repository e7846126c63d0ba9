import { describe, expect, test } from "vitest";
import { airIndex, readAir, standardAir } from "../../src/quantity/index.ts";

describe("reading the state of the air", () => {
  test.each([
    ["25 C, 98 kPa", 25, 98000],
    ["98 kPa, 25 C", 25, 98000],
    ["25C 98kPa", 25, 98000],
    ["25 °C; 980 hPa", 25, 98000],
    ["980 mbar", 15, 98000],
    ["0.98 bar", 15, 98000],
    ["1 atm", 15, 101325],
    ["760 Torr", 15, 101325],
    ["97000 Pa", 15, 97000],
    ["-5 C", -5, 101325],
    ["−5 C", -5, 101325],
    ["273.15 K", 0, 101325],
  ])("%j is %d °C and %d Pa", (text, temperatureC, pressurePa) => {
    const read = readAir(text);
    // one multiplication by the size of the unit
    expect(read).toEqual({
      temperatureC: expect.closeTo(temperatureC, 10),
      pressurePa: expect.closeTo(pressurePa, 8),
    });
  });

  test.each([
    ["", '"" is not a state of air'],
    ["25", '"25" is not a state of air'],
    ["hot", '"hot" is neither a temperature nor a pressure'],
    ["25 F", '"25 F" is neither a temperature nor a pressure'],
    ["2x C", '"2x C" is neither a temperature nor a pressure'],
    ["25 C, 26 C", '"25 C, 26 C" holds two temperatures'],
    ["1 atm 1 bar", '"1 atm 1 bar" holds two pressures'],
    ["200 C", '"200 C" is outside −40 to 100 °C, where the index of air is known'],
    ["0 Pa", '"0 Pa" has no pressure'],
    ["-1 kPa", '"-1 kPa" has no pressure'],
    ["2 bar", '"2 bar" is above 120 kPa, where the index of air is not known'],
  ])("%j is explained", (text, what) => {
    expect(readAir(text)).toMatchObject({ what, mend: expect.stringMatching(/25 C, 98 kPa|vacuum/) });
  });
});

test("the index of air falls with temperature and grows with pressure and wavenumber", () => {
  const n = airIndex(15000);
  expect(airIndex(15000, { ...standardAir, temperatureC: 16 })).toBeLessThan(n);
  expect(airIndex(15000, { ...standardAir, pressurePa: 101400 })).toBeGreaterThan(n);
  expect(airIndex(15001)).toBeGreaterThan(n);
});
