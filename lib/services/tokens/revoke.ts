import "server-only";
import type { TokenView } from "@/lib/schemas/tokens";
import { Token, User } from "@/models/people";
import type { Context } from "@/lib/services/kernel/context";
import { authorize } from "@/lib/services/kernel/context";
import { notFound } from "@/lib/services/kernel/errors";
import { withTransaction } from "@/lib/services/kernel/transaction";
import { appendRecord } from "@/lib/services/record/append";
import { presentToken } from "./present";

/** Revokes a token: its next call is nobody's. Revoking it once more changes nothing. */
export async function revokeToken(context: Context, { id }: { readonly id: string }): Promise<TokenView> {
  return withTransaction(context, async (tx) => {
    authorize(tx, "tokens.write");
    const { transaction } = tx;
    const token = await Token.findByPk(id, { transaction, lock: transaction.LOCK.UPDATE });
    const owner = token && (await User.findByPk(token.ownerId, { transaction }));
    if (!token || !owner) throw notFound("token");
    if (token.revokedAt) return presentToken(token, { owner, now: tx.now });
    await token.update({ revokedAt: tx.now }, { transaction });
    await appendRecord(tx, {
      action: "token.revoked",
      object: { type: "token", id: token.id, label: token.name },
      before: { revokedAt: null },
      after: { revokedAt: tx.now, hint: token.hint },
    });
    return presentToken(token, { owner, now: tx.now });
  });
}
