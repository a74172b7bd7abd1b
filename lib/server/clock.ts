import "server-only";

/** The one clock of the server. Services get the time in their context and never look here. */
export function now(): Date {
  return new Date();
}
