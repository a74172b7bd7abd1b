import { readFile } from "node:fs/promises";
import type { Locator, Page } from "@playwright/test";
import { storedText, type AxisNumbers } from "../../scripts/demo/models";
import { expect, personOf, PHONE, test, visit } from "../support/e2e";

const MODEL = "dosing-gantry-3";
const PATH = "gantry/axes.conf";
/** On baseline in the demo; each width of the window walks with a machine of its own. */
const SERIALS: Readonly<Record<string, string>> = { desk: "DG-118", phone: "DG-119" };
/** Each walk changes another axis, so that the second one does not find its change in the baseline already. */
const AXES: Readonly<Record<string, "x" | "y">> = { desk: "x", phone: "y" };
/** A rms: more than the driver and the motor of either axis are made for. */
const RUN_AMPS = "2.4";
const WHY_ACCEPTABLE = "The axis moves one minute an hour; its case was measured at 52 °C after a shift.";

async function idOf(page: Page, operation: string): Promise<string> {
  const response = await page.request.get(`/api/v1${operation}`);
  const { items } = (await response.json()) as { items: readonly { readonly id: string }[] };
  expect(items, operation).toHaveLength(1);
  return items[0]?.id ?? "";
}

/** The value of a field in the title block. */
function inTitleBlock(page: Page, label: string): Locator {
  const cell = page.getByRole("region", { name: "Title block" }).locator("dl > div");
  return cell.filter({ has: page.getByText(label, { exact: true }) }).getByRole("definition");
}

