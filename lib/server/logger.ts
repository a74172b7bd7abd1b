import "server-only";
import pino from "pino";
import { env } from "./env";

const SECRETS = ["password", "newPassword", "passwordHash", "token", "secret", "authorization", "cookie"];

/** Whatever could sign somebody in is left out of every line. */
export const LOG_REDACTION = {
  paths: SECRETS.flatMap((name) => [name, `*.${name}`, `*.*.${name}`]),
  censor: "(left out)",
};

/** JSON lines on standard output. */
export const logger = pino({ level: env().logLevel, redact: LOG_REDACTION });
