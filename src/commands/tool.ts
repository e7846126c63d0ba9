import manifest from "../../package.json" with { type: "json" };

/** Name and version, as every document carries them. */
export const tool = { name: "rungwise", version: manifest.version } as const;
