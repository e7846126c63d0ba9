import type { levenbergMarquardt } from "ml-levenberg-marquardt";

type Core = typeof levenbergMarquardt;

let core: Core | null = null;

/**
 * Load ml-levenberg-marquardt. It is half of the whole program and most fits are linear, so it waits until something asks for it: call this
 * once before fitNonlinear or profileInterval.
 */
export async function loadNonlinearCore(): Promise<void> {
  core ??= (await import("ml-levenberg-marquardt")).levenbergMarquardt;
}

/** The package, once loaded. */
export function nonlinearCore(): Core {
  if (core === null) throw new Error("loadNonlinearCore() has not been awaited");
  return core;
}
