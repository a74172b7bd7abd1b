export { parseProperties } from "./parse";
