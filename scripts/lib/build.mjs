import { existsSync, readFileSync, rmSync, writeFileSync } from "node:fs";
import path from "node:path";
import { ROOT } from "./home.mjs";
import { inTurn } from "./lock.mjs";
import { run } from "./run.mjs";
import { hashSources } from "./sources.mjs";

export const NEXT = path.join(ROOT, "node_modules/next/dist/bin/next");

/** Builds the desk into `distDir` unless what is there was built from the same sources; commands take turns. */
export function ensureBuild(options) {
  const { distDir, signal } = options;
  return inTurn({ folder: path.join(ROOT, distDir), name: "build", signal }, () =>
    buildWhereChanged(options),
  );
}

async function buildWhereChanged({ distDir, say, signal, env }) {
  const stamp = path.join(ROOT, distDir, "keepstep-sources");
  const sources = hashSources();
  if (existsSync(stamp) && readFileSync(stamp, "utf8") === sources) return say("up to date");
  say("building the desk; this takes about a minute");
  rmSync(stamp, { force: true });
  await run(process.execPath, [NEXT, "build"], {
    cwd: ROOT,
    // Types are proven by the tests; here they would only make the start slower.
    env: { ...env, NODE_ENV: "production", KEEPSTEP_DIST_DIR: distDir, KEEPSTEP_TYPES_PROVEN: "1" },
    signal,
    name: "next build",
    onLine: (line) => /\.\.\.$|^✓ Compiled/.test(line) && say(`building, ${line.replace(/^✓ /, "")}`),
  });
  writeFileSync(stamp, sources);
  say("built");
}
