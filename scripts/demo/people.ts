import { randomUUID } from "node:crypto";
import { SYSTEM, type Actor, type Role } from "../../lib/domain/roles";
import type { Context } from "../../lib/services/kernel/context";
import { createUser } from "../../lib/services/users/create";
import { User } from "../../models/people";
import { demoPeople } from "../demo-people.mjs";

const DAY_MS = 86_400_000;

export interface DemoPerson {
  readonly actor: Extract<Actor, { kind: "person" }>;
  readonly password: string;
}

export type DemoPeople = Readonly<Record<Role, DemoPerson>>;

/** Somebody on a day before `now`, some minutes into it. */
export function at(actor: Actor, now: Date, daysAgo: number, minutes = 0): Context {
  return { actor, now: new Date(now.getTime() - daysAgo * DAY_MS + minutes * 60_000) };
}

/** The people of the demo, one a role, with sign-ins of their own. Who is there already stays as they are. */
export async function loadPeople(now: Date): Promise<DemoPeople> {
  const people: [Role, DemoPerson][] = [];
  for (const { role, name, email, password } of demoPeople()) {
    const known = await User.findOne({ where: { email } });
    const id =
      known?.id ?? (await createUser(at(SYSTEM, now, 70), { role, name, email, password, siteId: null })).id;
    people.push([role, { actor: { kind: "person", id, name, role, sessionId: randomUUID() }, password }]);
  }
  return Object.fromEntries(people) as Record<Role, DemoPerson>;
}
