import "server-only";
import { Op } from "sequelize";
import { SYSTEM } from "@/lib/domain/roles";
import { Session, SignInFailure, User } from "@/models/people";
import type { Context } from "@/lib/services/kernel/context";
import { authorize } from "@/lib/services/kernel/context";
import { ServiceError } from "@/lib/services/kernel/errors";
import { withTransaction } from "@/lib/services/kernel/transaction";
import { appendRecord } from "@/lib/services/record/append";
import { passwordMatches, spendTime } from "./password";

export const SESSION_HOURS = 12;
const FAILURES = 10;
const WINDOW_MS = 15 * 60_000;

export interface OpenedSession {
  readonly sessionId: string;
  readonly userId: string;
  readonly name: string;
  readonly email: string;
}

async function refuseWhenThrottled(email: string, now: Date): Promise<void> {
  const since = new Date(now.getTime() - WINDOW_MS);
  const failures = await SignInFailure.count({ where: { email, at: { [Op.gt]: since } } });
  if (failures >= FAILURES)
    throw new ServiceError(
      "throttled",
      "Too many wrong passwords for this address. Wait 15 minutes, then try again.",
    );
}

/** The person with this e-mail address and password, or null; a wrong try is counted. */
export async function checkCredentials(input: {
  email: string;
  password: string;
  now: Date;
}): Promise<User | null> {
  const email = input.email.trim().toLowerCase();
  await refuseWhenThrottled(email, input.now);
  const user = await User.findOne({ where: { email } });
  const matches = user
    ? await passwordMatches(user.passwordHash, input.password)
    : await spendTime(input.password);
  if (user && matches && user.active) return user;
  await SignInFailure.create({ email, at: input.now });
  return null;
}

/** Opens a session that the server can end at once; null where e-mail address and password do not fit. */
export async function openSession(input: {
  email: string;
  password: string;
  now: Date;
}): Promise<OpenedSession | null> {
  const user = await checkCredentials(input);
  if (!user) return null;
  const context: Context = { actor: SYSTEM, now: input.now };
  const expiresAt = new Date(input.now.getTime() + SESSION_HOURS * 3_600_000);
  return withTransaction(context, async (tx) => {
    authorize(tx, "account.write");
    const session = await Session.create(
      { userId: user.id, createdAt: tx.now, expiresAt },
      { transaction: tx.transaction },
    );
    const actor = {
      kind: "person",
      id: user.id,
      name: user.name,
      role: user.role,
      sessionId: session.id,
    } as const;
    await appendRecord(
      { ...tx, actor },
      { action: "session.opened", object: { type: "person", id: user.id, label: user.name } },
    );
    return { sessionId: session.id, userId: user.id, name: user.name, email: user.email };
  });
}
