import "server-only";
import { headers } from "next/headers";
import { getServerSession } from "next-auth";
import { cache } from "react";
import type { Actor } from "@/lib/domain/roles";
import { now } from "@/lib/server/clock";
import { actorOfSession, actorOfToken } from "@/lib/services/sessions/resolve";
import { authOptions } from "./auth-options";

/** The person of the cookie's session; null for nobody. Asked once per rendered page. */
export const cookieActor = cache(async (): Promise<Actor | null> => {
  const session = await getServerSession(authOptions);
  return session?.sessionId ? actorOfSession(session.sessionId, now()) : null;
});

/** Token first, then cookie. A wrong token is nobody, even beside a good cookie. */
export async function requestActor(): Promise<Actor | null> {
  const authorization = (await headers()).get("authorization");
  if (!authorization) return cookieActor();
  const bearer = /^Bearer ([A-Za-z0-9._~+/=-]{20,200})$/.exec(authorization)?.[1];
  return bearer ? actorOfToken(bearer, now()) : null;
}
