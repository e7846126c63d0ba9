import type { Model } from "./model.ts";
import { oscillator } from "./oscillator.ts";

/** Every model, one line each; those that are not the default are imported only when asked for. */
const models: Readonly<Record<string, () => Promise<Model> | Model>> = {
  oscillator: () => oscillator,
  coupled: async () => (await import("./coupled/index.ts")).coupled,
  polyad: async () => (await import("./polyad/index.ts")).polyad,
  "near-limit": async () => (await import("./near-limit/index.ts")).nearLimit,
};

/** Names a user may give to `--model`. */
export const modelNames: readonly string[] = Object.keys(models);

/** The model of that name, or null. */
export async function findModel(name: string): Promise<Model | null> {
  return Object.hasOwn(models, name) ? await models[name]!() : null;
}
