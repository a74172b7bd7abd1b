import { randomUUID } from "node:crypto";
import { awake, enter, expect, personOf, signIn, test, visit } from "../support/e2e";

test.describe("signing in", () => {
  test("leads back to the page that was asked for", async ({ pageOfNobody }) => {
    const page = await pageOfNobody();
    await visit(page, "/record");
    await expect(page).toHaveURL(/\/sign-in\?next=%2Frecord$/);
    await enter(page, personOf("viewer"));
    await expect(page).toHaveURL(/\/record$/);
    await expect(page.getByRole("heading", { level: 1, name: "Record" })).toBeVisible();
  });

  test("ends with signing out", async ({ pageOfNobody }) => {
    const page = await pageOfNobody();
    const person = personOf("viewer");
    await signIn(page, person);
    await page.getByRole("button", { name: person.name }).click();
    await page.getByRole("button", { name: "Sign out" }).click();
    await expect(page.getByRole("heading", { name: "Sign in to Keepstep" })).toBeVisible();
    await page.goto("/floor");
    await expect(page).toHaveURL(/\/sign-in\?next=%2Ffloor$/);
  });

  test.describe("refused", () => {
    test.use({ asksForRefusals: true });

    test("says in one sentence what to do about a wrong password", async ({ pageOfNobody }) => {
      const page = await pageOfNobody();
      await visit(page, "/sign-in");
      await enter(page, { email: personOf("viewer").email, password: "not-the-password" });
      await expect(page.getByRole("alert").filter({ hasText: "Not signed in" })).toContainText(
        "This e-mail address and password do not fit together, or the person is no longer active. Check both and try again.",
      );
      await expect(page).toHaveURL(/\/sign-in$/);
    });

    test("shuts a deactivated person's open page at once", async ({ pageAs, pageOfNobody }) => {
      const id = randomUUID();
      const someone = {
        name: `Sten Abara ${id}`,
        email: `${id}@example.test`,
        password: `belt-${randomUUID()}`,
      };
      const admin = await pageAs("admin");
      await visit(admin, "/settings/people/new");
      await admin.getByLabel("Name", { exact: true }).fill(someone.name);
      await admin.getByLabel("E-mail address").fill(someone.email);
      await admin.getByLabel("First password").fill(someone.password);
      await admin.getByRole("button", { name: "Add the person" }).click();
      await expect(admin).toHaveURL(/\/settings\/people$/);

      const page = await pageOfNobody();
      await signIn(page, someone);
      await visit(page, "/readings");

      await visit(admin, `/settings/people?q=${id}`);
      await admin.getByRole("link", { name: someone.name }).click();
      await admin.getByRole("button", { name: "Deactivate" }).click();
      const asked = admin.getByRole("dialog", { name: `Deactivate ${someone.name}` });
      await asked.getByLabel("Reason").fill("Has left the team.");
      await asked.getByRole("button", { name: "Deactivate" }).click();
      await expect(admin.getByRole("button", { name: "Let in again" })).toBeVisible();

      expect((await page.request.get("/api/v1/readings")).status()).toBe(401);
      await page.getByRole("link", { name: "Add a reading" }).first().click();
      await expect(page.getByRole("heading", { name: "Sign in to Keepstep" })).toBeVisible();
      await awake(page);
      await enter(page, someone);
      await expect(page.getByRole("alert").filter({ hasText: "Not signed in" })).toContainText(
        "the person is no longer active",
      );
    });
  });
});
