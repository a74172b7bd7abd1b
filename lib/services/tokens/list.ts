import "server-only";
import { Op } from "sequelize";
import type { TokenList, TokenQuery } from "@/lib/schemas/tokens";
import { Token, User } from "@/models/people";
import type { Context } from "@/lib/services/kernel/context";
import { authorize } from "@/lib/services/kernel/context";
import { presentToken } from "./present";

const NEWEST = 500;

/** Tokens, newest first. */
export async function listTokens(context: Context, { state }: TokenQuery): Promise<TokenList> {
  authorize(context, "tokens.read");
  const standing = { revokedAt: null, expiresAt: { [Op.gt]: context.now } };
  const tokens = await Token.findAll({
    where: state === "standing" ? standing : {},
    order: [["createdAt", "DESC"]],
    limit: NEWEST,
  });
  const owners = await User.findAll({ where: { id: [...new Set(tokens.map((token) => token.ownerId))] } });
  const byId = new Map(owners.map((owner) => [owner.id, owner]));
  return {
    items: tokens.flatMap((token) => {
      const owner = byId.get(token.ownerId);
      return owner ? [presentToken(token, { owner, now: context.now })] : [];
    }),
  };
}
