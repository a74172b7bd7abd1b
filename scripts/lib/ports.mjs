import { createServer } from "node:net";
import { Trouble } from "./trouble.mjs";

/** A port as typed by a person; `fallback` where nothing was typed. */
export function parsePort(text, fallback) {
  if (text === undefined || text === "") return fallback;
  const port = Number(text);
  if (/^\d+$/.test(text) && port >= 1 && port <= 65535) return port;
  throw new Trouble(`PORT must be a whole number from 1 to 65535, but is "${text}". Nothing was started.`);
}

function listen(port) {
  return new Promise((resolve, reject) => {
    const server = createServer();
    server.once("error", reject);
    server.listen({ port, host: "127.0.0.1", exclusive: true }, () => {
      const taken = server.address().port;
      server.close(() => resolve(taken));
    });
  });
}

/** Whether nothing listens on this port of 127.0.0.1. Rejects when this user may not use the port at all. */
export async function isFree(port) {
  try {
    await listen(port);
    return true;
  } catch (error) {
    if (error.code === "EADDRINUSE") return false;
    throw error;
  }
}

/** The preferred port while it is free, else a free one that the system picks. */
export async function pickPort(preferred) {
  if (preferred && (await isFree(preferred))) return preferred;
  return listen(0);
}

/** Refuses a port that cannot be had, before any long work. */
export async function demandPort(port) {
  const free = await isFree(port).catch((error) => error.code);
  if (free === true) return;
  const other = port === 3001 ? 3002 : 3001;
  const [why, cure] =
    free === false
      ? ["is in use by another program", "Stop that program, or choose"]
      : [`cannot be used by this user (${free})`, "Choose"];
  throw new Trouble(
    `Port ${port} of 127.0.0.1 ${why}. Nothing was started or changed. ${cure} another port, for example: PORT=${other} npm start`,
  );
}
