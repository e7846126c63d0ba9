import { describe, expect, it } from "vitest";
import { canonicalLabel, readVibrationalLabel, toSeries, vibrationalLabelFault } from "../../src/bands/index.ts";
import { formatFault } from "../../src/messages/index.ts";
import { ofBands } from "./read.ts";

describe("labels", () => {
  it.each([
    ["3-0", 3, 0],
    ["3–0", 3, 0],
    ["3 − 0", 3, 0],
    ["03-00", 3, 0],
    ["10-9", 10, 9],
    ["0-0", 0, 0],
    ["0-3", 0, 3],
  ])("%s is a vibrational label, whatever the order of its levels", (text, upper, lower) => {
    expect(readVibrationalLabel(text)).toEqual({ upper, lower });
    expect(canonicalLabel(text)).toBe(`${upper}-${lower}`);
  });

  it.each(["", "3", "3-", "-3", "3-0-1", "10+", "1.5-0", "a-b", "1-0x", "1000-0"])("%j is none", (text) => {
    expect(readVibrationalLabel(text)).toBeNull();
  });

  it.each([
    ["20+ from 10−", "20+ from 10-"],
    [" 210E#2 ", "210E#2"],
    ["10.0+", "10.0+"],
    ["1.5_1:1", "1.5_1:1"],
    ["20-", "20-"],
  ])("%j of another model keeps its form, with ASCII minus", (text, canonical) => {
    expect(canonicalLabel(text)).toBe(canonical);
  });

  it.each([
    ["1-2", "upper-not-above-lower", "write 2-1"],
    ["1-1", "upper-not-above-lower", "two different levels"],
    ["10+", "label", `write v'-v"`],
  ])("%s is refused for an oscillator with the mend", (label, code, mend) => {
    const [band] = toSeries(ofBands(`${label} 2885.98`), new Map()).series[0]!.bands;
    const fault = vibrationalLabelFault(band!);
    expect(fault?.code).toBe(code);
    expect(formatFault(fault!)).toContain(mend);
    expect(formatFault(fault!)).toContain(`--bands ${label}`);
  });

  it("2-1 is right for an oscillator", () => {
    const [band] = toSeries(ofBands("2-1 2782.0"), new Map()).series[0]!.bands;
    expect(vibrationalLabelFault(band!)).toBeNull();
  });
});
