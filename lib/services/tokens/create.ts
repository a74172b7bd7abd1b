import "server-only";
import { randomBytes } from "node:crypto";
import { createTokenSchema, type CreateToken, type NewToken } from "@/lib/schemas/tokens";
import { scopesOf } from "@/lib/policies/scopes";
import { Token, User } from "@/models/people";
import type { Context, Tx } from "@/lib/services/kernel/context";
import { authorize, personBehind } from "@/lib/services/kernel/context";
import { ServiceError } from "@/lib/services/kernel/errors";
import { withTransaction } from "@/lib/services/kernel/transaction";
import { appendRecord } from "@/lib/services/record/append";
import { tokenHash } from "@/lib/services/sessions/resolve";
import { presentToken } from "./present";

const DAY_MS = 86_400_000;
const RANDOM_BYTES = 32;
const HINT_LENGTH = 4;

/** Whose a new token is: the person who makes it; one made on the server's console is the oldest active admin's. */
async function ownerOf(tx: Tx): Promise<User> {
  const id = personBehind(tx.actor);
  const owner = await User.findOne({
    where: id === null ? { role: "admin", active: true } : { id },
    order: [
      ["createdAt", "ASC"],
      ["id", "ASC"],
    ],
    transaction: tx.transaction,
  });
  if (owner) return owner;
  throw new ServiceError("conflict", "There is no active admin whose token this could be. None was made.");
}

/** Makes a token of 256 random bits. Its answer is the only time that it is shown; its SHA-256 hash is kept. */
export async function createToken(context: Context, input: CreateToken): Promise<NewToken> {
  const { name, role, scopes: wanted, days } = createTokenSchema.parse(input);
  const scopes = scopesOf(role).filter((scope) => wanted?.includes(scope) ?? true);
  if (scopes.length === 0)
    throw new ServiceError("invalid", `The role ${role} can do nothing in these scopes. None was made.`, {
      pointer: "/scopes",
    });
  const token = `ks_${randomBytes(RANDOM_BYTES).toString("base64url")}`;
  return withTransaction(context, async (tx) => {
    authorize(tx, "tokens.write");
    const owner = await ownerOf(tx);
    const expiresAt = new Date(tx.now.getTime() + days * DAY_MS);
    const hint = token.slice(-HINT_LENGTH);
    const row = await Token.create(
      {
        name,
        role,
        scopes,
        hint,
        ownerId: owner.id,
        expiresAt,
        createdAt: tx.now,
        tokenHash: tokenHash(token),
      },
      { transaction: tx.transaction },
    );
    await appendRecord(tx, {
      action: "token.made",
      object: { type: "token", id: row.id, label: name },
      after: { name, role, scopes, hint, owner: owner.name, expiresAt },
    });
    return { ...presentToken(row, { owner, now: tx.now }), token };
  });
}
