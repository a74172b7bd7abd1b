import "server-only";
import { logger } from "@/lib/server/logger";
import { sequelize } from "@/lib/server/sequelize";
import { ServiceError } from "@/lib/services/kernel/errors";

/** Whether the database answers at this moment. Says nothing else about the desk, since anybody may ask. */
export async function checkHealth(): Promise<{ readonly status: "ok" }> {
  try {
    await sequelize.query("select 1");
    return { status: "ok" };
  } catch (error) {
    logger.error({ err: error }, "the database does not answer");
    throw new ServiceError("unavailable", "The database does not answer. Try again in a moment.");
  }
}
