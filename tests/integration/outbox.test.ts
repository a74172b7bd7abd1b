import { randomUUID } from "node:crypto";
import type { SMTPServerAddress } from "smtp-server";
import { SMTPServer } from "smtp-server";
import { afterAll, afterEach, beforeEach, expect, it, vi } from "vitest";
import { sequelize } from "@/lib/server/sequelize";
import { nextMailDue, sendDueMails } from "@/lib/services/mail/send-due";
import { OutboxMail } from "@/models/outbox";

/** Settings are read at their first use, so the address stands before any module is loaded. */
const port = vi.hoisted(() => {
  const own = 21_000 + (process.pid % 9000);
  process.env.SMTP_URL = `smtp://127.0.0.1:${own}`;
  return own;
});

const taken: string[] = [];
let server: SMTPServer | null = null;
let refuse = false;

function onRcptTo(
  _address: SMTPServerAddress,
  _session: unknown,
  done: (error?: Error | null) => void,
): void {
  done(refuse ? Object.assign(new Error("no such mailbox"), { responseCode: 550 }) : null);
}

/** A real mail server on loopback that keeps the Message-ID of whatever it takes. */
async function openServer(): Promise<void> {
  server = new SMTPServer({
    authOptional: true,
    disabledCommands: ["STARTTLS", "AUTH"],
    onRcptTo,
    onData(stream, _session, done) {
      const chunks: Buffer[] = [];
      stream.on("data", (chunk: Buffer) => chunks.push(chunk));
      stream.on("end", () => {
        taken.push(/^Message-ID: (.*)$/im.exec(Buffer.concat(chunks).toString())?.[1]?.trim() ?? "");
        done();
      });
    },
  });
  await new Promise<void>((resolve) => server?.listen(port, "127.0.0.1", resolve));
}

async function closeServer(): Promise<void> {
  const open = server;
  server = null;
  if (open) await new Promise<void>((resolve) => open.close(() => resolve()));
}

function mail(more: Partial<OutboxMail> = {}): Promise<OutboxMail> {
  const id = randomUUID();
  return OutboxMail.create({
    deduplicationKey: id,
    recipient: "amira@example.test",
    subject: "Enid asks you to decide",
    bodyText: "Enid asks you to decide.\n",
    bodyHtml: "<p>Enid asks you to decide.</p>",
    messageId: `<${id}@keepstep.example.test>`,
    ...more,
  });
}

const later = (hours: number) => () => new Date(Date.now() + hours * 3_600_000);

beforeEach(async () => {
  taken.length = 0;
  refuse = false;
  await OutboxMail.destroy({ where: {} });
});

afterEach(closeServer);
afterAll(() => sequelize.close());

it("keeps a mail while the mail server is down and sends it when it is back", async () => {
  const kept = await mail();
  expect(await sendDueMails(later(0.01))).toBe(0);
  await kept.reload();
  expect(kept).toMatchObject({ state: "waiting", unconfirmed: 0, attempts: 1 });
  expect(await nextMailDue()).not.toBeNull();
  await openServer();
  expect(await sendDueMails(later(1))).toBe(1);
  expect(taken).toEqual([kept.messageId]);
  await kept.reload();
  expect(kept.state).toBe("sent");
  expect(await sendDueMails(later(2))).toBe(0);
});

it("sends once more, under the same Message-ID, where a process died before it could say that it had sent", async () => {
  await openServer();
  const claimed = await mail({ state: "sending", unconfirmed: 1, attempts: 1 });
  expect(await sendDueMails(later(1))).toBe(1);
  expect(taken).toEqual([claimed.messageId]);
});

it("gives up rather than send a third copy", async () => {
  await openServer();
  const claimed = await mail({ state: "sending", unconfirmed: 2, attempts: 2 });
  expect(await sendDueMails(later(1))).toBe(0);
  expect(taken).toEqual([]);
  await claimed.reload();
  expect(claimed.state).toBe("given_up");
});

it("does not try a refused mailbox for ever", async () => {
  await openServer();
  refuse = true;
  const refused = await mail();
  for (let hour = 1; hour <= 6; hour += 1) await sendDueMails(later(hour));
  await refused.reload();
  expect(refused).toMatchObject({ state: "given_up", attempts: 5 });
  expect(taken).toEqual([]);
});
