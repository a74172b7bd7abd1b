import "server-only";
import { createHash } from "node:crypto";
import type { Actor } from "@/lib/domain/roles";
import { Session, Token, User } from "@/models/people";

/** The person whose open session this is, with the role of this moment; null once it is ended, expired or deactivated. */
export async function actorOfSession(sessionId: string, now: Date): Promise<Actor | null> {
  const session = await Session.findByPk(sessionId);
  if (!session || session.endedAt || session.expiresAt <= now) return null;
  const user = await User.findByPk(session.userId);
  if (!user?.active) return null;
  return { kind: "person", id: user.id, name: user.name, role: user.role, sessionId };
}

export function tokenHash(token: string): string {
  return createHash("sha256").update(token).digest("hex");
}

const USE_NOTED_EVERY_MS = 60_000;

/** The token's actor; null for an unknown, expired or revoked one, or one whose maker has left. */
export async function actorOfToken(bearer: string, now: Date): Promise<Actor | null> {
  const token = await Token.findOne({ where: { tokenHash: tokenHash(bearer) } });
  if (!token || token.revokedAt || token.expiresAt <= now) return null;
  const owner = await User.findByPk(token.ownerId);
  if (!owner?.active) return null;
  if (!token.lastUsedAt || now.getTime() - token.lastUsedAt.getTime() > USE_NOTED_EVERY_MS)
    await token.update({ lastUsedAt: now });
  return {
    kind: "token",
    id: token.id,
    name: token.name,
    role: token.role,
    scopes: token.scopes,
    ownerId: token.ownerId,
  };
}
