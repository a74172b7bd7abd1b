import { mkdirSync } from "node:fs";
import path from "node:path";
import { demoPeople } from "./demo-people.mjs";
import { ensureChromium, openWorld, TEST_TSCONFIG } from "./lib/e2e-world.mjs";
import { ensureHome, homeFolder, ROOT } from "./lib/home.mjs";
import { interruption } from "./lib/interruption.mjs";
import { ensureModules } from "./lib/modules.mjs";
import { pickPort } from "./lib/ports.mjs";
import { createProgress } from "./lib/progress.mjs";
import { explain, Trouble } from "./lib/trouble.mjs";
import { undoAll } from "./lib/undo.mjs";

/*
 * Takes the pictures of the README from a running desk that was just filled with the demo fleet.
 */
const FOLDER = path.join(ROOT, "docs");
const SHOWN_CHANGE = "Faster X travel on dosing gantry 3";
const LOOK = { viewport: { width: 1440, height: 1000 }, locale: "en-GB", timezoneId: "UTC" };

const signal = interruption();
const progress = createProgress();
const undo = [];

async function openBrowser() {
  const { chromium } = await import("@playwright/test");
  const browser = await chromium.launch({
    executablePath: process.env.CHROMIUM_PATH ?? "/usr/bin/chromium",
    args: ["--no-sandbox", "--disable-gpu", "--disable-dev-shm-usage"],
  });
  undo.push(() => browser.close());
  return browser;
}

async function signIn(page, address) {
  const { email, password } = demoPeople().find(({ role }) => role === "approver");
  await page.goto(`${address}/sign-in`, { waitUntil: "networkidle" });
  await page.getByLabel("E-mail address").fill(email);
  await page.getByLabel("Password", { exact: true }).fill(password);
  await page.getByRole("button", { name: "Sign in" }).click();
  await page.waitForURL((url) => !url.pathname.startsWith("/sign-in"));
}

async function take(page, url, name) {
  await page.goto(url, { waitUntil: "networkidle" });
  await page.evaluate(() => document.fonts.ready.then(() => undefined));
  await page.screenshot({ path: path.join(FOLDER, name), animations: "disabled" });
}

async function evaluationUrl(page, address) {
  const answer = await page.request.get(`${address}/api/v1/changes?state=evaluation`);
  const { items = [] } = await answer.json();
  const change = items.find(({ title }) => title === SHOWN_CHANGE);
  if (change) return `${address}/changes/${change.id}`;
  throw new Trouble(
    `The demo fleet has no change "${SHOWN_CHANGE}" in evaluation. No picture was taken of one.`,
  );
}

async function main() {
  const home = ensureHome(homeFolder());
  const env = { ...process.env, NEXT_TELEMETRY_DISABLED: "1", KEEPSTEP_TSCONFIG: TEST_TSCONFIG };
  await progress.step("Node modules", (say) => ensureModules({ say, signal }));
  await progress.step("Chromium", (say) => ensureChromium({ say, signal }));
  const { address } = await openWorld({ home, port: await pickPort(), progress, undo, signal, env });
  mkdirSync(FOLDER, { recursive: true });
  await progress.step("Pictures", async (say) => {
    const page = await (await openBrowser()).newPage(LOOK);
    await signIn(page, address);
    await take(page, `${address}/floor`, "floor.png");
    await take(page, await evaluationUrl(page, address), "evaluation.png");
    say(`docs/floor.png and docs/evaluation.png, ${LOOK.viewport.width} × ${LOOK.viewport.height}`);
  });
}

try {
  await main();
} catch (error) {
  process.stderr.write(`${explain(error, "taking the pictures")}\n`);
  process.exitCode = 1;
} finally {
  await undoAll(undo, progress.line);
}
