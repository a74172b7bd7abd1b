import "server-only";
import type { NextAuthOptions } from "next-auth";
import CredentialsProvider from "next-auth/providers/credentials";
import { z } from "zod";
import { now } from "@/lib/server/clock";
import { endSession } from "@/lib/services/sessions/end";
import { openSession, SESSION_HOURS } from "@/lib/services/sessions/open";

const credentialsSchema = z.object({ email: z.email().max(200), password: z.string().min(1).max(200) });

/**
 * The cookie holds only the number of a session in the database, which is looked up at every request: a
 * deactivated person or a changed password ends it at once.
 */
export const authOptions: NextAuthOptions = {
  session: { strategy: "jwt", maxAge: SESSION_HOURS * 3600 },
  pages: { signIn: "/sign-in", error: "/sign-in" },
  providers: [
    CredentialsProvider({
      credentials: { email: {}, password: {} },
      async authorize(credentials) {
        const parsed = credentialsSchema.safeParse(credentials);
        if (!parsed.success) return null;
        const session = await openSession({ ...parsed.data, now: now() });
        return session
          ? { id: session.userId, name: session.name, email: session.email, sessionId: session.sessionId }
          : null;
      },
    }),
  ],
  callbacks: {
    jwt: ({ token, user }) => (user ? { ...token, sessionId: user.sessionId } : token),
    session: ({ session, token }) => ({ ...session, sessionId: token.sessionId }),
  },
  events: {
    async signOut({ token }) {
      if (token?.sessionId)
        await endSession({ sessionId: token.sessionId, name: token.name ?? "", now: now() });
    },
  },
};
