export { parseLines } from "./parse";
