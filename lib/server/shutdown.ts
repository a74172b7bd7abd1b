import "server-only";
import { subscribe } from "node:diagnostics_channel";
import type { Server } from "node:http";

const PATIENCE_MS = 5_000;

interface Shutdown {
  readonly controller: AbortController;
  readonly servers: Set<Server>;
}

const shared = globalThis as unknown as { keepstepShutdown?: Shutdown };
const shutdown = (shared.keepstepShutdown ??= { controller: new AbortController(), servers: new Set() });

/** Aborts when the process is asked to end: every open stream closes on it, or it would hold the server. */
export const shutdownSignal = shutdown.controller.signal;

/**
 * Ends the process in order when it is asked to: no new requests, those in hand are answered, then `finish`.
 * Next starts the HTTP server itself and gives no handle to it, so it is learned from its first request.
 */
export function installShutdown(finish: () => Promise<void>): void {
  subscribe("http.server.request.start", (message) => {
    shutdown.servers.add((message as { server: Server }).server);
  });
  for (const name of ["SIGTERM", "SIGINT"] as const) process.once(name, () => void leave(finish));
}

async function leave(finish: () => Promise<void>): Promise<void> {
  shutdown.controller.abort();
  const closing = [...shutdown.servers].map((server) => new Promise((resolve) => server.close(resolve)));
  const patience = new Promise((resolve) => setTimeout(resolve, PATIENCE_MS));
  await Promise.race([Promise.all(closing), patience]);
  await finish().catch(() => undefined);
  process.exit(0);
}
