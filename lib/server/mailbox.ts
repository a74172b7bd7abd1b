import "server-only";
import { readdir, readFile } from "node:fs/promises";
import path from "node:path";
import PostalMime from "postal-mime";
import { env } from "./env";

/** One mail that the local catcher kept. */
export interface CaughtMail {
  /** Name of its file without the ending; newer mails sort after older ones. */
  readonly id: string;
  readonly messageId: string;
  readonly from: string;
  readonly to: readonly string[];
  readonly subject: string;
  readonly sentAt: Date | null;
  readonly text: string;
  readonly html: string;
}

const FILE_NAME = /^[0-9A-Za-z-]{1,80}$/;

interface Mailbox {
  readonly address?: string;
}

const addressOf = (mailbox: Mailbox | undefined) => mailbox?.address ?? "";

async function parse(folder: string, id: string): Promise<CaughtMail> {
  const email = await PostalMime.parse(await readFile(path.join(folder, `${id}.eml`)));
  const sentAt = new Date(email.date ?? "");
  return {
    id,
    messageId: email.messageId ?? "",
    from: addressOf(email.from),
    to: (email.to ?? []).map(addressOf),
    subject: email.subject ?? "",
    sentAt: Number.isNaN(sentAt.getTime()) ? null : sentAt,
    text: email.text ?? "",
    html: email.html ?? "",
  };
}

/** The caught mails, newest first; none outside of demo mode. */
export async function listMails(limit = 100): Promise<CaughtMail[]> {
  const folder = demoFolder();
  if (!folder) return [];
  const names = await readdir(folder).catch(() => []);
  const ids = names
    .filter((name) => name.endsWith(".eml"))
    .map((name) => name.slice(0, -".eml".length))
    .filter((id) => FILE_NAME.test(id))
    .sort()
    .reverse()
    .slice(0, limit);
  return Promise.all(ids.map((id) => parse(folder, id)));
}

/** One caught mail; null when there is none of this id, or outside of demo mode. */
export async function readMail(id: string): Promise<CaughtMail | null> {
  const folder = demoFolder();
  if (!folder || !FILE_NAME.test(id)) return null;
  return parse(folder, id).catch((error: NodeJS.ErrnoException) => {
    if (error.code === "ENOENT") return null;
    throw error;
  });
}

function demoFolder(): string | undefined {
  const { demo, mailFolder } = env();
  return demo ? mailFolder : undefined;
}
