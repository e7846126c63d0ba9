export { limitSlope } from "./law.ts";
export { nearLimit } from "./near-limit.ts";
