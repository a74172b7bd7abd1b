export { parseToml } from "./parse";
