import "server-only";
import { User } from "@/models/people";
import { Site } from "@/models/catalog";
import type { Tx } from "@/lib/services/kernel/context";
import { notFound, ServiceError } from "@/lib/services/kernel/errors";
import { passwordProblem } from "@/lib/domain/password";

/** The person's row, locked until the act is over. */
export async function lockUser(tx: Tx, id: string): Promise<User> {
  const user = await User.findByPk(id, { transaction: tx.transaction, lock: tx.transaction.LOCK.UPDATE });
  if (!user) throw notFound("person");
  return user;
}

/** Refuses an e-mail address that somebody else signs in with. */
export async function requireFreeEmail(tx: Tx, email: string): Promise<void> {
  const taken = await User.findOne({ where: { email }, transaction: tx.transaction });
  if (taken)
    throw new ServiceError("conflict", `${taken.name} signs in with ${email} already. Nothing was stored.`, {
      pointer: "/email",
    });
}

export async function requireSite(tx: Tx, siteId: string | null): Promise<void> {
  if (siteId === null) return;
  const site = await Site.findByPk(siteId, { transaction: tx.transaction });
  if (!site || site.retiredAt)
    throw new ServiceError("invalid", "There is no such site in use. Choose another one.", {
      pointer: "/siteId",
    });
}

/** Refuses a password that would be guessed for this person. */
export function requireGoodPassword(password: string, owner: { email: string; name: string }): void {
  const problem = passwordProblem(password, owner);
  if (problem) throw new ServiceError("invalid", problem, { pointer: "/password" });
}

/**
 * Refuses to leave the desk without anybody who manages it. The rows of all active admins are locked, so that two
 * admins who put each other out at the same moment do not both succeed.
 */
export async function requireAnotherAdmin(tx: Tx, user: User): Promise<void> {
  if (user.role !== "admin" || !user.active) return;
  const admins = await User.findAll({
    where: { role: "admin", active: true },
    order: [["id", "ASC"]],
    transaction: tx.transaction,
    lock: tx.transaction.LOCK.UPDATE,
  });
  if (admins.every((admin) => admin.id === user.id))
    throw new ServiceError(
      "conflict",
      `${user.name} is the last active admin. Make somebody else an admin first; nothing was changed.`,
    );
}
