export { parseCsv } from "./parse";
