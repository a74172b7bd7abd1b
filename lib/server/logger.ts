import "server-only";
import pino from "pino";
import { env } from "./env";

const SECRETS = ["password", "newPassword", "passwordHash", "token", "secret", "authorization", "cookie"];

/** JSON lines on standard output; whatever could sign somebody in is left out. */
export const logger = pino({
  level: env().logLevel,
  redact: {
    paths: SECRETS.flatMap((name) => [name, `*.${name}`, `*.*.${name}`]),
    censor: "(left out)",
  },
});
