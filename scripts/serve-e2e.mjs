import { openWorld, TEST_TSCONFIG } from "./lib/e2e-world.mjs";
import { ensureHome, homeFolder } from "./lib/home.mjs";
import { interruption } from "./lib/interruption.mjs";
import { createProgress } from "./lib/progress.mjs";
import { explain } from "./lib/trouble.mjs";
import { undoAll } from "./lib/undo.mjs";

/*
 * Serves the desk of the end-to-end tests until it is told to stop: `npx playwright test` starts it by itself.
 * PORT says where.
 */
const signal = interruption();
const progress = createProgress();
const undo = [];
const asked = new Promise((resolve) => signal.addEventListener("abort", resolve, { once: true }));

try {
  const env = { ...process.env, NEXT_TELEMETRY_DISABLED: "1", KEEPSTEP_TSCONFIG: TEST_TSCONFIG };
  const home = ensureHome(homeFolder());
  const world = await openWorld({ home, port: Number(process.env.PORT), progress, undo, signal, env });
  await Promise.race([world.ended, asked]);
} catch (error) {
  process.stderr.write(`${explain(error, "starting the desk of the tests")}\n`);
  process.exitCode = 1;
} finally {
  await undoAll(undo, progress.line);
}
