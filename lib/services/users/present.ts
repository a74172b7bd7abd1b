import "server-only";
import type { Transaction } from "sequelize";
import { QueryTypes } from "sequelize";
import type { UserView } from "@/lib/schemas/people";
import { sequelize } from "@/lib/server/sequelize";
import type { User } from "@/models/people";

interface SessionFacts {
  readonly userId: string;
  readonly open: number;
  readonly last: Date | null;
}

async function sessionFacts(
  userIds: readonly string[],
  now: Date,
  transaction: Transaction | null,
): Promise<Map<string, SessionFacts>> {
  const rows = await sequelize.query<SessionFacts>(
    `select user_id as "userId", max(created_at) as last,
            (count(*) filter (where ended_at is null and expires_at > $2))::int as open
     from sessions where user_id = any($1::uuid[]) group by user_id`,
    { type: QueryTypes.SELECT, bind: [userIds, now], transaction },
  );
  return new Map(rows.map((row) => [row.userId, row]));
}

/** People as they leave a service: never a hash. */
export async function presentUsers(
  users: readonly User[],
  { now, transaction }: { readonly now: Date; readonly transaction?: Transaction },
): Promise<UserView[]> {
  const ids = users.map((user) => user.id);
  const facts = await sessionFacts(ids, now, transaction ?? null);
  return users.map((user) => ({
    id: user.id,
    email: user.email,
    name: user.name,
    role: user.role,
    active: user.active,
    siteId: user.siteId,
    createdAt: user.createdAt.toISOString(),
    openSessions: facts.get(user.id)?.open ?? 0,
    lastSignInAt: facts.get(user.id)?.last?.toISOString() ?? null,
  }));
}

/** The one person of an act that is under way. */
export async function presentUser(
  tx: { readonly now: Date; readonly transaction: Transaction },
  user: User,
): Promise<UserView> {
  const [view] = await presentUsers([user], tx);
  if (!view) throw new Error("A person that was just loaded is presented.");
  return view;
}
