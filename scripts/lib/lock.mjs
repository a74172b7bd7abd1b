import { createHash } from "node:crypto";
import { connect, createServer } from "node:net";
import { setTimeout as delay } from "node:timers/promises";
import { Interrupted, Trouble } from "./trouble.mjs";

/*
 * One holder for each folder and name. A lock is a Linux abstract socket: the kernel frees it when its holder ends,
 * however it ends, so that it can never be stale; whoever is refused can ask the holder who it is.
 */
const addressOf = ({ folder, name }) =>
  `\0keepstep-${name}-${createHash("sha256").update(folder).digest("hex").slice(0, 24)}`;

/** Holds the address; undefined when somebody else does. */
async function hold(address, describe) {
  const server = createServer((socket) => {
    socket.on("error", () => socket.destroy());
    socket.end(describe());
  });
  const held = await new Promise((resolve, reject) => {
    server.once("error", (error) => (error.code === "EADDRINUSE" ? resolve(false) : reject(error)));
    server.listen(address, () => resolve(true));
  });
  if (!held) return undefined;
  server.unref();
  return { release: () => new Promise((resolve) => server.close(resolve)) };
}

/** Takes the lock, or says who holds it. */
export async function takeLock({ folder, name, describe }) {
  const address = addressOf({ folder, name });
  const lock = await hold(address, describe);
  if (lock) return lock;
  throw new Trouble(`${await askHolder(address)} Nothing was started or changed.`);
}

/** Does some short work while holding the lock, after waiting for its turn. */
export async function inTurn({ folder, name, signal }, work) {
  const address = addressOf({ folder, name });
  let lock;
  while (!(lock = await hold(address, () => ""))) {
    if (signal?.aborted) throw new Interrupted();
    await delay(100);
  }
  try {
    return await work();
  } finally {
    await lock.release();
  }
}

function askHolder(address) {
  return new Promise((resolve) => {
    let answer = "";
    const unknown = "Another command already works in this folder.";
    const socket = connect(address);
    socket.setEncoding("utf8").setTimeout(2000, () => socket.destroy());
    socket.on("data", (chunk) => (answer += chunk));
    socket.on("error", () => resolve(unknown));
    socket.on("close", () => resolve(answer || unknown));
  });
}
