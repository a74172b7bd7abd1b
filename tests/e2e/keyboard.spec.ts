import type { Page } from "@playwright/test";
import { expect, test, visit } from "../support/e2e";

/** Presses of Tab that lead from the top of the floor into its map, at most. */
const ENOUGH_TABS = 80;

/** Place of the focus in the grid, both as ARIA counts: from 1, the head row first. */
async function place(page: Page): Promise<{ row: number; column: number } | null> {
  return page.evaluate(() => {
    const focused = document.activeElement;
    const row = focused?.closest("[role=grid] [role=row]")?.getAttribute("aria-rowindex");
    const column = focused?.closest("[aria-colindex]")?.getAttribute("aria-colindex");
    return row && column ? { row: Number(row), column: Number(column) } : null;
  });
}

async function tabIntoGrid(page: Page): Promise<void> {
  for (let presses = 0; presses < ENOUGH_TABS; presses += 1) {
    if ((await place(page)) !== null) return;
    await page.keyboard.press("Tab");
  }
}

test("the floor map is walked and a machine opened by keyboard alone", async ({ pageAs }) => {
  const page = await pageAs("technician");
  await visit(page, "/floor");
  const grid = page.getByRole("grid", { name: "Machines by parameters" });
  const rows = Number(await grid.getAttribute("aria-rowcount"));
  const columns = Number(await grid.getAttribute("aria-colcount"));
  const press = async (key: string, row: number, column: number): Promise<void> => {
    await page.keyboard.press(key);
    await expect.poll(() => place(page), { message: `after ${key}` }).toEqual({ row, column });
  };
  await tabIntoGrid(page);
  expect(await place(page)).toEqual({ row: 2, column: 1 });
  await press("ArrowRight", 2, 2);
  await press("ArrowRight", 2, 3);
  await press("ArrowRight", 2, 4);
  await press("ArrowDown", 3, 4);
  await press("End", 3, columns);
  await press("ArrowRight", 3, columns);
  await press("ArrowLeft", 3, columns - 1);
  await press("Home", 3, 1);
  await press("ArrowUp", 2, 1);
  await press("Control+End", rows, columns);
  await press("Control+Home", 2, 1);
  await press("ArrowDown", 3, 1);
  await press("ArrowRight", 3, 2);
  const serial = await grid.getByRole("row").nth(2).getByRole("link").innerText();
  await page.keyboard.press("Enter");
  await expect(page).toHaveURL(/\/machines\/[0-9a-f-]{36}$/);
  await expect(page.getByRole("heading", { level: 1 })).toContainText(serial);
});

test("keys lead to the places of the desk and to the help", async ({ pageAs }) => {
  const page = await pageAs("technician");
  await visit(page, "/floor");
  await page.keyboard.press("Alt+Shift+Digit3");
  await expect(page).toHaveURL(/\/changes$/);
  await expect(page.getByRole("heading", { level: 1, name: "Changes" })).toBeVisible();
  await page.keyboard.press("F1");
  await expect(page).toHaveURL(/\/help$/);
  await page.keyboard.press("Alt+Shift+Digit1");
  await expect(page).toHaveURL(/\/floor$/);
});