/** The numbers of the gantry's file, axis by axis. */
function numbersOf(text: string): Record<string, AxisNumbers> {
  const sections = [...text.matchAll(/^\[axis\.(\w+)\]\n([^[]*)/gm)];
  return Object.fromEntries(
    sections.map(([, axis, body = ""]) => {
      const of = (key: string): number => Number(new RegExp(`^${key} = (\\S+)`, "m").exec(body)?.[1]);
      const numbers: AxisNumbers = {
        run: of("amps_rms"),
        hold: of("standby_amps"),
        subdivide: of("subdivide"),
        scale: of("scale"),
        speed: of("vmax"),
        accel: of("acc"),
        corner: of("corner"),
      };
      return [axis, numbers];
    }),
  );
}

const withRunCurrent = (text: string, axis: string): string =>
  text.replace(new RegExp(`(\\[axis\\.${axis}\\]\\namps_rms = ).*`), `$1${RUN_AMPS}`);

/** Types another run current: for the X axis, the first one in `text`, by keys in the code editor; on a phone for Y. */
async function typeRunCurrent(
  page: Page,
  { text, narrow }: { text: string; narrow: boolean },
): Promise<void> {
  const editor = page.getByRole("textbox", { name: `Text of ${PATH}` });
  await expect(editor).toBeAttached();
  if (narrow) {
    await editor.fill(withRunCurrent(await editor.inputValue(), "y"));
    return;
  }
  await editor.focus();
  await page.keyboard.press("Control+Home");
  const linesAbove = text.split("\n").findIndex((line) => line.startsWith("amps_rms"));
  for (let line = 0; line < linesAbove; line += 1) await page.keyboard.press("ArrowDown");
  await page.keyboard.press("Shift+End");
  await page.keyboard.type(`amps_rms = ${RUN_AMPS}`);
}

test("a text goes in, a change goes through, and the floor shows it", async ({ pageAs, expectAccessible }, {
  project,
}) => {
  test.setTimeout(480_000);
  const narrow = project.name === "phone";
  const serial = SERIALS[project.name] ?? "";
  const axis = AXES[project.name] ?? "x";
  const title = `Stronger ${axis.toUpperCase()} current on ${serial}`;
  const engineerPerson = personOf("engineer");
  const engineer = await pageAs("engineer");
  const machineId = await idOf(engineer, `/machines?q=${serial}`);
  const modelId = await idOf(engineer, `/machine-models?q=${MODEL}`);

  const required = await engineer.request.get(`/api/v1/machines/${machineId}/required-text`);
  const text = await required.text();

  await test.step("the engineer uploads a text and sees its findings", async () => {
    await visit(engineer, `/machines/${machineId}`);
    await engineer.getByRole("main").getByRole("link", { name: "Add a reading" }).first().click();
    await expect(engineer.getByRole("heading", { level: 1, name: "Add a reading" })).toBeVisible();
    await engineer.getByText("Paste the text, or say its format").click();
    await engineer.getByRole("textbox", { name: "Text", exact: true }).fill(withRunCurrent(text, axis));
    await engineer.getByLabel("Name of the pasted text").fill(PATH);
    await engineer.getByLabel("Serial number off the plate").fill(serial);
    await engineer.getByRole("button", { name: "Keep the reading" }).click();
    await expect(engineer.getByRole("status")).toContainText(`Kept for ${serial}`);
    await engineer.getByRole("link", { name: "See the reading" }).click();
    const findings = engineer.getByRole("group", { name: "Findings", exact: true });
    await expect(findings.getByText("over limit").first()).toBeVisible();
    const marked = engineer.getByRole("group", { name: `Text of ${PATH}` }).getByRole("listitem");
    await expect(
      marked
        .filter({ hasText: `amps_rms = ${RUN_AMPS}` })
        .getByRole("link")
        .first(),
    ).toBeVisible();
    await expectAccessible(engineer);
  });

  await test.step("the engineer proposes a change with the findings beside the text", async () => {
    await visit(engineer, `/changes/new?model=${modelId}`);
    const checks = engineer.getByRole("region", { name: "What the checks say" });
    await expect(checks).toContainText("0 new ones, 0 cleared");
    await typeRunCurrent(engineer, { text, narrow });
    await expect(checks).toContainText(/[1-9]\d* new ones?, 0 cleared/);
    await expect(checks.getByRole("heading", { name: "Changed parameters" })).toBeVisible();
    await expect(checks.getByText("over limit").first()).toBeVisible();
    await engineer.getByLabel("Title").fill(title);
    await engineer.getByLabel("Reason").fill("The carriage loses steps with full racks.");
    await engineer.getByLabel("Effectivity").selectOption({ label: "some machines" });
    await engineer.getByRole("group", { name: "Machines" }).getByLabel(serial).check();
    await engineer.getByRole("button", { name: "Submit for evaluation" }).click();
    await expect(engineer.getByRole("heading", { level: 1, name: title })).toBeVisible();
    await expect(inTitleBlock(engineer, "Status")).toContainText("in evaluation");
    await expect(inTitleBlock(engineer, "Approved by")).not.toContainText("Sign here");
    await expectAccessible(engineer);
  });

  const changeAddress = new URL(engineer.url()).pathname;
  const label = await inTitleBlock(engineer, "Identification number").innerText();

  await test.step("the approver opens the change from the mail and signs", async () => {
    const person = personOf("approver");
    const approver = await pageAs("approver");
    const mail = approver
      .getByRole("row")
      .filter({ hasText: person.email })
      .getByRole("link", { name: `asks you to decide: ${label} ${title}` });
    await expect(async () => {
      await visit(approver, "/mail");
      await expect(mail).toBeVisible({ timeout: 1_000 });
    }).toPass({ timeout: 60_000 });
    await mail.click();
    const words = approver.locator("pre");
    await expect(words).toHaveText(
      new RegExp(`^${engineerPerson.name} asks you to decide on ${label} ${title}\\.\\n\\n`),
    );
    await expect(words).toContainText("The carriage loses steps with full racks.");
    await expect(words).toContainText(
      `${axis.toUpperCase()} axis, run current: 0.85 A rms → ${RUN_AMPS} A rms`,
    );
    await words.getByRole("link").click();
    await expect(approver.getByRole("heading", { level: 1, name: title })).toBeVisible();
    await expect(approver).toHaveURL(new RegExp(`${changeAddress}$`));

    await approver.getByRole("button", { name: "Sign here" }).click();
    const form = inTitleBlock(approver, "Approved by");
    await expect(form.getByRole("textbox", { name: /^Over limit: / }).first()).toBeVisible();
    for (const justification of await form.getByRole("textbox", { name: /^Over limit: / }).all())
      await justification.fill(WHY_ACCEPTABLE);
    await form.getByLabel("Your password").fill(person.password);
    await expectAccessible(approver);
    await form.getByRole("button", { name: "Approve and sign" }).click();
    await expect(form).toContainText(person.name);
    await expect(form).toContainText("I have evaluated this change");
    await expect(form).toContainText(WHY_ACCEPTABLE);
    await expect(inTitleBlock(approver, "Status")).toContainText("approved");
  });

  await test.step("the engineer releases it", async () => {
    await visit(engineer, changeAddress);
    await inTitleBlock(engineer, "Status").getByRole("button", { name: "Release" }).click();
    await engineer.getByRole("button", { name: "Release to the machines" }).click();
    await expect(inTitleBlock(engineer, "Status")).toContainText("in implementation");
    await expect(engineer.getByRole("row").filter({ hasText: serial }).first()).toContainText(
      "has not been downloaded yet",
    );
  });

  await test.step("the technician applies it and proves it", async () => {
    const technician = await pageAs("technician", PHONE);
    await visit(technician, "/work");
    await technician.getByRole("row").filter({ hasText: label }).getByRole("link", { name: serial }).click();
    await expect(technician.getByRole("heading", { level: 1 })).toHaveText(`${serial}: apply and prove`);
    const coming = technician.waitForEvent("download");
    await technician.getByRole("button", { name: `Download the text for ${serial}` }).click();
    const released = numbersOf(await readFile(await (await coming).path(), "utf8"));
    expect(released[axis]?.run).toBe(Number(RUN_AMPS));
    await expect(technician.getByRole("button", { name: "Download it again" })).toBeVisible();

    await technician.getByLabel("Serial number off the plate").fill(serial);
    await technician.getByLabel("Layer").selectOption({ label: "stored values" });
    await technician.getByText("Paste the text", { exact: true }).click();
    await technician.getByRole("textbox", { name: "Text", exact: true }).fill(storedText(released));
    await technician.getByRole("button", { name: "Keep the as-left reading" }).click();
    await expect(technician.getByText(`Kept for ${serial}`)).toBeVisible();
    await expect(technician.getByText("The test on the machine is not recorded yet.").first()).toBeVisible();
    await expectAccessible(technician);

    await technician.getByLabel("What was tested, and how").fill("Out and back ten times, steps counted.");
    await technician.getByLabel("Ambient").fill("24,5");
    await technician.getByRole("button", { name: "Record the test" }).click();
    await expect(technician.getByText(/^Verified .*Nothing is missing\.$/)).toBeVisible();
  });

  await test.step("the change is verified by itself and the floor follows", async () => {
    await visit(engineer, changeAddress);
    await expect(inTitleBlock(engineer, "Status")).toContainText("verified");
    await visit(engineer, `/floor?q=${serial}`);
    const row = narrow
      ? engineer.getByRole("listitem").filter({ has: engineer.getByRole("link", { name: serial }) })
      : engineer.getByRole("grid").getByRole("row").filter({ hasText: serial });
    await expect(row).toContainText("on baseline");
    await expectAccessible(engineer);
  });
});
