import { AxeBuilder } from "@axe-core/playwright";
import type { BrowserContext, BrowserContextOptions, Page, Response } from "@playwright/test";
import { test as base, expect } from "@playwright/test";
import type { DemoPerson } from "../../scripts/demo-people.mjs";
import { demoPeople } from "../../scripts/demo-people.mjs";

type Role = DemoPerson["role"];
type Session = Awaited<ReturnType<BrowserContext["storageState"]>>;

/** Pixels: the narrowest window that people use here. */
export const PHONE = { width: 390, height: 844 };

interface DeskOptions {
  /** The test asks for what is refused, and the browser writes the answer's status to the console. */
  readonly asksForRefusals: boolean;
}

interface DeskFixtures {
  /** A page of its own, as the demo's first person of this role. */
  readonly pageAs: (role: Role, viewport?: typeof PHONE) => Promise<Page>;
  /** Finds no serious violation on the page as it stands. */
  readonly expectAccessible: (page: Page) => Promise<void>;
  /** A page of its own where nobody is signed in. */
  readonly pageOfNobody: () => Promise<Page>;
  /**
   * A page in a context of its own, closed after the test. It must not write errors to the console nor ask any other
   * host.
   */
  readonly open: (options?: BrowserContextOptions) => Promise<Page>;
}

interface WorkerFixtures {
  /** Sessions of people who have signed in before. */
  readonly sessions: Map<Role, Session>;
}

/** The demo's first person of this role. */
export function personOf(role: Role): DemoPerson {
  const person = demoPeople().find((one) => one.role === role);
  if (!person) throw new Error(`The demo has no ${role}.`);
  return person;
}

const REFUSED = /^Failed to load resource: the server responded with a status of 4\d\d/;

interface Watching {
  readonly faults: string[];
  readonly home: string;
  readonly asksForRefusals: boolean;
}

/** What a page did that no page of ours may do; filled while it is used. */
function watchPage(page: Page, { faults, home, asksForRefusals }: Watching): void {
  page.on("console", (message) => {
    if (message.type() !== "error" || (asksForRefusals && REFUSED.test(message.text()))) return;
    faults.push(`console: ${message.text()} (${page.url()})`);
  });
  page.on("pageerror", (error) => faults.push(`error: ${error.message} (${page.url()})`));
  page.on("request", (request) => {
    const url = new URL(request.url());
    if (/^(https?|wss?):$/.test(url.protocol) && url.host !== home) faults.push(`request to ${url.host}`);
  });
}

/** Waits until the page's scripts have taken over what the server drew: from then on a press is heard. */
export async function awake(page: Page): Promise<void> {
  await page.waitForFunction(() =>
    Object.keys(document.querySelector("main") ?? {}).some((name) => name.startsWith("__reactProps")),
  );
}

/** Opens an address and waits until the page can be used. */
export async function visit(page: Page, path: string): Promise<Response | null> {
  const response = await page.goto(path);
  await awake(page);
  return response;
}

/** Fills the sign-in form and sends it. */
export async function enter(page: Page, person: Pick<DemoPerson, "email" | "password">): Promise<void> {
  await page.getByLabel("E-mail address").fill(person.email);
  await page.getByLabel("Password", { exact: true }).fill(person.password);
  await page.getByRole("button", { name: "Sign in" }).click();
}

/** Signs a page in and waits for the desk. */
export async function signIn(page: Page, person: Pick<DemoPerson, "email" | "password">): Promise<void> {
  await visit(page, "/sign-in");
  await enter(page, person);
  await page.waitForURL((url) => !url.pathname.startsWith("/sign-in"));
  await awake(page);
}

async function findSeriousViolations(page: Page): Promise<string[]> {
  // One frame and violations alone: the other results would take most of the time.
  const builder = new AxeBuilder({ page }).setLegacyMode().options({ resultTypes: ["violations"] });
  const { violations } = await builder.analyze();
  return violations
    .filter(({ impact }) => impact === "serious" || impact === "critical")
    .map(
      ({ id, help, nodes }) => `${id}: ${help} (${nodes.map(({ target }) => target.join(" ")).join(", ")})`,
    );
}

/** A browser test in which every page is watched. */
export const test = base.extend<DeskOptions & DeskFixtures, WorkerFixtures>({
  asksForRefusals: [false, { option: true }],
  sessions: [
    async ({ browser: _ }, provide) => {
      await provide(new Map());
    },
    { scope: "worker" },
  ],
  open: async ({ browser, baseURL, asksForRefusals }, provide) => {
    const faults: string[] = [];
    const home = new URL(baseURL ?? "").host;
    const contexts: BrowserContext[] = [];
    await provide(async (options = {}) => {
      const context = await browser.newContext(options);
      contexts.push(context);
      const page = await context.newPage();
      watchPage(page, { faults, home, asksForRefusals });
      return page;
    });
    for (const context of contexts) await context.close();
    expect(faults).toEqual([]);
  },
  pageOfNobody: async ({ open }, provide) => {
    await provide(() => open());
  },
  pageAs: async ({ open, sessions }, provide) => {
    await provide(async (role, viewport) => {
      const session = sessions.get(role);
      const size = viewport ? { viewport } : {};
      if (session) return open({ storageState: session, ...size });
      const page = await open(size);
      await signIn(page, personOf(role));
      sessions.set(role, await page.context().storageState());
      return page;
    });
  },
  expectAccessible: async ({ baseURL: _ }, provide) => {
    await provide(async (page) => expect(await findSeriousViolations(page)).toEqual([]));
  },
});

export { expect };
