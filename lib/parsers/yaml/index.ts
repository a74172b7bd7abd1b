export { parseYaml } from "./parse";
