import { AxeBuilder } from "@axe-core/playwright";
import type { Page } from "@playwright/test";
import { test as base, expect } from "@playwright/test";
import type { DemoPerson } from "../../scripts/demo-people.mjs";
import { demoPeople } from "../../scripts/demo-people.mjs";

type Role = DemoPerson["role"];

interface DeskFixtures {
  /** Signs the page in as the demo's first person of this role. */
  readonly signIn: (role: Role, page?: Page) => Promise<DemoPerson>;
  /** Finds no serious violation on the page as it stands. */
  readonly expectAccessible: (page?: Page) => Promise<void>;
  /** Watched pages must not write errors to the console nor ask any other host. */
  readonly watch: (page: Page) => void;
}

/** The demo's first person of this role. */
export function personOf(role: Role): DemoPerson {
  const person = demoPeople().find((one) => one.role === role);
  if (!person) throw new Error(`The demo has no ${role}.`);
  return person;
}

/** What a page did that no page of ours may do; filled while it is used. */
function watchPage(page: Page, faults: string[], home: string): void {
  page.on("console", (message) => {
    if (message.type() === "error") faults.push(`console: ${message.text()} (${page.url()})`);
  });
  page.on("pageerror", (error) => faults.push(`error: ${error.message} (${page.url()})`));
  page.on("request", (request) => {
    const url = new URL(request.url());
    if (/^(https?|wss?):$/.test(url.protocol) && url.host !== home) faults.push(`request to ${url.host}`);
  });
}

async function signInAs(page: Page, person: DemoPerson): Promise<void> {
  await page.goto("/sign-in");
  await page.getByLabel("E-mail address").fill(person.email);
  await page.getByLabel("Password").fill(person.password);
  await page.getByRole("button", { name: "Sign in" }).click();
  await page.waitForURL((url) => !url.pathname.startsWith("/sign-in"));
}

async function findSeriousViolations(page: Page): Promise<string[]> {
  const { violations } = await new AxeBuilder({ page }).analyze();
  return violations
    .filter(({ impact }) => impact === "serious" || impact === "critical")
    .map(
      ({ id, help, nodes }) => `${id}: ${help} (${nodes.map(({ target }) => target.join(" ")).join(", ")})`,
    );
}

/** A browser test in which every page is watched; further pages are given to `watch`. */
export const test = base.extend<DeskFixtures>({
  watch: async ({ baseURL }, provide) => {
    const faults: string[] = [];
    const home = new URL(baseURL ?? "").host;
    await provide((page) => watchPage(page, faults, home));
    expect(faults).toEqual([]);
  },
  page: async ({ page, watch }, provide) => {
    watch(page);
    await provide(page);
  },
  signIn: async ({ page }, provide) => {
    await provide(async (role, other = page) => {
      const person = personOf(role);
      await signInAs(other, person);
      return person;
    });
  },
  expectAccessible: async ({ page }, provide) => {
    await provide(async (other = page) => expect(await findSeriousViolations(other)).toEqual([]));
  },
});

export { expect };
