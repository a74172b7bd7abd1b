import "server-only";
import { z } from "zod";

const LEVELS = ["fatal", "error", "warn", "info", "debug", "trace", "silent"] as const;

/** A variable that is set to nothing counts as not set. */
const filled = (value: unknown) => (value === "" ? undefined : value);
const optional = <S extends z.ZodType>(schema: S) => z.preprocess(filled, schema.optional());

const envSchema = z.object({
  DATABASE_URL: optional(z.url({ protocol: /^postgres(ql)?$/ })),
  NEXTAUTH_SECRET: optional(z.string().min(16)),
  NEXTAUTH_URL: optional(z.url({ protocol: /^https?$/ })),
  SMTP_URL: optional(z.url({ protocol: /^smtps?$/ })),
  MAIL_FROM: optional(z.string().min(3)),
  LOG_LEVEL: optional(z.enum(LEVELS)),
  KEEPSTEP_DEMO: optional(z.enum(["0", "1"])),
  KEEPSTEP_MAIL_DIR: optional(z.string()),
});

export interface Env {
  /** PostgreSQL; undefined while nothing needs it (a build, a unit test). */
  readonly databaseUrl: string | undefined;
  /** Signs the session cookies. */
  readonly authSecret: string | undefined;
  /** Where people reach the desk: the start of every link in a mail, without a slash at the end. */
  readonly publicUrl: string;
  readonly smtpUrl: string | undefined;
  readonly mailFrom: string;
  readonly logLevel: (typeof LEVELS)[number];
  /** Demo mode shows the demo sign-ins and the page of caught mails. */
  readonly demo: boolean;
  /** Folder where the local SMTP catcher keeps what was sent. */
  readonly mailFolder: string | undefined;
}

/** Reads the settings of the process; one sentence names every one that cannot be used. */
export function readEnv(variables: Readonly<Record<string, string | undefined>>): Env {
  const parsed = envSchema.safeParse(variables);
  if (!parsed.success) {
    const wrong = parsed.error.issues.map((issue) => `${issue.path.join(".")} (${issue.message})`);
    throw new Error(`These settings cannot be used: ${wrong.join("; ")}.`);
  }
  const set = parsed.data;
  return {
    databaseUrl: set.DATABASE_URL,
    authSecret: set.NEXTAUTH_SECRET,
    publicUrl: (set.NEXTAUTH_URL ?? "http://127.0.0.1:3000").replace(/\/+$/, ""),
    smtpUrl: set.SMTP_URL,
    mailFrom: set.MAIL_FROM ?? "Keepstep <keepstep@example.test>",
    logLevel: set.LOG_LEVEL ?? "info",
    demo: set.KEEPSTEP_DEMO === "1",
    mailFolder: set.KEEPSTEP_MAIL_DIR,
  };
}

let current: Env | undefined;

/** The settings of this process, read at their first use so that a build needs none. */
export function env(): Env {
  return (current ??= readEnv(process.env));
}

/** The database to connect to. While Next builds, modules are evaluated but nothing connects. */
export function databaseUrl(): string {
  const url = env().databaseUrl;
  if (url) return url;
  if (process.env.NEXT_PHASE === "phase-production-build") return "postgres://build@127.0.0.1:1/build";
  throw new Error("DATABASE_URL is not set.");
}

/** Refuses to serve without what serving needs. */
export function demandServerEnv(): void {
  const { authSecret } = env();
  databaseUrl();
  if (!authSecret) throw new Error("NEXTAUTH_SECRET is not set.");
}
