import "server-only";
import { randomUUID } from "node:crypto";
import { env } from "@/lib/server/env";
import { enqueue } from "@/lib/server/queue";
import { logger } from "@/lib/server/logger";
import { OutboxMail } from "@/models/outbox";
import type { Tx } from "@/lib/services/kernel/context";
import type { ComposedMail } from "./compose";

/** Name of the job that sends what is due. */
export const MAIL_JOB = "mail";

interface Addressed {
  readonly changeId: string;
  /** One mail a key, however often the act is tried. */
  readonly key: string;
  readonly recipient: { readonly id: string; readonly email: string };
  readonly mail: ComposedMail;
}

/** Puts a mail into the outbox in the act's own transaction; the job is woken once that is committed. */
export async function enqueueMail(tx: Tx, { changeId, key, recipient, mail }: Addressed): Promise<void> {
  await OutboxMail.bulkCreate(
    [
      {
        deduplicationKey: `${key}:${recipient.id}`,
        changeId,
        recipient: recipient.email,
        subject: mail.subject,
        bodyText: mail.text,
        bodyHtml: mail.html,
        messageId: `<${randomUUID()}@${new URL(env().publicUrl).hostname}>`,
        nextTryAt: tx.now,
        createdAt: tx.now,
      },
    ],
    { transaction: tx.transaction, ignoreDuplicates: true },
  );
}

/** Wakes the mail job after the commit. Should that fail, the job's own schedule finds the mail within a minute. */
export function wakeMailJob(tx: Tx): void {
  tx.afterCommit(async () => {
    try {
      await enqueue(MAIL_JOB, {}, { singletonKey: "due", singletonSeconds: 1 });
    } catch (error) {
      logger.warn({ err: error }, "The mail job was not woken; its schedule will find the mail.");
    }
  });
}
