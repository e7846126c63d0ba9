export { polyad } from "./polyad.ts";
