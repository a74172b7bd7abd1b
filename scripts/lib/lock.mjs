import { createHash } from "node:crypto";
import { connect, createServer } from "node:net";
import { Trouble } from "./trouble.mjs";

/**
 * One holder for each folder and name. The lock is a Linux abstract socket: the kernel frees it when its holder ends,
 * however it ends, so that it can never be stale; whoever is refused can ask the holder who it is.
 */
export async function takeLock({ folder, name, describe }) {
  const address = `\0keepstep-${name}-${createHash("sha256").update(folder).digest("hex").slice(0, 24)}`;
  const server = createServer((socket) => {
    socket.on("error", () => socket.destroy());
    socket.end(describe());
  });
  const taken = await new Promise((resolve, reject) => {
    server.once("error", (error) => (error.code === "EADDRINUSE" ? resolve(false) : reject(error)));
    server.listen(address, () => resolve(true));
  });
  if (!taken)
    throw new Trouble(
      `${await askHolder(address)} Nothing was started or changed. Stop it first, or use it.`,
    );
  server.unref();
  return { release: () => new Promise((resolve) => server.close(resolve)) };
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
