import "server-only";
import { resetPasswordSchema, type EndedSessions, type ResetPassword } from "@/lib/schemas/people";
import type { Context } from "@/lib/services/kernel/context";
import { authorize, personBehind } from "@/lib/services/kernel/context";
import { ServiceError } from "@/lib/services/kernel/errors";
import { withTransaction } from "@/lib/services/kernel/transaction";
import { appendRecord } from "@/lib/services/record/append";
import { endSessionsOf } from "@/lib/services/sessions/end";
import { hashPassword } from "@/lib/services/sessions/password";
import { lockUser, requireGoodPassword } from "./find";

/** Gives somebody else a new password; every session of that person ends at once. */
export async function resetPassword(
  context: Context,
  input: ResetPassword & { readonly id: string },
): Promise<EndedSessions> {
  const { password, reason } = resetPasswordSchema.parse(input);
  authorize(context, "users.write");
  if (input.id === personBehind(context.actor))
    throw new ServiceError("invalid", "This is your own password: change it under Settings, Your password.");
  const passwordHash = await hashPassword(password);
  return withTransaction(context, async (tx) => {
    authorize(tx, "users.write");
    const user = await lockUser(tx, input.id);
    requireGoodPassword(password, user);
    await user.update({ passwordHash }, { transaction: tx.transaction });
    const endedSessions = await endSessionsOf(tx, { userId: user.id, reason: "password reset" });
    await appendRecord(tx, {
      action: "person.password_reset",
      object: { type: "person", id: user.id, label: user.name },
      after: { endedSessions },
      reason,
    });
    return { endedSessions };
  });
}
