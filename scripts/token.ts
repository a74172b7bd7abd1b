import { parseArgs } from "node:util";
import { SYSTEM } from "@/lib/domain/roles";
import { createTokenSchema } from "@/lib/schemas/tokens";
import { now } from "@/lib/server/clock";
import { sequelize } from "@/lib/server/sequelize";
import { createToken } from "@/lib/services/tokens/create";

/** Makes a token with all scopes of its role in the database of DATABASE_URL; prints it as the last line. */
async function main(): Promise<void> {
  const { values } = parseArgs({ options: { role: { type: "string" }, name: { type: "string" } } });
  const wanted = createTokenSchema.safeParse(values);
  if (!wanted.success) {
    const wrong = wanted.error.issues.map((issue) => `--${issue.path.join(".")}: ${issue.message}`);
    throw new Error(`No token was made. ${wrong.join("; ")}`);
  }
  const made = await createToken({ actor: SYSTEM, now: now() }, wanted.data);
  console.log(`Token "${made.name}" for the role ${made.role}, scopes: ${made.scopes.join(", ")}.`);
  console.log("It is shown only now; keep it safe.");
  console.log(made.token);
}

main()
  .catch((error: Error) => {
    console.error(error.message);
    process.exitCode = 1;
  })
  .finally(() => sequelize.close());
