import { identify, living } from "./processes.mjs";

const LOOK_MS = 300;

/**
 * A signal that aborts once this command is to end: on Ctrl-C, a request to end, a closed terminal, or when the
 * package manager that ran it is gone, which passes on some signals only.
 */
export function interruption() {
  const interrupt = new AbortController();
  for (const name of ["SIGINT", "SIGTERM", "SIGHUP"]) process.on(name, () => interrupt.abort());
  const caller = process.env.npm_lifecycle_event && identify(process.ppid);
  const look = setInterval(() => {
    if (caller && living(caller) === undefined) interrupt.abort();
  }, LOOK_MS);
  look.unref();
  return interrupt.signal;
}
