import "server-only";
import { createUserSchema, type CreateUser, type UserView } from "@/lib/schemas/people";
import { User } from "@/models/people";
import type { Context } from "@/lib/services/kernel/context";
import { authorize } from "@/lib/services/kernel/context";
import { withTransaction } from "@/lib/services/kernel/transaction";
import { appendRecord } from "@/lib/services/record/append";
import { hashPassword } from "@/lib/services/sessions/password";
import { requireFreeEmail, requireGoodPassword, requireSite } from "./find";
import { presentUser } from "./present";

/** Adds a person. */
export async function createUser(context: Context, input: CreateUser): Promise<UserView> {
  const { email, name, role, siteId, password } = createUserSchema.parse(input);
  authorize(context, "users.write");
  requireGoodPassword(password, { email, name });
  const passwordHash = await hashPassword(password);
  return withTransaction(context, async (tx) => {
    authorize(tx, "users.write");
    await requireFreeEmail(tx, email);
    await requireSite(tx, siteId);
    const user = await User.create(
      { email, name, role, siteId, passwordHash },
      { transaction: tx.transaction },
    );
    await appendRecord(tx, {
      action: "person.added",
      object: { type: "person", id: user.id, label: name },
      after: { email, name, role, siteId },
    });
    return presentUser(tx, user);
  });
}
