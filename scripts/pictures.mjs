import { mkdirSync } from "node:fs";
import path from "node:path";
import { chromium } from "playwright-core";
import { demoPeople } from "./demo-people.mjs";
import { ROOT } from "./lib/home.mjs";
import { explain, Trouble } from "./lib/trouble.mjs";

const DEFAULT_ADDRESS = "http://127.0.0.1:3000";
/** Pixels. */
const WIDTH = 1400;
const HEIGHT = 1000;

/** As in playwright.config.ts: no request that a page of ours did not make. */
const BROWSER = {
  executablePath: process.env.CHROMIUM_PATH ?? "/usr/bin/chromium",
  args: [
    "--no-sandbox",
    "--disable-gpu",
    "--disable-quic",
    "--no-first-run",
    "--disable-background-networking",
    "--disable-component-update",
    "--disable-sync",
    "--disable-dev-shm-usage",
  ],
};

/** The address of a desk that answers and is well. */
async function demandDesk(given) {
  if (given !== undefined && !URL.canParse(given)) throw new Trouble(`"${given}" is no address of a desk.`);
  const address = given ? new URL(given).origin : DEFAULT_ADDRESS;
  const health = await fetch(new URL("/api/v1/health", address)).catch(() => undefined);
  if (!health?.ok)
    throw new Trouble(
      `No desk answers at ${address}. No picture was taken. Run npm start in another terminal, then npm run pictures -- ${address} here.`,
    );
  return address;
}

async function signIn(page, address) {
  const person = demoPeople().find(({ role }) => role === "approver");
  await page.goto(`${address}/sign-in`, { waitUntil: "networkidle" });
  await page.getByLabel("E-mail address").fill(person.email);
  await page.getByLabel("Password", { exact: true }).fill(person.password);
  await page.getByRole("button", { name: "Sign in" }).click();
  await page
    .waitForURL((url) => !url.pathname.startsWith("/sign-in"))
    .catch(() => {
      throw new Trouble(
        `${person.email} of the demo fleet was not let in at ${address}. No picture was taken. Start a desk that holds the demo fleet.`,
      );
    });
}

/** What the desk answers to the person who is signed in. */
async function ask(page, url) {
  const response = await page.request.get(url);
  if (!response.ok())
    throw new Trouble(`${url} was answered with ${response.status()}. No picture was taken.`);
  return response.json();
}

/** The change in evaluation that moves the most: it shows the most of the page. */
async function findEvaluation(page, address) {
  const { items } = await ask(page, `${address}/api/v1/changes?state=evaluation`);
  let best = { id: undefined, effects: -1 };
  for (const { id } of items) {
    const { evaluation } = await ask(page, `${address}/api/v1/changes/${id}`);
    if (evaluation.effects.length > best.effects) best = { id, effects: evaluation.effects.length };
  }
  if (best.id === undefined)
    throw new Trouble(
      `No change is in evaluation at ${address}, so docs/evaluation.png was not taken. Submit one, then run this again.`,
    );
  return best.id;
}

/** The whole page, once its fonts are there. */
async function take(page, url, name) {
  await page.goto(url, { waitUntil: "networkidle" });
  await page.evaluate(() => document.fonts.ready);
  const file = path.join(ROOT, "docs", name);
  await page.screenshot({ path: file, fullPage: true, caret: "initial", animations: "disabled" });
  process.stdout.write(`docs/${name}\n`);
}

async function main() {
  const address = await demandDesk(process.argv[2]);
  mkdirSync(path.join(ROOT, "docs"), { recursive: true });
  const browser = await chromium.launch(BROWSER);
  try {
    const page = await browser.newPage({ viewport: { width: WIDTH, height: HEIGHT }, locale: "en-GB" });
    await signIn(page, address);
    await take(page, `${address}/floor`, "floor.png");
    await take(page, `${address}/changes/${await findEvaluation(page, address)}`, "evaluation.png");
  } finally {
    await browser.close();
  }
}

try {
  await main();
} catch (error) {
  process.stderr.write(`${explain(error, "taking the pictures")}\n`);
  process.exitCode = 1;
}
