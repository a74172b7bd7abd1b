import "server-only";
import pg from "pg";
import { Sequelize } from "sequelize";

const shared = globalThis as unknown as { keepstepSequelize?: Sequelize };

function databaseUrl(): string {
  const url = process.env.DATABASE_URL;
  if (url) return url;
  // While Next builds, modules are evaluated but nothing connects.
  if (process.env.NEXT_PHASE === "phase-production-build") return "postgres://build@127.0.0.1:1/build";
  throw new Error("DATABASE_URL is not set.");
}

/** One pool a process, shared by every bundle layer of Next. */
export const sequelize = (shared.keepstepSequelize ??= new Sequelize(databaseUrl(), {
  dialect: "postgres",
  dialectModule: pg,
  logging: false,
  pool: { max: 10, min: 0, idle: 10_000, acquire: 15_000 },
  define: { underscored: true, timestamps: false },
}));
