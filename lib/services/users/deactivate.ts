import "server-only";
import { deactivateSchema, type Deactivate, type UserView } from "@/lib/schemas/people";
import type { Context } from "@/lib/services/kernel/context";
import { authorize } from "@/lib/services/kernel/context";
import { withTransaction } from "@/lib/services/kernel/transaction";
import { appendRecord } from "@/lib/services/record/append";
import { endSessionsOf } from "@/lib/services/sessions/end";
import { lockUser, requireAnotherAdmin } from "./find";
import { presentUser } from "./present";

/**
 * Shuts a person out at once: open sessions end, and tokens that the person made are refused while it lasts. What the
 * person wrote and signed stays as it is. `deactivated: false` lets the person sign in again.
 */
export async function deactivateUser(
  context: Context,
  input: Deactivate & { readonly id: string },
): Promise<UserView> {
  const { deactivated, reason } = deactivateSchema.parse(input);
  return withTransaction(context, async (tx) => {
    authorize(tx, "users.write");
    const user = await lockUser(tx, input.id);
    if (user.active === !deactivated) return presentUser(tx, user);
    if (deactivated) await requireAnotherAdmin(tx, user);
    await user.update({ active: !deactivated }, { transaction: tx.transaction });
    const endedSessions = deactivated
      ? await endSessionsOf(tx, { userId: user.id, reason: "deactivated" })
      : 0;
    await appendRecord(tx, {
      action: deactivated ? "person.deactivated" : "person.let_in_again",
      object: { type: "person", id: user.id, label: user.name },
      before: { active: deactivated },
      after: { active: !deactivated, endedSessions },
      reason,
    });
    return presentUser(tx, user);
  });
}
