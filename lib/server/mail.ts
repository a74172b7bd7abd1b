import "server-only";
import nodemailer from "nodemailer";
import { env } from "./env";

export interface Mail {
  readonly to: string;
  readonly from?: string;
  readonly subject: string;
  readonly text: string;
  readonly html: string;
  /** Stays the same when a mail is tried again, so that a second copy can be told from a second mail. */
  readonly messageId: string;
}

/** How long the mail server may take, in milliseconds, before the mail is tried again later. */
const TIMEOUTS = { connectionTimeout: "10000", greetingTimeout: "10000", socketTimeout: "30000" };

function transportUrl(): string {
  const { smtpUrl } = env();
  if (!smtpUrl) throw new Error("SMTP_URL is not set.");
  const url = new URL(smtpUrl);
  for (const [name, milliseconds] of Object.entries(TIMEOUTS))
    if (!url.searchParams.has(name)) url.searchParams.set(name, milliseconds);
  return url.href;
}

/** Hands one mail to the mail server and gives its answer; rejects when the server does not take it. */
export async function sendMail(mail: Mail): Promise<string> {
  const transport = nodemailer.createTransport(transportUrl());
  try {
    const { response } = await transport.sendMail({ ...mail, from: mail.from ?? env().mailFrom });
    return response;
  } finally {
    transport.close();
  }
}
