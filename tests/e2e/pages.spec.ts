import { readdirSync } from "node:fs";
import path from "node:path";
import type { Page } from "@playwright/test";
import type { DemoPerson } from "../../scripts/demo-people.mjs";
import { expect, test, visit } from "../support/e2e";

interface VisitedPage {
  /** The page's folder below app/(desk). */
  readonly route: string;
  readonly role: DemoPerson["role"];
  /** Its address, found by somebody of that role; left out: the route itself. */
  readonly address?: (page: Page) => Promise<string>;
  /** What shows that the page has come up whole. */
  readonly shows?: (page: Page) => Promise<void>;
}

interface Listed {
  readonly items: readonly { readonly id: string }[];
}

async function ask<T>(page: Page, operation: string): Promise<T> {
  const response = await page.request.get(`/api/v1${operation}`);
  expect(response.status(), operation).toBe(200);
  return (await response.json()) as T;
}

async function firstOf(page: Page, operation: string): Promise<string> {
  const [first] = (await ask<Listed>(page, operation)).items;
  if (!first) throw new Error(`The demo has nothing to show for ${operation}.`);
  return first.id;
}

/** The step of a released change on a machine where it is not proved yet. */
async function openStep(page: Page): Promise<string> {
  const id = await firstOf(page, "/changes?state=implementation");
  const { machines } = await ask<{ machines: { machineId: string; verifiedAt: string | null }[] }>(
    page,
    `/changes/${id}`,
  );
  const open = machines.find(({ verifiedAt }) => verifiedAt === null);
  if (!open) throw new Error("The demo has no machine with an open step.");
  return `/changes/${id}/machines/${open.machineId}`;
}

async function sheetPlan(page: Page): Promise<string> {
  return `/test-sheets/new?machineId=${await machine(page)}&axis=x&test=acceleration_ladder`;
}

/** A test sheet started for this visit. */
async function openSheet(page: Page): Promise<string> {
  const machineId = await machine(page);
  const { assembly } = await ask<{ assembly: { axes: { axis: string }[] } }>(page, `/machines/${machineId}`);
  const response = await page.request.post("/api/v1/test-sheets", {
    data: { machineId, axis: assembly.axes[0]?.axis, test: "acceleration_ladder", start: 3, step: 0.2 },
  });
  expect(response.status()).toBe(201);
  return `/test-sheets/${((await response.json()) as { id: string }).id}`;
}

async function axisOfMachine(page: Page): Promise<string> {
  const id = await machine(page);
  const { assembly } = await ask<{ assembly: { axes: { axis: string }[] } }>(page, `/machines/${id}`);
  const [first] = assembly.axes;
  if (!first) throw new Error("The demo's machine has no axis.");
  return `/machines/${id}/axes/${first.axis}`;
}

async function newestMail(page: Page): Promise<string> {
  const link = page.getByRole("table").getByRole("link").first();
  await expect(async () => {
    await visit(page, "/mail");
    await expect(link).toBeVisible({ timeout: 1_000 });
  }).toPass();
  return (await link.getAttribute("href")) ?? "";
}

const machine = (page: Page) => firstOf(page, "/machines?level=over");
const model = (page: Page) => firstOf(page, "/machine-models");

/** A rehearsal of a warm day, started for this visit. */
async function warmDay(page: Page): Promise<string> {
  const data = { question: { kind: "warm_day", riseK: 15 } };
  const response = await page.request.post("/api/v1/rehearsals", { data });
  expect(response.status()).toBe(201);
  return `/rehearsals/${((await response.json()) as { id: string }).id}`;
}

async function showsRehearsed(page: Page): Promise<void> {
  await expect(page.getByRole("progressbar")).toHaveCount(0, { timeout: 30_000 });
  await expect(page.getByText(/^\d+ of \d+ machines$/)).toBeVisible();
}

async function showsEditor(page: Page): Promise<void> {
  await expect(page.getByRole("textbox", { name: /^Text of / })).toBeAttached();
  await expect(page.getByRole("group", { name: "Findings of the text as it stands" })).toBeVisible();
}

