import { execFileSync } from "node:child_process";
import path from "node:path";
import { setTimeout as delay } from "node:timers/promises";
import { afterAll, afterEach, beforeAll, expect, test, vi } from "vitest";
import { demoPeople } from "../../scripts/demo-people.mjs";
import { isFree } from "../../scripts/lib/ports.mjs";
import type { Started } from "../support/start";
import {
  cleanEnvironment,
  freePort,
  makeHome,
  processesOf,
  removeHome,
  ROOT,
  startDesk,
} from "../support/start";

/** The first start may have to build the desk. */
const LONG_MS = 400_000;
const PATIENCE = { timeout: 60_000, interval: 50 };
const READY = "Keepstep is ready";

vi.setConfig({ testTimeout: LONG_MS, hookTimeout: LONG_MS });

let home: string;
let port: string;
let desk: Started | undefined;
let token: string;

const settings = () => ({
  KEEPSTEP_HOME: home,
  PORT: port,
  KEEPSTEP_DIST_DIR: ".next-test",
  KEEPSTEP_TSCONFIG: "tsconfig.test.json",
});

async function start(): Promise<Started> {
  desk = startDesk(settings());
  await desk.said(READY);
  return desk;
}

async function stop(started: Started, signal: NodeJS.Signals): Promise<void> {
  started.child.kill(signal);
  expect(await started.ended).toMatchObject({ code: 0, sentence: "" });
  expect(processesOf(home)).toEqual([]);
  expect(await isFree(Number(port))).toBe(true);
}

const ask = (where: string, init?: RequestInit) => fetch(`http://127.0.0.1:${port}/api/v1/${where}`, init);

async function machinesByToken(): Promise<number> {
  const answer = await ask("machines", { headers: { authorization: `Bearer ${token}` } });
  return answer.status;
}

function makeToken(): string {
  const args = [path.join(ROOT, "scripts/token.mjs"), "--role", "engineer", "--name", "line 4"];
  const output = execFileSync(process.execPath, args, {
    env: cleanEnvironment(settings()),
    encoding: "utf8",
  });
  return output.trimEnd().split("\n").at(-1) ?? "";
}

beforeAll(async () => {
  home = makeHome();
  port = await freePort();
});

afterEach(async () => {
  desk?.child.kill("SIGTERM");
  await desk?.ended;
});

afterAll(() => removeHome(home));

test("a start that is stopped while it loads the demo fleet leaves nothing running", async () => {
  desk = startDesk(settings(), { args: ["--until=demo"] });
  await desk.said("Tables");
  await vi.waitFor(() => expect(processesOf(home).join()).toContain("scripts/seed.ts"), PATIENCE);
  await delay(2_000);
  desk.child.kill("SIGTERM");
  expect((await desk.ended).code).toBe(130);
  expect(processesOf(home)).toEqual([]);
});

test("the next start serves the demo fleet, prints a sign-in for each role, and ends whole on Ctrl-C", async () => {
  const started = await start();
  expect((await ask("health")).status).toBe(200);
  token = makeToken();
  expect(token).toMatch(/^ks_[\w-]{20,}$/);
  expect(await machinesByToken()).toBe(200);
  await stop(started, "SIGINT");
  const { output } = await started.ended;
  expect(output).toContain("begun anew since the loading of the demo fleet was interrupted");
  for (const { role, email, password } of demoPeople())
    expect(output).toMatch(new RegExp(`${role}\\s+${email}\\s+${password}`));
});

test("a token can be made while the desk stands still, and nothing is left running", () => {
  expect(makeToken()).toMatch(/^ks_/);
  expect(processesOf(home)).toEqual([]);
});

test("a further start takes seconds, keeps all data, and loads the demo no second time", async () => {
  const from = Date.now();
  const started = await start();
  expect(Date.now() - from).toBeLessThan(60_000);
  expect(await machinesByToken()).toBe(200);
  await stop(started, "SIGTERM");
  const { output } = await started.ended;
  expect(output).toContain("Demo fleet: loaded before");
  expect(output).toContain("Tables: up to date");
  expect(output).toContain("Desk: up to date");
});

test("a start after one that was killed ends what that one left, and serves again", async () => {
  const killed = await start();
  killed.child.kill("SIGKILL");
  await killed.ended;
  expect(processesOf(home)).not.toEqual([]);
  const started = await start();
  expect(await machinesByToken()).toBe(200);
  await stop(started, "SIGTERM");
});

test("a server that ends by itself is told, and everything else is ended", async () => {
  const started = await start();
  const server = /Server: process (\d+)/.exec(started.output())?.[1];
  process.kill(Number(server), "SIGKILL");
  const { code, sentence } = await started.ended;
  expect(code).toBe(1);
  expect(sentence).toMatch(/^Keepstep stopped\. The server ended by itself \(SIGKILL\)/);
  expect(processesOf(home)).toEqual([]);
});
