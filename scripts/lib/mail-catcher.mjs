import { mkdirSync, readdirSync, rmSync } from "node:fs";
import path from "node:path";
import { writePrivate } from "./home.mjs";
import { pickPort } from "./ports.mjs";

const KEPT_MAILS = 500;
const LARGEST_BYTES = 25_000_000;

async function collect(stream) {
  const chunks = [];
  for await (const chunk of stream) chunks.push(chunk);
  return Buffer.concat(chunks);
}

/** Names sort by time, so that the newest mail is the last. */
function nameMail(now, serial) {
  return `${now.toISOString().replace(/[^0-9T]/g, "")}-${String(serial).padStart(6, "0")}.eml`;
}

/** Removes all but the newest mails. */
export function trimMails(folder, kept = KEPT_MAILS) {
  const mails = readdirSync(folder)
    .filter((name) => name.endsWith(".eml"))
    .sort();
  for (const name of mails.slice(0, Math.max(0, mails.length - kept))) rmSync(path.join(folder, name));
}

/**
 * A mail server on 127.0.0.1 that delivers nothing: every mail becomes a file in `folder`, written before it is
 * accepted. Gives the port and how to stop it.
 */
export async function startMailCatcher({ folder, port: preferred, now = () => new Date() }) {
  const { SMTPServer } = await import("smtp-server");
  mkdirSync(folder, { recursive: true, mode: 0o700 });
  let serial = 0;
  const take = async (stream) => {
    const mail = await collect(stream);
    if (stream.sizeExceeded) throw Object.assign(new Error("The mail is too large."), { responseCode: 552 });
    writePrivate(path.join(folder, nameMail(now(), (serial += 1))), mail);
    trimMails(folder);
  };
  const server = new SMTPServer({
    disabledCommands: ["AUTH", "STARTTLS"],
    disableReverseLookup: true,
    logger: false,
    size: LARGEST_BYTES,
    onData: (stream, session, done) => take(stream).then(() => done(), done),
  });
  server.on("error", () => undefined);
  const port = await pickPort(preferred);
  await new Promise((resolve, reject) => {
    server.server.once("error", reject);
    server.listen(port, "127.0.0.1", resolve);
  });
  return {
    port,
    url: `smtp://127.0.0.1:${port}`,
    stop: () => new Promise((resolve) => server.close(resolve)),
  };
}
