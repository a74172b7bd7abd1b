import "server-only";
import pino from "pino";

/** JSON lines on standard output; whatever could sign somebody in is left out. */
export const logger = pino({
  level: process.env.LOG_LEVEL ?? "info",
  redact: {
    paths: [
      "password",
      "*.password",
      "token",
      "*.token",
      "authorization",
      "*.authorization",
      "cookie",
      "*.cookie",
    ],
    censor: "(left out)",
  },
});
