import { loadNonlinearCore } from "../fitting/index.ts";

export { fitNonlinear, type NonlinearRequest, type NonlinearResult } from "../fitting/index.ts";

// The library promises a synchronous fitNonlinear.
await loadNonlinearCore();
