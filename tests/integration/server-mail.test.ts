import { mkdtempSync, readdirSync, rmSync, writeFileSync } from "node:fs";
import { createServer } from "node:net";
import { tmpdir } from "node:os";
import path from "node:path";
import { afterEach, beforeEach, describe, expect, test, vi } from "vitest";
import type { MailCatcher } from "../../scripts/lib/mail-catcher.mjs";
import { startMailCatcher, trimMails } from "../../scripts/lib/mail-catcher.mjs";

const MAIL = {
  to: "amira@example.test",
  subject: "Änderung 12: approve the run current of axis X – 1.2 A → 0.9 A",
  text: "Enid asks you to decide.\n\nµm, °C and Ω stay as they are.\n",
  html: "<p>Enid asks you to decide.</p>",
  messageId: "<change-12.submitted.1@keepstep.example.test>",
};

let folder: string;
let catcher: MailCatcher;

beforeEach(async () => {
  folder = mkdtempSync(path.join(tmpdir(), "keepstep-mail-"));
  catcher = await startMailCatcher({ folder });
  useSettings({ SMTP_URL: catcher.url, KEEPSTEP_MAIL_DIR: folder, KEEPSTEP_DEMO: "1" });
});

afterEach(async () => {
  vi.unstubAllEnvs();
  await catcher.stop();
  rmSync(folder, { recursive: true });
});

/** Settings are read once a process: modules are loaded afresh for other ones. */
function useSettings(settings: Record<string, string>): void {
  vi.resetModules();
  for (const [name, value] of Object.entries(settings)) vi.stubEnv(name, value);
}

const mailer = () => import("@/lib/server/mail");
const mailbox = () => import("@/lib/server/mailbox");

describe("a mail", () => {
  test("that was sent is found in the mailbox as it was written", async () => {
    const { sendMail } = await mailer();
    expect(await sendMail(MAIL)).toMatch(/^250 /);
    const [caught, ...others] = await (await mailbox()).listMails();
    expect(others).toEqual([]);
    expect(caught).toMatchObject({
      from: "keepstep@example.test",
      to: [MAIL.to],
      subject: MAIL.subject,
      messageId: MAIL.messageId,
    });
    expect(caught!.text.trimEnd()).toBe(MAIL.text.trimEnd());
    expect(caught!.html.trim()).toBe(MAIL.html);
    expect(Math.abs(caught!.sentAt!.getTime() - Date.now())).toBeLessThan(60_000);
    expect(await (await mailbox()).readMail(caught!.id)).toEqual(caught);
  });

  test("sent again keeps its Message-ID, and the newest stands first", async () => {
    const { sendMail } = await mailer();
    await sendMail({ ...MAIL, subject: "first" });
    await sendMail({ ...MAIL, subject: "second" });
    const caught = await (await mailbox()).listMails();
    expect(caught.map(({ subject }) => subject)).toEqual(["second", "first"]);
    expect(new Set(caught.map(({ messageId }) => messageId))).toEqual(new Set([MAIL.messageId]));
  });

  test("cannot smuggle a header through its subject", async () => {
    const { sendMail } = await mailer();
    await sendMail({ ...MAIL, subject: "Hello\r\nBcc: other@example.test" });
    const [caught] = await (await mailbox()).listMails();
    expect(caught!.to).toEqual([MAIL.to]);
    expect(caught!.subject).toContain("Bcc: other@example.test");
  });

  test("is refused when no server listens", async () => {
    await catcher.stop();
    await expect((await mailer()).sendMail(MAIL)).rejects.toThrow("ECONNREFUSED");
    catcher = await startMailCatcher({ folder });
  });

  test("is refused when it cannot be kept, so that the sender tries again", async () => {
    rmSync(folder, { recursive: true });
    await expect((await mailer()).sendMail(MAIL)).rejects.toThrow();
    folder = mkdtempSync(path.join(tmpdir(), "keepstep-mail-"));
  });
});

describe("the mailbox", () => {
  test.each(["../../etc/passwd", "..", "", "a.b", "nothing-here"])("gives nothing for %j", async (id) => {
    writeFileSync(path.join(folder, "a.b.eml"), "Subject: x\r\n\r\n");
    expect(await (await mailbox()).readMail(id)).toBeNull();
  });

  test("is empty outside of demo mode", async () => {
    await (await mailer()).sendMail(MAIL);
    useSettings({ KEEPSTEP_DEMO: "0" });
    expect(await (await mailbox()).listMails()).toEqual([]);
    const [file] = readdirSync(folder);
    expect(await (await mailbox()).readMail(path.basename(file!, ".eml"))).toBeNull();
  });

  test("keeps the newest mails only", () => {
    for (const name of ["20260101T1-1.eml", "20260102T1-1.eml", "20260103T1-1.eml", "note.txt"])
      writeFileSync(path.join(folder, name), "");
    trimMails(folder, 2);
    expect(readdirSync(folder).sort()).toEqual(["20260102T1-1.eml", "20260103T1-1.eml", "note.txt"]);
  });
});

test("the catcher takes another port when its own is held", async () => {
  const held = createServer();
  await new Promise<void>((resolve) => held.listen(0, "127.0.0.1", resolve));
  const address = held.address();
  const port = typeof address === "object" ? address!.port : 0;
  const second = await startMailCatcher({ folder, port });
  expect(second.port).not.toBe(port);
  await second.stop();
  await new Promise((resolve) => held.close(resolve));
});
