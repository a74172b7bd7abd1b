import { spawnSync } from "node:child_process";
import path from "node:path";
import { build } from "vite";
import { ROOT } from "./lib/home.mjs";

/** Beside the packages that it is measured against. */
const FOLDER = path.join(ROOT, "node_modules/.cache/keepstep-bench");

// Built ahead as the desk itself is: a loader that compiles on the way names every closure anew at each of its calls,
// and that would be measured too.
await build({
  configFile: false,
  root: ROOT,
  logLevel: "warn",
  resolve: { alias: { "@": ROOT } },
  build: { ssr: "tests/bench/main.ts", outDir: FOLDER, emptyOutDir: true, minify: false, target: "node20" },
});

const { status } = spawnSync(process.execPath, [path.join(FOLDER, "main.js")], {
  stdio: "inherit",
  cwd: ROOT,
});
process.exitCode = status ?? 1;
