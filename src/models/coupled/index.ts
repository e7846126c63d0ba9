export { coupled } from "./coupled.ts";
