import { spawnSync } from "node:child_process";
import { ROOT } from "./lib/home.mjs";
import { typescriptArguments } from "./lib/typescript.mjs";

const { status } = spawnSync(process.execPath, typescriptArguments("tests/bench/main.ts"), {
  cwd: ROOT,
  stdio: "inherit",
});
process.exitCode = status ?? 1;
