import type { Settings } from "../bands/index.ts";

/** Settings as a TOML file that says the same. */
export function settingsToml(settings: Settings): string {
  const lines = [...settings].map(([name, { value }]) => `${name} = ${JSON.stringify(value)}`);
  return `# The flags of this run; readable by rungwise as FILE.\n${lines.join("\n")}\n`;
}
