import path from "node:path";
import { ROOT } from "./home.mjs";

/** The arguments with which node runs a TypeScript file of ours that uses server code. */
export function typescriptArguments(file, args = []) {
  const tsx = path.join(ROOT, "node_modules/tsx/dist/loader.mjs");
  return ["--conditions=react-server", `--import=${tsx}`, path.join(ROOT, file), ...args];
}
