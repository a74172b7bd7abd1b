import "server-only";
import pg from "pg";
import { Sequelize } from "sequelize";
import { databaseUrl } from "./env";

const shared = globalThis as unknown as { keepstepSequelize?: Sequelize };

/** One pool a process, shared by every bundle layer of Next. */
export const sequelize = (shared.keepstepSequelize ??= new Sequelize(databaseUrl(), {
  dialect: "postgres",
  dialectModule: pg,
  logging: false,
  pool: { max: 10, min: 0, idle: 10_000, acquire: 15_000 },
  define: { underscored: true, timestamps: false },
}));
