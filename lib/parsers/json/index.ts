export { parseJson } from "./parse";
