import type { Setting, Settings } from "../bands/index.ts";
import type { Fault } from "../messages/index.ts";
import { readMeasurement } from "../quantity/index.ts";

/** Reads settings one by one and collects what is wrong with them. */
export class Reader {
  readonly faults: Fault[] = [];
  readonly settings: Settings;

  constructor(settings: Settings) {
    this.settings = settings;
  }

  fault(setting: Setting, code: string, what: string, mend: string): null {
    this.faults.push({ code, place: setting.place, what, mend });
    return null;
  }

  number(name: string, accept: (x: number) => boolean, mend: string): number | null {
    const setting = this.settings.get(name);
    if (setting === undefined) return null;
    const read = readMeasurement(setting.value);
    if (!read.ok) return this.fault(setting, "not-a-number", read.what, mend);
    return accept(read.value)
      ? read.value
      : this.fault(setting, "out-of-range", `${setting.value} is not possible`, mend);
  }

  choice<T extends string>(name: string, choices: readonly T[], otherwise: T): T {
    const setting = this.settings.get(name);
    if (setting === undefined) return otherwise;
    const found = choices.find((choice) => choice === setting.value.trim().toLowerCase());
    if (found === undefined)
      this.fault(setting, "unknown-choice", `"${setting.value}" is not known`, `write ${choices.join(" or ")}`);
    return found ?? otherwise;
  }
}
