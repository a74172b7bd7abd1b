export { parseEnv } from "./parse";
