/** What is used of the package; spelt out, so that the types of the library do not ask for it. */
type Core = (
  data: { readonly x: number[]; readonly y: number[] },
  model: (q: number[]) => (x: number) => number,
  options: {
    readonly initialValues: number[];
    readonly jacobianFunction: (q: number[]) => (x: number) => number[];
    readonly damping: number;
    readonly maxIterations: number;
    readonly errorTolerance: number;
  },
) => unknown;

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
