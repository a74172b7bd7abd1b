export { parseDefines } from "./parse";
