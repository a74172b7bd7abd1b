import "server-only";
import type { UserView } from "@/lib/schemas/people";
import { User } from "@/models/people";
import type { Context } from "@/lib/services/kernel/context";
import { authorize } from "@/lib/services/kernel/context";
import { notFound } from "@/lib/services/kernel/errors";
import { presentUsers } from "./present";

export async function showUser(context: Context, { id }: { readonly id: string }): Promise<UserView> {
  authorize(context, "users.read");
  const user = await User.findByPk(id);
  const [view] = await presentUsers(user ? [user] : [], { now: context.now });
  if (!view) throw notFound("person");
  return view;
}
