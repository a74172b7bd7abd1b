import "server-only";
import type { TokenView } from "@/lib/schemas/tokens";
import type { Token, User } from "@/models/people";

function stateOf(token: Token, owner: User, now: Date): TokenView["state"] {
  if (token.revokedAt) return "revoked";
  if (token.expiresAt <= now) return "expired";
  return owner.active ? "standing" : "owner left";
}

/** A token as it leaves a service: its last four characters, never itself. */
export function presentToken(
  token: Token,
  { owner, now }: { readonly owner: User; readonly now: Date },
): TokenView {
  return {
    id: token.id,
    name: token.name,
    role: token.role,
    scopes: token.scopes,
    hint: token.hint,
    ownerId: owner.id,
    ownerName: owner.name,
    createdAt: token.createdAt.toISOString(),
    expiresAt: token.expiresAt.toISOString(),
    revokedAt: token.revokedAt?.toISOString() ?? null,
    lastUsedAt: token.lastUsedAt?.toISOString() ?? null,
    state: stateOf(token, owner, now),
  };
}