const PAGES: readonly VisitedPage[] = [
  { route: "/floor", role: "viewer" },
  { route: "/machines/[id]", role: "engineer", address: async (page) => `/machines/${await machine(page)}` },
  {
    route: "/machines/[id]/edit",
    role: "engineer",
    address: async (page) => `/machines/${await machine(page)}/edit`,
  },
  {
    route: "/machines/[id]/axes/[axis]",
    role: "engineer",
    address: axisOfMachine,
    shows: async (page) => {
      await expect(page.getByRole("slider", { name: /^Speed on the operating map/ })).toBeVisible();
    },
  },
  { route: "/machines/new", role: "engineer" },
  { route: "/readings", role: "viewer" },
  { route: "/readings/new", role: "technician" },
  {
    route: "/readings/[id]",
    role: "engineer",
    address: async (page) => `/readings/${await firstOf(page, "/readings")}`,
  },
  { route: "/changes", role: "viewer" },
  {
    route: "/changes/new",
    role: "engineer",
    address: async (page) => `/changes/new?model=${await model(page)}`,
    shows: showsEditor,
  },
  {
    route: "/changes/[id]",
    role: "approver",
    address: async (page) => `/changes/${await firstOf(page, "/changes?state=evaluation")}`,
  },
  {
    route: "/changes/[id]/edit",
    role: "engineer",
    address: async (page) => `/changes/${await firstOf(page, "/changes?state=evaluation")}/edit`,
    shows: showsEditor,
  },
  {
    route: "/changes/[id]/merge",
    role: "engineer",
    address: async (page) => `/changes/${await firstOf(page, "/changes?state=evaluation")}/merge`,
  },
  { route: "/changes/[id]/machines/[machineId]", role: "technician", address: openStep },
  { route: "/work", role: "technician" },
  { route: "/test-sheets", role: "viewer" },
  { route: "/test-sheets/new", role: "technician", address: sheetPlan },
  { route: "/test-sheets/[id]", role: "technician", address: openSheet },
  { route: "/catalog", role: "engineer" },
  { route: "/catalog/[kind]", role: "engineer", address: () => Promise.resolve("/catalog/drive-train") },
  { route: "/catalog/[kind]/new", role: "engineer", address: () => Promise.resolve("/catalog/motor/new") },
  {
    route: "/catalog/[kind]/[id]",
    role: "engineer",
    address: async (page) => `/catalog/motor/${await firstOf(page, "/catalog/motor")}`,
  },
  { route: "/catalog/machines", role: "engineer" },
  { route: "/catalog/models", role: "engineer" },
  { route: "/catalog/models/new", role: "engineer" },
  {
    route: "/catalog/models/[id]",
    role: "engineer",
    address: async (page) => `/catalog/models/${await model(page)}`,
  },
  {
    route: "/catalog/models/[id]/key-table",
    role: "engineer",
    address: async (page) => `/catalog/models/${await model(page)}/key-table`,
  },
  { route: "/checks", role: "viewer" },
  { route: "/rehearsals", role: "engineer" },
  { route: "/rehearsals/[id]", role: "engineer", address: warmDay, shows: showsRehearsed },
  { route: "/record", role: "viewer" },
  { route: "/search", role: "viewer", address: () => Promise.resolve("/search?q=DG") },
  { route: "/mail", role: "approver" },
  { route: "/mail/[id]", role: "approver", address: newestMail },
  { route: "/help", role: "viewer" },
  {
    route: "/not-allowed",
    role: "viewer",
    address: () => Promise.resolve("/not-allowed?why=changes.decide"),
  },
  { route: "/settings", role: "admin" },
  { route: "/settings/password", role: "viewer" },
  { route: "/settings/people", role: "admin" },
  { route: "/settings/people/new", role: "admin" },
  {
    route: "/settings/people/[id]",
    role: "admin",
    address: async (page) => `/settings/people/${await firstOf(page, "/users")}`,
  },
  { route: "/settings/policy", role: "admin" },
  { route: "/settings/sites", role: "admin" },
  { route: "/settings/sites/new", role: "admin" },
  {
    route: "/settings/sites/[id]",
    role: "admin",
    address: async (page) => `/settings/sites/${await firstOf(page, "/sites")}`,
  },
  { route: "/settings/tokens", role: "admin" },
];

/** What makes the document wider than its window: elements that no scroller holds. */
async function widerThanWindow(page: Page): Promise<string[]> {
  const width = page.viewportSize()?.width ?? 0;
  return page.evaluate((window_) => {
    if (document.documentElement.scrollWidth <= window_) return [];
    const scrolls = (element: Element | null): boolean =>
      element !== null &&
      element !== document.body &&
      (getComputedStyle(element).overflowX !== "visible" || scrolls(element.parentElement));
    const wide = [...document.body.querySelectorAll("*")].filter(
      (element) => element.getBoundingClientRect().right > window_ + 1 && !scrolls(element.parentElement),
    );
    const named = wide.map((element) => `${element.tagName.toLowerCase()}.${element.className}`);
    return [`${document.documentElement.scrollWidth} px`, ...named];
  }, width);
}

async function expectSound(page: Page, address: string): Promise<void> {
  const response = await visit(page, address);
  expect(response?.status()).toBe(200);
  await expect(page).toHaveTitle(/Keepstep/);
  await expect(page.getByRole("heading", { level: 1 })).toHaveCount(1);
}

test.describe("each page of the desk comes up whole, within its window and accessible", () => {
  for (const { route, role, address, shows } of PAGES)
    test(route, async ({ pageAs, expectAccessible }) => {
      const page = await pageAs(role);
      await expectSound(page, address ? await address(page) : route);
      await shows?.(page);
      expect(await widerThanWindow(page)).toEqual([]);
      await expectAccessible(page);
    });

  test("/sign-in", async ({ pageOfNobody, expectAccessible }) => {
    const page = await pageOfNobody();
    await expectSound(page, "/sign-in");
    expect(await widerThanWindow(page)).toEqual([]);
    await expectAccessible(page);
  });
});

test.describe("an address that leads nowhere", () => {
  test.use({ asksForRefusals: true });

  test("says so and leads back", async ({ pageAs, expectAccessible }) => {
    const page = await pageAs("viewer");
    const response = await visit(page, "/machines/00000000-0000-4000-8000-000000000000");
    expect(response?.status()).toBe(404);
    await expect(page.getByRole("heading", { level: 1 })).toHaveCount(1);
    expect(await widerThanWindow(page)).toEqual([]);
    await expectAccessible(page);
  });
});

test("every page of the desk is visited here", () => {
  const desk = path.resolve("app/(desk)");
  const routes = readdirSync(desk, { recursive: true, encoding: "utf8" })
    .filter((file) => path.basename(file) === "page.tsx")
    .map((file) => `/${path.dirname(file)}`);
  expect(PAGES.map(({ route }) => route).sort()).toEqual(routes.sort());
});
