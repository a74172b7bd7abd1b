import "server-only";
import { updateUserSchema, type UpdateUser, type UserView } from "@/lib/schemas/people";
import type { User } from "@/models/people";
import type { Context } from "@/lib/services/kernel/context";
import { authorize } from "@/lib/services/kernel/context";
import { withTransaction } from "@/lib/services/kernel/transaction";
import { appendRecord } from "@/lib/services/record/append";
import { lockUser, requireAnotherAdmin, requireFreeEmail, requireSite } from "./find";
import { presentUser } from "./present";

const factsOf = ({ email, name, role, siteId }: User) => ({ email, name, role, siteId });

/** Changes who a person is here. Open sessions go on, with the new role from their next request on. */
export async function updateUser(
  context: Context,
  input: UpdateUser & { readonly id: string },
): Promise<UserView> {
  const wanted = updateUserSchema.parse(input);
  return withTransaction(context, async (tx) => {
    authorize(tx, "users.write");
    const user = await lockUser(tx, input.id);
    const before = factsOf(user);
    if (wanted.email !== user.email) await requireFreeEmail(tx, wanted.email);
    if (wanted.siteId !== user.siteId) await requireSite(tx, wanted.siteId);
    if (wanted.role !== "admin") await requireAnotherAdmin(tx, user);
    await user.update(wanted, { transaction: tx.transaction });
    await appendRecord(tx, {
      action: "person.changed",
      object: { type: "person", id: user.id, label: user.name },
      before,
      after: factsOf(user),
    });
    return presentUser(tx, user);
  });
}
