import "server-only";
import { changePasswordSchema, type ChangePassword, type EndedSessions } from "@/lib/schemas/people";
import { User } from "@/models/people";
import type { Context } from "@/lib/services/kernel/context";
import { authorize, requirePerson } from "@/lib/services/kernel/context";
import { ServiceError } from "@/lib/services/kernel/errors";
import { withTransaction } from "@/lib/services/kernel/transaction";
import { appendRecord } from "@/lib/services/record/append";
import { endSessionsOf } from "@/lib/services/sessions/end";
import { checkCredentials } from "@/lib/services/sessions/open";
import { hashPassword } from "@/lib/services/sessions/password";
import { lockUser, requireGoodPassword } from "@/lib/services/users/find";

/** Refuses a wrong current password; wrong tries count as those at the sign-in do. */
async function requireCurrentPassword(context: Context, userId: string, password: string): Promise<User> {
  const user = await User.findByPk(userId);
  const checked = user && (await checkCredentials({ email: user.email, password, now: context.now }));
  if (!checked)
    throw new ServiceError("invalid", "This is not the password you have now. Nothing was changed.", {
      pointer: "/currentPassword",
    });
  return checked;
}

/** Changes one's own password; every other session of that person ends at once, the one at hand goes on. */
export async function changePassword(context: Context, input: ChangePassword): Promise<EndedSessions> {
  const { currentPassword, password } = changePasswordSchema.parse(input);
  authorize(context, "account.write");
  const { id, sessionId } = requirePerson(context);
  const known = await requireCurrentPassword(context, id, currentPassword);
  if (password === currentPassword)
    throw new ServiceError("invalid", "This is the password you have now. Choose another one.", {
      pointer: "/password",
    });
  requireGoodPassword(password, known);
  const passwordHash = await hashPassword(password);
  return withTransaction(context, async (tx) => {
    authorize(tx, "account.write");
    const user = await lockUser(tx, id);
    if (user.passwordHash !== known.passwordHash)
      throw new ServiceError("conflict", "Your password was changed meanwhile. Sign in again and look.");
    await user.update({ passwordHash }, { transaction: tx.transaction });
    const endedSessions = await endSessionsOf(tx, {
      userId: id,
      reason: "password changed",
      keep: sessionId,
    });
    await appendRecord(tx, {
      action: "person.password_changed",
      object: { type: "person", id, label: user.name },
      after: { endedSessions },
    });
    return { endedSessions };
  });
}
