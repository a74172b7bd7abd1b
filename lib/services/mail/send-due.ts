import "server-only";
import { Op } from "sequelize";
import { sequelize } from "@/lib/server/sequelize";
import { logger } from "@/lib/server/logger";
import { sendMail } from "@/lib/server/mail";
import { OutboxMail } from "@/models/outbox";

/**
 * A send whose outcome we never learned (the process died between the server's answer and our commit) is tried once
 * more under the same Message-ID and then given up, so that a mail arrives twice at most.
 */
const UNCONFIRMED_SENDS = 2;
/** A claim older than this belongs to a process that is gone. */
const CLAIM_MS = 120_000;
const LONGEST_WAIT_MS = 15 * 60_000;
const BATCH = 20;

/** Sends what is due; returns how many went out. A mail server that is down costs nothing but time. */
export async function sendDueMails(now: () => Date): Promise<number> {
  let sent = 0;
  for (let tried = 0; tried < BATCH * 50; tried += 1) {
    const mail = await claim(now());
    if (!mail) return sent;
    if (await deliver(mail, now)) sent += 1;
  }
  return sent;
}

/** Takes one due mail for this process, committed before the mail server is spoken to. */
async function claim(now: Date): Promise<OutboxMail | null> {
  return sequelize.transaction(async (transaction) => {
    const mail = await OutboxMail.findOne({
      where: { state: ["waiting", "sending"], nextTryAt: { [Op.lte]: now } },
      order: [["nextTryAt", "ASC"]],
      transaction,
      lock: transaction.LOCK.UPDATE,
      skipLocked: true,
    });
    if (!mail) return null;
    if (mail.unconfirmed >= UNCONFIRMED_SENDS) {
      await mail.update(
        { state: "given_up", lastError: "The outcome of two sends is not known." },
        { transaction },
      );
      return mail;
    }
    const nextTryAt = new Date(now.getTime() + CLAIM_MS);
    await mail.update(
      { state: "sending", unconfirmed: mail.unconfirmed + 1, attempts: mail.attempts + 1, nextTryAt },
      { transaction },
    );
    return mail;
  });
}

async function deliver(mail: OutboxMail, now: () => Date): Promise<boolean> {
  if (mail.state !== "sending") return false;
  try {
    await sendMail({
      to: mail.recipient,
      subject: mail.subject,
      text: mail.bodyText,
      html: mail.bodyHtml,
      messageId: mail.messageId,
    });
  } catch (error) {
    await postpone(mail, { error, now: now() });
    return false;
  }
  await mail.update({ state: "sent", sentAt: now(), lastError: null });
  return true;
}

/** A refusal for good (a mailbox that is not there) is not tried for ever. */
const REFUSED_TRIES = 5;

interface SmtpError {
  readonly message?: string;
  /** The server's answer, where it gave one. */
  readonly responseCode?: number;
  /** The command that failed; "DATA" without an answer leaves open whether the mail was taken. */
  readonly command?: string;
}

/** Tried again later, ever more rarely; only a send that may have happened after all keeps counting as unconfirmed. */
async function postpone(mail: OutboxMail, { error, now }: { error: unknown; now: Date }): Promise<void> {
  const { responseCode = 0, command, message } = error as SmtpError;
  const outcomeOpen = responseCode === 0 && command === "DATA";
  const refused = responseCode >= 500 && mail.attempts >= REFUSED_TRIES;
  const wait = Math.min(5_000 * 2 ** Math.min(mail.attempts - 1, 10), LONGEST_WAIT_MS);
  logger.warn(
    { mail: mail.id, attempts: mail.attempts, message },
    "A mail was not taken; it is tried again.",
  );
  await mail.update({
    state: refused ? "given_up" : "waiting",
    unconfirmed: outcomeOpen ? mail.unconfirmed : mail.unconfirmed - 1,
    nextTryAt: new Date(now.getTime() + wait),
    lastError: message ?? "unknown",
  });
}

/** When the next waiting mail is due; null with an empty outbox. */
export async function nextMailDue(): Promise<Date | null> {
  const next = await OutboxMail.findOne({
    where: { state: ["waiting", "sending"] },
    order: [["nextTryAt", "ASC"]],
    attributes: ["nextTryAt"],
  });
  return next?.nextTryAt ?? null;
}
