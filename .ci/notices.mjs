// Licences of everything that was bundled, for dist/THIRD-PARTY-NOTICES.md.
import { readdirSync, readFileSync } from "node:fs";
import { join } from "node:path";

/** The text of the notices, from the inputs that esbuild reports, and of what is copied beside them. */
export function notices(metafiles, copied) {
  const folders = new Set(copied);
  for (const { inputs } of metafiles)
    for (const file of Object.keys(inputs)) {
      const found = /^(.*node_modules\/(?:@[^/]+\/)?[^/]+)\//.exec(file);
      if (found !== null) folders.add(found[1]);
    }
  const parts = [...folders].sort().map((folder) => {
    const { name, version, license } = JSON.parse(readFileSync(join(folder, "package.json"), "utf8"));
    const files = readdirSync(folder).filter((file) => /^(licen[cs]e|copying|notice)/i.test(file));
    const texts = files.map((file) => readFileSync(join(folder, file), "utf8").trim());
    return `## ${name} ${version}\n\nLicence: ${license}\n\n${texts.map((text) => `\`\`\`\n${text}\n\`\`\``).join("\n\n")}`;
  });
  return `# Third-party notices\n\nRungwise contains the following packages.\n\n${parts.join("\n\n")}\n`;
}
